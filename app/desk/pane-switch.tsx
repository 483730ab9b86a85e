import { Choice } from '../page/choice';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import styles from './pane-switch.module.css';

const panes = [
  { value: 'text', content: 'Text' },
  { value: 'page', content: 'Page' },
] as const;

/** On narrow screens one half is shown at a time. */
export function PaneSwitch() {
  const { settings } = useSession();
  const pane = useSelected(settings.state, (state) => state.pane);
  return (
    <div className={styles.switch}>
      <Choice label="Shown half" options={panes} value={pane} onChange={(next) => settings.change({ pane: next })} />
    </div>
  );
}
