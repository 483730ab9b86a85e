/** A place as people count: line and column from 1, columns in UTF-16 code units, a tab as one. */
export interface Place {
  readonly line: number;
  readonly column: number;
}

/** Answers line and column of an offset; lines end at LF, CR or CR LF. One pass over the text, then log time. */
export class LineIndex {
  readonly #starts: readonly number[];
  readonly #length: number;

  constructor(text: string) {
    const starts = [0];
    for (let at = 0; at < text.length; at++) {
      const code = text.charCodeAt(at);
      if (code === 0x0a || (code === 0x0d && text.charCodeAt(at + 1) !== 0x0a)) starts.push(at + 1);
    }
    this.#starts = starts;
    this.#length = text.length;
  }

  get lineCount(): number {
    return this.#starts.length;
  }

  /** Offsets outside the text count as its nearer end. */
  place(offset: number): Place {
    const at = Math.min(Math.max(offset, 0), this.#length);
    let low = 0;
    let high = this.#starts.length - 1;
    while (low < high) {
      const middle = (low + high + 1) >> 1;
      if ((this.#starts[middle] ?? 0) <= at) low = middle;
      else high = middle - 1;
    }
    return { line: low + 1, column: at - (this.#starts[low] ?? 0) + 1 };
  }
}
