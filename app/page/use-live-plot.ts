import { useEffect, useRef, useState } from 'react';
import type { PlotResult, RequestCard } from '../../engine/requests/result';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';

interface LivePlot {
  readonly shown: PlotResult;
  /** A slider is being held. */
  readonly held: boolean;
}

/**
 * The plot to show: the answer, or, while a slider moves, the quick answer for its present value. One quick question
 * is out at a time, and the next one asks for the newest value.
 */
export function useLivePlot(card: RequestCard, result: PlotResult): LivePlot {
  const { client, outline, live } = useSession();
  const moved = useSelected(live.state, (values) =>
    card.parameters.map((name) => `${name}=${values[name]?.value ?? ''}`).join(';'),
  );
  const held = useSelected(live.state, (values) => card.parameters.some((name) => values[name]?.until === null));
  const isMoved = useSelected(live.state, (values) => card.parameters.some((name) => values[name] !== undefined));
  const [quick, setQuick] = useState<PlotResult | null>(null);
  const asking = useRef(false);
  const askAgain = useRef(false);

  useEffect(() => {
    if (moved.replace(/[^=]*=;?/g, '') === '' && !isMoved) return;
    async function ask(): Promise<void> {
      if (asking.current) {
        askAgain.current = true;
        return;
      }
      asking.current = true;
      do {
        askAgain.current = false;
        const { text, revision } = outline.state.get();
        const values = live.state.get();
        const overrides: Record<string, number> = {};
        for (const name of card.parameters) {
          const value = values[name]?.value;
          if (value !== undefined) overrides[name] = value;
        }
        if (Object.keys(overrides).length === 0) break;
        const found = await client.plotFast(text, card.key, overrides, revision).catch(() => null);
        if (found?.kind === 'plot') setQuick(found);
      } while (askAgain.current);
      asking.current = false;
    }
    void ask();
  }, [moved, isMoved, card, client, outline, live]);

  // The answer to the new text has arrived: it takes the place of the last quick one.
  // biome-ignore lint/correctness/useExhaustiveDependencies: it is the arrival of a result that matters
  useEffect(() => {
    if (!isMoved) setQuick(null);
  }, [result, isMoved]);

  return { shown: quick ?? result, held };
}
