/** Offset of the top of the parabola through (−left, before), (0, 0), (right, after), held between them. */
export function topOfParabola(left: number, right: number, before: number, after: number): number {
  const fall = right * before + left * after;
  if (fall === 0) return 0;
  return Math.min(right, Math.max(-left, (right * right * before - left * left * after) / (2 * fall)));
}
