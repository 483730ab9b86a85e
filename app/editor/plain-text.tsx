import { useSession } from '../state/session';
import { useStore } from '../state/store';
import styles from './plain-text.module.css';

/** The text in a plain field, until the editor is there. */
export function PlainText() {
  const { text } = useSession();
  const { text: content } = useStore(text.state);
  return (
    <textarea
      className={styles.field}
      aria-label="Text of the notebook"
      spellCheck={false}
      value={content}
      onChange={(event) => text.typeInto(event.target.value, event.target.selectionStart)}
      onSelect={(event) => text.moveCursor(event.currentTarget.selectionStart)}
    />
  );
}
