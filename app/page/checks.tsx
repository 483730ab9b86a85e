import type { Check, Verdict } from '../../engine/requests/result';
import styles from './checks.module.css';
import { ScrollBox } from './scroll-box';
import { Says, Tex } from './tex';

const marks: Record<Verdict, { readonly mark: string; readonly word: string }> = {
  holds: { mark: '✓', word: 'holds' },
  fails: { mark: '!', word: 'fails' },
  unknown: { mark: '?', word: 'unknown' },
};

/** What holds and what does not, in words; the formula and where it is from one step away. */
export function Checks({ checks }: { readonly checks: readonly Check[] }) {
  if (checks.length === 0) return null;
  return (
    <ul className={styles.checks} aria-label="Checks">
      {checks.map((check) => (
        <li key={check.id} data-verdict={check.verdict}>
          <details className={styles.check}>
            <summary className={styles.summary}>
              <span className={styles.mark} aria-hidden="true">
                {marks[check.verdict].mark}
              </span>
              <span className={styles.word}>{marks[check.verdict].word}</span>
              <span>
                <Says text={check.says} />
              </span>
            </summary>
            <div className={styles.grounds}>
              <ScrollBox label="Formula of the check">
                <Tex tex={`\\displaystyle ${check.formula}`} />
              </ScrollBox>
              <p>{check.source}</p>
            </div>
          </details>
        </li>
      ))}
    </ul>
  );
}
