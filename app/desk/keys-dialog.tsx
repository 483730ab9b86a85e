import { type Command, keyText, otherKeys } from './commands';
import { Dialog } from './dialog';
import styles from './keys-dialog.module.css';

interface KeysDialogProps {
  readonly commands: readonly Command[];
  readonly onClose: () => void;
}

export function KeysDialog({ commands, onClose }: KeysDialogProps) {
  const rows = [
    ...commands.filter(({ key }) => key !== null).map((command) => ({ keys: keyText(command), does: command.label })),
    ...otherKeys,
  ];
  return (
    <Dialog title="Keys" onClose={onClose}>
      <table className={styles.keys}>
        <tbody>
          {rows.map(({ keys, does }) => (
            <tr key={keys}>
              <th scope="row">
                <kbd>{keys}</kbd>
              </th>
              <td>{does}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Dialog>
  );
}
