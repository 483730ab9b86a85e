/**
 * A growing list of distinct label rows with constant-time look-up: open addressing over one flat array, so that
 * the recursion of character.ts allocates nothing per weight.
 */
export class LabelIndex {
  readonly rank: number;
  rows: Int32Array;
  count = 0;
  private slots: Int32Array;
  /** 32 minus the binary logarithm of the number of slots. */
  private shift = 26;

  constructor(rank: number) {
    this.rank = rank;
    this.rows = new Int32Array(16 * rank);
    this.slots = new Int32Array(64).fill(-1);
  }

  /** Position of the row equal to labels, or -1. */
  find(labels: Int16Array | Int32Array): number {
    return this.slots[this.slotOf(labels, 0)] as number;
  }

  /** Position of the row equal to labels; appends it when absent. */
  add(labels: Int16Array | Int32Array): number {
    const slot = this.slotOf(labels, 0);
    const known = this.slots[slot] as number;
    if (known >= 0) return known;
    const rank = this.rank;
    if ((this.count + 1) * rank > this.rows.length) {
      const grown = new Int32Array(2 * this.rows.length);
      grown.set(this.rows);
      this.rows = grown;
    }
    for (let i = 0; i < rank; i++) this.rows[this.count * rank + i] = labels[i] as number;
    this.slots[slot] = this.count;
    this.count++;
    // At most a quarter full: probes stay short, and absent rows (most look-ups of the recursion) are seen at once.
    if (4 * this.count > this.slots.length) this.rehash();
    return this.count - 1;
  }

  private slotOf(labels: Int16Array | Int32Array, offset: number): number {
    const { rank, rows, slots } = this;
    const mask = slots.length - 1;
    let hash = 0;
    for (let i = 0; i < rank; i++) hash = Math.imul(hash, 31) + (labels[offset + i] as number);
    // The high bits of the product with 2^32 over the golden ratio are well spread.
    let slot = Math.imul(hash, 0x9e3779b1) >>> this.shift;
    for (;;) {
      const candidate = slots[slot] as number;
      if (candidate < 0) return slot;
      let i = 0;
      const start = candidate * rank;
      while (i < rank && rows[start + i] === labels[offset + i]) i++;
      if (i === rank) return slot;
      slot = (slot + 1) & mask;
    }
  }

  private rehash(): void {
    this.slots = new Int32Array(4 * this.slots.length).fill(-1);
    this.shift -= 2;
    for (let row = 0; row < this.count; row++) this.slots[this.slotOf(this.rows, row * this.rank)] = row;
  }
}
