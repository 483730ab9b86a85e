import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import { copyText, downloadText } from '../storage/files';
import { Dialog } from './dialog';
import styles from './text-dialog.module.css';

interface TextDialogProps {
  readonly title: string;
  readonly text: string;
  /** Name of the file it is saved as. */
  readonly file: string;
  readonly onClose: () => void;
}

/** A text to take along: to copy by button or by hand, or to save. */
export function TextDialog({ title, text, file, onClose }: TextDialogProps) {
  const { notices } = useSession();

  async function copy(): Promise<void> {
    if (await copyText(text)) {
      notices.say(`${title}: on the clipboard.`);
      onClose();
    } else notices.say('The browser does not let the page write to the clipboard; mark the text and copy it by hand.');
  }

  return (
    <Dialog title={title} onClose={onClose}>
      <textarea className={styles.text} aria-label={title} readOnly rows={18} value={text} data-first="" />
      <p className={styles.ways}>
        <WordButton onClick={() => void copy()}>Copy</WordButton>
        <WordButton onClick={() => downloadText(file, text)}>Save as {file}</WordButton>
      </p>
    </Dialog>
  );
}
