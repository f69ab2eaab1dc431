/**
 * Daily-mean insolation averaged over bands of latitude, in closed form: with x = sin φ, c = cos δ, s = sin δ and
 * R = √(c² − x²), the light that falls south of x is
 *
 *     ∫₋₁ˣ f dx = (1/2π) [π/2 + asin(x/c) + xR − s(1−x²)h₀],   tan h₀ = −R/(xs),
 *
 * where R = 0 and asin(x/c) = ±π/2 beyond the polar circles, with h₀ = π in polar day and 0 in polar night. A band's mean is
 * the difference between its edges, so that the sum over the globe is ¼ to rounding however few the bands, and a band that
 * the night edge crosses gets just the light of its lit part.
 * Shape:  edges = x of the bands' edges, increasing, one more than bands; `into` (bands,); allocates nothing. Kernels: they
 *         check nothing.
 * Units:  sin δ within ±1 → share of the instellation at the present distance (slope: per rad of δ).
 * Error:  2e-16 over the width of a band in x.
 * Source: own derivation: differentiate, and the terms other than f cancel. In R the integral is stationary, so rounding in
 *         R (half of the digits, near the polar circle) does not show.
 */

export function bandMeanFactorInto(edges: Float64Array, sinDeclination: number, into: Float64Array): void {
  const cosDeclination = Math.sqrt((1 - sinDeclination) * (1 + sinDeclination));
  let south = lightSouthOf(edges[0], sinDeclination, cosDeclination);
  for (let band = 0; band < into.length; band++) {
    const north = lightSouthOf(edges[band + 1], sinDeclination, cosDeclination);
    into[band] = Math.max(0, north - south) / (edges[band + 1] - edges[band]); // rounding alone could fall below 0
    south = north;
  }
}

/** ∂/∂δ of the band means, per rad; times `declinationRate` per rad of λ. Continuous, by x = ±c too, in bands that a pole does not end. */
export function bandMeanFactorSlopeInto(edges: Float64Array, sinDeclination: number, into: Float64Array): void {
  const cosDeclination = Math.sqrt((1 - sinDeclination) * (1 + sinDeclination));
  let south = slopeSouthOf(edges[0], sinDeclination, cosDeclination);
  for (let band = 0; band < into.length; band++) {
    const north = slopeSouthOf(edges[band + 1], sinDeclination, cosDeclination);
    into[band] = (north - south) / (edges[band + 1] - edges[band]);
    south = north;
  }
}

/** ∫₋₁ˣ f dx: from 0 at the south pole to ½ at the north pole. */
export function lightSouthOf(x: number, sinDeclination: number, cosDeclination: number): number {
  const area = sinDeclination * (1 - x) * (1 + x);
  if (x >= cosDeclination) return 0.5 - Math.max(0, area) / 2;
  if (x <= -cosDeclination) return Math.max(0, -area) / 2;
  const root = Math.sqrt((cosDeclination - x) * (cosDeclination + x));
  const hourAngle = Math.atan2(root, -x * sinDeclination);
  return 0.25 + (Math.atan2(x, root) + x * root - area * hourAngle) / (2 * Math.PI);
}

/** Its derivative in δ: −(1/2π) [xs √(1 − x²/c²) + c(1−x²)h₀]. */
function slopeSouthOf(x: number, sinDeclination: number, cosDeclination: number): number {
  const area = cosDeclination * (1 - x) * (1 + x);
  if (x >= cosDeclination) return sinDeclination > 0 ? -area / 2 : 0;
  if (x <= -cosDeclination) return sinDeclination < 0 ? -area / 2 : 0;
  const root = Math.sqrt((cosDeclination - x) * (cosDeclination + x));
  const lever = x * sinDeclination;
  return -((lever * root) / cosDeclination + area * Math.atan2(root, -lever)) / (2 * Math.PI);
}
