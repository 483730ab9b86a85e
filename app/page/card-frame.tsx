import type { MouseEvent, ReactNode } from 'react';
import type { Card } from '../../engine/requests/result';
import { cardNow } from '../state/outline';
import { useSession } from '../state/session';
import { useSelected } from '../state/store';
import styles from './card-frame.module.css';
import { Problems } from './problems';

interface CardFrameProps {
  readonly card: Card;
  /** What the card is called when it is read aloud. */
  readonly label: string;
  /** Name first, then where; absent for prose, which captions itself. */
  readonly caption?: ReactNode;
  /** What can be taken out of the card. */
  readonly tools?: ReactNode;
  readonly children: ReactNode;
}

const interactive = 'a, button, input, select, textarea, summary, label, [role="slider"], [data-own-pointer]';

/** One piece of the page. A click on it puts the cursor where its text is; the bar at its left says it is there. */
export function CardFrame({ card, label, caption, tools, children }: CardFrameProps) {
  const { text, outline, cardAtCursor } = useSession();
  const current = useSelected(cardAtCursor, (id) => id === card.id);

  function follow(event: MouseEvent): void {
    if (event.target instanceof Element && event.target.closest(interactive)) return;
    if (getSelection()?.isCollapsed === false) return;
    const now = outline.state.get();
    text.goTo(now.revision, (cardNow(now, card) ?? card).span.from, false);
  }

  return (
    // biome-ignore lint/a11y/useKeyWithClickEvents: for the keyboard the caption's name is a button that does the same
    <article
      className={styles.card}
      aria-label={label}
      aria-current={current ? 'location' : undefined}
      data-card={card.id}
      data-kind={card.kind}
      onClick={follow}
    >
      {caption || tools ? (
        <header className={styles.head}>
          <div className={styles.caption}>{caption}</div>
          {tools ? <div className={styles.tools}>{tools}</div> : null}
        </header>
      ) : null}
      {children}
      <Problems card={card} />
    </article>
  );
}

/** The card's name; leads the cursor to its text. */
export function CardName({ card, children }: { readonly card: Card; readonly children: ReactNode }) {
  const { text, outline, settings } = useSession();
  return (
    <button
      type="button"
      className={styles.name}
      title="Go to its text"
      onClick={() => {
        settings.change({ pane: 'text' });
        const now = outline.state.get();
        text.goTo(now.revision, (cardNow(now, card) ?? card).span.from, true);
      }}
    >
      {children}
    </button>
  );
}
