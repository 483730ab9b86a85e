import { type RefObject, useLayoutEffect } from 'react';

/** A sign of multiplication may push the last piece of its line to the next, which then wants one too. */
const PASSES = 3;

/**
 * Marks the pieces that begin a line, so that a broken product is printed with a sign of multiplication there, and lets
 * the keyboard reach those that have to be scrolled.
 */
export function useWrapMarks(line: RefObject<HTMLElement | null>, pieces: readonly unknown[]): void {
  // biome-ignore lint/correctness/useExhaustiveDependencies: other pieces break at other places
  useLayoutEffect(() => {
    const element = line.current;
    if (!element) return;
    const mark = () => {
      const found = [...element.querySelectorAll<HTMLElement>(':scope > [data-piece]')];
      for (const piece of found) delete piece.dataset.begins;
      for (let pass = 0; pass < PASSES; pass += 1) {
        // Pieces of one line overlap in height, however the line is centred. After the equals sign none is wanted.
        const begin = found.slice(1).filter((piece) => {
          const before = piece.previousElementSibling;
          return before instanceof HTMLElement && piece.offsetTop >= before.offsetTop + before.offsetHeight;
        });
        const fresh = begin.filter((piece) => piece.dataset.begins === undefined);
        for (const piece of fresh) piece.dataset.begins = '';
        if (fresh.length === 0) break;
      }
      for (const piece of found) {
        const reached = piece.scrollWidth > piece.clientWidth && piece.querySelector('button') === null;
        if (reached) piece.tabIndex = 0;
        else piece.removeAttribute('tabindex');
      }
    };
    const observer = new ResizeObserver(mark);
    observer.observe(element);
    mark();
    return () => observer.disconnect();
  }, [line, pieces]);
}
