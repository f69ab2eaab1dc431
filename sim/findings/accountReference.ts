/**
 * What an energy account is measured against: the largest of its fluxes. Absorbed starlight alone would fail an exact run of a
 * world that glows from within, or cools from a hot start far from its star.
 */
export function accountReference(absorbed: number, emitted: number, stored: number): number {
  return Math.max(absorbed, emitted, Math.abs(stored));
}
