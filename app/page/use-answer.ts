import { useEffect, useState } from 'react';
import type { RequestCard, Result } from '../../engine/requests/result';
import type { Answer } from '../state/answers';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';

export interface ShownAnswer {
  readonly answer: Answer | undefined;
  /** The result to show: the answer's own, or the card's last one while a newer one is on its way. */
  readonly result: Result | null;
  readonly stale: boolean;
}

export function useAnswer(card: RequestCard): ShownAnswer {
  const { answers } = useSession();
  const answer = useSelected(answers.state, (state) => state.byKey.get(card.key));
  const last = useSelected(answers.state, (state) => state.lastOf.get(card.id));
  const { outline } = useSession();
  const broken = useSelected(outline.state, (state) => {
    const sound = state.sound.get(card.id);
    return sound !== undefined && sound !== card;
  });
  if (answer?.state === 'done') {
    // A request broken off in the middle of a word fails; what it said before says more.
    if (answer.result.kind === 'failure' && broken && last && last.kind !== 'failure') {
      return { answer, result: last, stale: true };
    }
    return { answer, result: answer.result, stale: false };
  }
  return { answer, result: last ?? null, stale: last !== undefined };
}

/** True once the condition has held for a while, so that quick work does not flicker. */
export function useHeldFor(condition: boolean, milliseconds: number): boolean {
  const [held, setHeld] = useState(false);
  useEffect(() => {
    if (!condition) {
      setHeld(false);
      return;
    }
    const timer = setTimeout(() => setHeld(true), milliseconds);
    return () => clearTimeout(timer);
  }, [condition, milliseconds]);
  return condition && held;
}
