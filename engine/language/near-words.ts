/**
 * Whether one edit leads from one word to the other: a letter inserted, left out, replaced, or two neighbours swapped.
 * Equal words are no edit apart.
 */
export function oneEditApart(a: string, b: string): boolean {
  if (a === b || Math.abs(a.length - b.length) > 1) return false;
  let start = 0;
  while (start < a.length && a[start] === b[start]) start++;
  let endA = a.length;
  let endB = b.length;
  while (endA > start && endB > start && a[endA - 1] === b[endB - 1]) {
    endA--;
    endB--;
  }
  const restA = a.slice(start, endA);
  const restB = b.slice(start, endB);
  if (restA.length <= 1 && restB.length <= 1) return true;
  return restA.length === 2 && restB.length === 2 && restA[0] === restB[1] && restA[1] === restB[0];
}

/** The first of the words that is one edit away, case apart; null where none is. */
export function nearest(word: string, words: readonly string[]): string | null {
  const small = word.toLowerCase();
  return (
    words.find((candidate) => {
      const other = candidate.toLowerCase();
      return word !== candidate && (small === other || oneEditApart(small, other));
    }) ?? null
  );
}
