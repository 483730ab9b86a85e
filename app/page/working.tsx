import { useRef } from 'react';
import type { RequestCard } from '../../engine/requests/result';
import type { Answer } from '../state/answers';
import { useSession } from '../state/session';
import { useHeldFor } from './use-answer';
import { WordButton } from './word-button';
import styles from './working.module.css';

/** Work that takes longer than this is spoken of. */
const PATIENCE_MS = 350;

interface WorkingProps {
  readonly card: RequestCard;
  readonly answer: Answer | undefined;
}

/** How far long work is, and the word that stops it; or that it was stopped, and the word that goes on. */
export function Working({ card, answer }: WorkingProps) {
  const { answers } = useSession();
  const takesTime = useHeldFor(answer === undefined || answer.state === 'working', PATIENCE_MS);
  const tookTime = useRef(false);
  if (takesTime) tookTime.current = true;
  if (answer?.state === 'stopped') {
    return (
      <p className={styles.working}>
        Stopped{answer.progress ? `, ${answer.progress.says}` : ''}.
        <WordButton onClick={() => answers.start(card.key)}>Start again</WordButton>
      </p>
    );
  }
  if (answer?.state === 'defect') {
    return (
      <p className={styles.working} role="alert">
        The work ended by a defect of Spherelathe: {answer.message}
        <WordButton onClick={() => answers.start(card.key)}>Try again</WordButton>
      </p>
    );
  }
  // Quick answers are read where they stand; the end of long work is said.
  if (!takesTime) return tookTime.current ? <p className="heard" role="status">{`${card.caption}: ready`}</p> : null;
  const progress = answer?.state === 'working' ? answer.progress : null;
  return (
    <p className={styles.working}>
      <progress
        aria-label={`Progress of ${card.text}`}
        className={styles.bar}
        {...(progress && progress.of > 0 ? { value: progress.done, max: progress.of } : {})}
      />
      <span>{progress?.says ?? 'working'}</span>
      <WordButton onClick={() => answers.stop(card.key)}>Stop</WordButton>
    </p>
  );
}
