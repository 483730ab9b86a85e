import { type FocusEvent, type KeyboardEvent, useLayoutEffect, useRef, useState } from 'react';
import { Tex } from '../page/tex';
import { WordButton } from '../page/word-button';
import styles from './cell.module.css';

interface CellProps {
  /** Row and column, for those who hear the table. */
  readonly label: string;
  readonly text: string;
  readonly latex: string | null;
  /** Called with what was typed, blanks removed; not when it is as before. */
  readonly onChange: (text: string) => void;
  /** Opens the representation chooser; absent where the cell holds none. */
  readonly onChoose?: (() => void) | undefined;
}

/** A cell as printed; Enter or a click makes it a field, Enter keeps what was typed, Escape does not. */
export function Cell({ label, text, latex, onChange, onChoose }: CellProps) {
  const [draft, setDraft] = useState<string | null>(null);
  const shown = useRef<HTMLButtonElement>(null);
  const returnFocus = useRef(false);
  const editing = draft !== null;

  useLayoutEffect(() => {
    if (editing || !returnFocus.current) return;
    returnFocus.current = false;
    shown.current?.focus();
  }, [editing]);

  function finish(keep: boolean, focus: boolean): void {
    const typed = draft?.replace(/\s+/g, '') ?? '';
    returnFocus.current = focus;
    setDraft(null);
    if (keep && typed !== '' && typed !== text) onChange(typed);
  }

  function onKeyDown(event: KeyboardEvent): void {
    if (event.key !== 'Enter' && event.key !== 'Escape') return;
    event.preventDefault();
    event.stopPropagation();
    finish(event.key === 'Enter', true);
  }

  if (draft === null) {
    return (
      <button
        ref={shown}
        type="button"
        className={styles.shown}
        data-unread={latex === null || undefined}
        data-cell=""
        aria-label={`${label}: ${text}. Edit`}
        onClick={() => setDraft(text)}
      >
        {latex === null ? text : <Tex tex={latex} />}
      </button>
    );
  }

  const leave = (event: FocusEvent<HTMLFieldSetElement>) => {
    if (!event.currentTarget.contains(event.relatedTarget)) finish(true, false);
  };
  return (
    <fieldset className={styles.editing} onBlur={leave}>
      <input
        className={styles.field}
        aria-label={label}
        size={Math.max(5, draft.length + 1)}
        value={draft}
        spellCheck={false}
        autoComplete="off"
        // biome-ignore lint/a11y/noAutofocus: the field takes the place of the button that was just pressed
        autoFocus
        onFocus={(event) => event.target.select()}
        onChange={(event) => setDraft(event.target.value)}
        onKeyDown={onKeyDown}
      />
      {onChoose ? (
        <WordButton
          className={styles.choose}
          onKeyDown={(event) => event.key === 'Escape' && finish(false, true)}
          onClick={() => {
            finish(false, true);
            onChoose();
          }}
        >
          choose…
        </WordButton>
      ) : null}
    </fieldset>
  );
}
