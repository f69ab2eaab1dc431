/**
 * Legendre polynomials P_n(x) and series of them; x = sin φ, so that even orders are symmetric about the equator.
 * Shape:  coefficients[n] belongs to P_n, zeros for orders that are left out.
 * Units:  −1 ≤ x ≤ 1; dimensionless.
 * Source: DLMF §14.10.3, (n+1)P_{n+1} = (2n+1)xP_n − nP_{n−1}; for the bands (2n+1)P_n = P′_{n+1} − P′_{n−1}, Arfken &
 *         Weber (2005) Mathematical Methods for Physicists 6th ed., §12.2.
 */

export function legendre(order: number, x: number): number {
  let previous = 0;
  let current = 1;
  for (let n = 0; n < order; n++) {
    const next = ((2 * n + 1) * x * current - n * previous) / (n + 1);
    previous = current;
    current = next;
  }
  return current;
}

/** Σ coefficients[n] P_n(x). */
export function legendreSeries(coefficients: readonly number[], x: number): number {
  let previous = 0;
  let current = 1;
  let sum = 0;
  for (let n = 0; n < coefficients.length; n++) {
    sum += coefficients[n]! * current;
    const next = ((2 * n + 1) * x * current - n * previous) / (n + 1);
    previous = current;
    current = next;
  }
  return sum;
}

/** Means of the series over bands between `edges` in x, (bands + 1,) → `into` (bands,): exact, so the globe's mean is coefficients[0]. */
export function legendreSeriesBandsInto(
  coefficients: readonly number[],
  edges: Float64Array,
  into: Float64Array,
): void {
  let south = seriesSouthOf(coefficients, edges[0]);
  for (let band = 0; band < into.length; band++) {
    const north = seriesSouthOf(coefficients, edges[band + 1]);
    into[band] = (north - south) / (edges[band + 1] - edges[band]);
    south = north;
  }
}

/** ∫₋₁ˣ of the series: P_n gives (P_{n+1} − P_{n−1})/(2n+1), which is 0 at both poles, and P₀ gives x + 1. */
function seriesSouthOf(coefficients: readonly number[], x: number): number {
  let previous = 1;
  let current = x;
  let sum = (coefficients[0] ?? 0) * (x + 1);
  for (let n = 1; n < coefficients.length; n++) {
    const next = ((2 * n + 1) * x * current - n * previous) / (n + 1);
    sum += (coefficients[n]! * (next - previous)) / (2 * n + 1);
    previous = current;
    current = next;
  }
  return sum;
}
