export interface Placed<T> {
  readonly item: T;
  readonly x: number;
  readonly y: number;
}

/**
 * Spreads marks that share an x so that none overlap: each stays at its x and takes the free place nearest the middle.
 * `x` and `gap` (the least distance between centres) in the same unit; y is 0 in the middle, negative above.
 */
export function beeswarm<T>(items: readonly T[], x: (item: T) => number, gap: number): readonly Placed<T>[] {
  const placed: Placed<T>[] = [];
  const ordered = [...items].sort((a, b) => x(a) - x(b));
  for (const item of ordered) {
    const at = x(item);
    const near = placed.filter((other) => at - other.x < gap);
    // The places just touching each neighbour, and the middle; the nearest free one to the middle wins.
    const candidates = [0];
    for (const other of near) {
      const reach = Math.sqrt(Math.max(0, gap * gap - (at - other.x) ** 2));
      candidates.push(other.y - reach, other.y + reach);
    }
    candidates.sort((a, b) => Math.abs(a) - Math.abs(b) || a - b);
    const y = candidates.find((candidate) =>
      near.every((other) => (at - other.x) ** 2 + (candidate - other.y) ** 2 >= gap * gap - 1e-6),
    );
    placed.push({ item, x: at, y: y ?? 0 });
  }
  return placed;
}
