import { useEffect, useRef } from 'react';
import type { ParameterCard } from '../../engine/requests/result';
import { Tex } from '../page/tex';
import { cardNow } from '../state/outline';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import styles from './slider.module.css';
import { sliderStep, sliderText } from './slider-step';

/** The card says `r = 1/3`; a slider is labelled by what stands before the sign. */
function symbolLatex({ latex }: ParameterCard): string {
  return latex.split('=')[0] ?? latex;
}

/**
 * A parameter's slider. While it moves, only what is drawn from the parameter follows; when it is let go, the number
 * in the text is replaced, one step of undo.
 */
export function Slider({ card }: { readonly card: ParameterCard }) {
  const { text, outline, live } = useSession();
  const moved = useSelected(live.state, (values) => values[card.name]?.value);
  const field = useRef<HTMLInputElement>(null);
  const { range } = card;

  const commit = useRef<() => void>(() => undefined);
  useEffect(() => {
    commit.current = () => {
      const value = live.state.get()[card.name]?.value;
      if (value === undefined || !range) return;
      const insert = sliderText(value, range);
      const now = outline.state.get();
      const place = cardNow(now, card)?.valueSpan;
      const changes = place && insert !== card.valueText ? [{ ...place, insert }] : [];
      if (changes.length > 0 && text.editSince(now.revision, changes)) {
        live.release(card.name, text.state.get().revision);
      } else live.cancel(card.name);
    };
  }, [card, range, text, outline, live]);

  // React's change is the browser's input; the browser's change, once a slider is let go, has no name in React.
  useEffect(() => {
    const input = field.current;
    const settle = () => commit.current();
    input?.addEventListener('change', settle);
    return () => input?.removeEventListener('change', settle);
  }, []);

  if (!range || card.value === null) return null;
  const shown = moved === undefined ? card.valueText : sliderText(moved, range);
  return (
    <div className={styles.slider}>
      <span aria-hidden="true">
        <Tex tex={symbolLatex(card)} />
      </span>
      <input
        ref={field}
        type="range"
        aria-label={card.name}
        aria-valuetext={shown}
        data-parameter={card.name}
        min={range.from}
        max={range.to}
        step={sliderStep(range)}
        value={moved ?? card.value}
        onChange={(event) => live.move(card.name, event.target.valueAsNumber)}
      />
      <span className={styles.value}>{shown}</span>
    </div>
  );
}
