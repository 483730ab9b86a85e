import { type RefObject, useLayoutEffect } from 'react';

/** A sign of multiplication may push the last piece of its line to the next, which then wants one too. */
const PASSES = 3;

/** Marks the pieces that begin a line, so that a broken product is printed with a sign of multiplication there. */
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
    };
    const observer = new ResizeObserver(mark);
    observer.observe(element);
    mark();
    return () => observer.disconnect();
  }, [line, pieces]);
}
