/**
 * A set of ranks to be visited in ascending order, as bits in words with one summary bit for each word that has any. A
 * word's summary bit may outlast its bits until a visit clears it.
 */
export class DirtySet {
  readonly words: Int32Array;
  readonly summary: Int32Array;

  constructor(size: number) {
    this.words = new Int32Array((size >>> 5) + 1);
    this.summary = new Int32Array((this.words.length >>> 5) + 1);
  }

  add(rank: number): void {
    const { words, summary } = this;
    const word = rank >>> 5;
    const bits = words[word] as number;
    words[word] = bits | (1 << (rank & 31));
    if (bits === 0) summary[word >>> 5] = (summary[word >>> 5] as number) | (1 << (word & 31));
  }

  clear(): void {
    this.words.fill(0);
    this.summary.fill(0);
  }
}
