import type { Card, Problem } from '../../engine/requests/result';
import { cardNow, errorsIn } from '../state/outline';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import styles from './problems.module.css';
import { Says } from './tex';

const words = { error: 'Error', warning: 'Warning', hint: 'Hint' } as const;

export function ProblemLine({ problem }: { readonly problem: Problem }) {
  const { text, outline, settings } = useSession();
  return (
    <li className={styles.problem} data-severity={problem.severity}>
      <button
        type="button"
        className={styles.place}
        onClick={() => {
          settings.change({ pane: 'text' });
          text.goTo(outline.state.get().revision, problem.span.from, true);
        }}
      >
        {words[problem.severity]}, line {problem.line}
      </button>{' '}
      <Says text={problem.message} />
    </li>
  );
}

/** What is wrong in a card's text, in words; each place is a step away. */
export function Problems({ card }: { readonly card: Card }) {
  const { outline } = useSession();
  const problems = useSelected(outline.state, (state) => state.outline?.problems);
  const here = cardNow(outline.state.get(), card);
  const own = problems && here ? errorsIn(here, problems) : [];
  if (own.length === 0) return null;
  return (
    <ul className={styles.list}>
      {own.map((problem) => (
        <ProblemLine key={`${problem.span.from} ${problem.message}`} problem={problem} />
      ))}
    </ul>
  );
}
