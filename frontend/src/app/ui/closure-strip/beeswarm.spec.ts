import { beeswarm } from './beeswarm';

describe('beeswarm', () => {
  const closest = (points: readonly { x: number; y: number }[]): number => {
    let least = Number.POSITIVE_INFINITY;
    points.forEach((a, i) =>
      points.slice(i + 1).forEach((b) => (least = Math.min(least, Math.hypot(a.x - b.x, a.y - b.y)))),
    );
    return least;
  };

  it('never lets two marks overlap, even forty at one place', () => {
    const points = beeswarm(
      Array.from({ length: 40 }, (_, i) => (i < 30 ? 100 : 100 + i * 0.7)),
      (x) => x,
      12,
    );
    expect(points).toHaveLength(40);
    expect(closest(points)).toBeGreaterThanOrEqual(12 - 1e-3);
  });

  it('keeps every mark at its own x and lone marks in the middle', () => {
    const points = beeswarm([10, 300, 50], (x) => x, 12);
    expect(points.map((point) => [point.item, point.x, point.y])).toEqual([
      [10, 10, 0],
      [50, 50, 0],
      [300, 300, 0],
    ]);
  });
});
