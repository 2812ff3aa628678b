/** A set of ranks to be visited in ascending order, as bits with one summary bit per word. */
export class DirtySet {
  readonly words: Int32Array;
  readonly summary: Int32Array;

  constructor(size: number) {
    this.words = new Int32Array((size >>> 5) + 1);
    this.summary = new Int32Array((this.words.length >>> 5) + 1);
  }

  add(rank: number): void {
    const word = rank >>> 5;
    this.words[word] = (this.words[word] as number) | (1 << (rank & 31));
    this.summary[word >>> 5] = (this.summary[word >>> 5] as number) | (1 << (word & 31));
  }

  /**
   * Takes out the lowest rank not below the word of `from`; -1 when there is none. A visit may add ranks above the one
   * taken, never below, so the caller passes the last rank and the search goes on from there.
   */
  takeFrom(from: number): number {
    const { words, summary } = this;
    for (let s = from >>> 10; s < summary.length; s++) {
      const marks = summary[s] as number;
      if (marks === 0) continue;
      const word = (s << 5) + 31 - Math.clz32(marks & -marks);
      const bits = words[word] as number;
      const lowest = bits & -bits;
      const left = bits ^ lowest;
      words[word] = left;
      if (left === 0) summary[s] = marks & ~(1 << (word & 31));
      return (word << 5) + 31 - Math.clz32(lowest);
    }
    return -1;
  }
}
