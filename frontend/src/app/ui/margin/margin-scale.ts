/** Margin in per cent at which a gauge or strip ends; beyond it marks stand at the end. */
export const FULL_SCALE = 35;

/**
 * Place of a margin on a scale from −1 to 1, limit at 0: the signed square root of its share of the full scale, so that
 * margins of a few per cent stay readable beside large ones. Both in per cent of the limit.
 */
export function marginPlace(percent: number, full: number = FULL_SCALE): number {
  if (Number.isNaN(percent)) return 0;
  const place = Math.sign(percent) * Math.sqrt(Math.abs(percent) / full);
  return Math.max(-1, Math.min(1, place));
}

/** True when a margin lies beyond the end of the scale and is drawn at its end. */
export function isBeyondScale(percent: number, full: number = FULL_SCALE): boolean {
  return Math.abs(percent) > full;
}
