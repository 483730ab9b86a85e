export interface SentencePart {
  readonly kind: 'text' | 'formula' | 'word';
  readonly part: string;
  /** Offset in the sentence. */
  readonly place: number;
}

/** A sentence of the engine taken apart: `$...$` is LaTeX, backticks hold what is typed in a notebook. */
export function sentenceParts(sentence: string): readonly SentencePart[] {
  const parts: SentencePart[] = [];
  let at = 0;
  for (const found of sentence.matchAll(/\$([^$]+)\$|`([^`]+)`/g)) {
    if (found.index > at) parts.push({ kind: 'text', part: sentence.slice(at, found.index), place: at });
    const [whole, formula, word] = found;
    parts.push({
      kind: formula === undefined ? 'word' : 'formula',
      part: formula ?? word ?? '',
      place: found.index,
    });
    at = found.index + whole.length;
  }
  if (at < sentence.length) parts.push({ kind: 'text', part: sentence.slice(at), place: at });
  return parts;
}
