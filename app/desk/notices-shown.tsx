import { WordButton } from '../page/word-button';
import { useSession } from '../state/session';
import { useStore } from '../state/store';
import styles from './notices-shown.module.css';

/** What has just happened, in words; also read aloud. */
export function NoticesShown() {
  const { notices } = useSession();
  const shown = useStore(notices.state);
  return (
    <div className={styles.notices} role="status">
      {shown.map((notice) => (
        <p key={notice.id} className={styles.notice}>
          {notice.says}
          {notice.action ? (
            <WordButton
              onClick={() => {
                notice.action?.perform();
                notices.dismiss(notice.id);
              }}
            >
              {notice.action.label}
            </WordButton>
          ) : null}
          <WordButton aria-label={`Dismiss: ${notice.says}`} onClick={() => notices.dismiss(notice.id)}>
            Dismiss
          </WordButton>
        </p>
      ))}
    </div>
  );
}
