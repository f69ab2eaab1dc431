/**
 * Daily-mean insolation averaged over bands of latitude, in closed form: with x = sin φ, c = cos δ, s = sin δ and
 * R = √(c² − x²), the light that falls south of x is
 *
 *     ∫₋₁ˣ f dx = (1/2π) [π/2 + asin(x/c) + xR − s(1−x²)h₀],   tan h₀ = −R/(xs),
 *
 * where R = 0 and asin(x/c) = ±π/2 beyond the polar circles, with h₀ = π in polar day and 0 in polar night. A band's mean is
 * the difference between its edges, so that the sum over the globe is ¼ to rounding however few the bands, and a band that
 * the night edge crosses gets just the light of its lit part.
 * Bands lie symmetrically about the equator: the hour angle at −x is π − h₀, so that each pair of edges needs the arcs of one.
 * Shape:  edges = x of the bands' edges, increasing, edges[n − i] = −edges[i], one more than bands; `into` and `slope` (bands,),
 *         `slope` null where it is not wanted. Kernels: they check nothing.
 * Units:  sin δ within ±1 → share of the instellation at the present distance; slope ∂/∂δ, per rad: times `declinationRate` per
 *         rad of λ. It is continuous, by x = ±c too, in bands that a pole does not end.
 * Error:  2e-16 over the width of a band in x.
 * Source: own derivation: differentiate, and the terms other than f cancel. In R the integral is stationary, so rounding in
 *         R (half of the digits, near the polar circle) does not show.
 */

export function bandMeanFactorInto(
  edges: Float64Array,
  sinDeclination: number,
  into: Float64Array,
  slope: Float64Array | null = null,
): void {
  const cosDeclination = Math.sqrt((1 - sinDeclination) * (1 + sinDeclination));
  const last = into.length - 1;
  const pair: EdgePair = { south: 0, north: 0, southSlope: 0, northSlope: 0 };
  edgePairInto(edges[0], sinDeclination, cosDeclination, slope !== null, pair);
  for (let band = 0; 2 * band <= last; band++) {
    const { south, north, southSlope, northSlope } = pair;
    const width = edges[band + 1] - edges[band];
    const isMiddle = 2 * band === last; // the equator runs through it: from one edge of the pair to the other
    if (!isMiddle) edgePairInto(edges[band + 1], sinDeclination, cosDeclination, slope !== null, pair);
    into[last - band] = Math.max(0, north - (isMiddle ? south : pair.north)) / width;
    into[band] = isMiddle ? into[band] : Math.max(0, pair.south - south) / width;
    if (slope === null) continue;
    slope[last - band] = (northSlope - (isMiddle ? southSlope : pair.northSlope)) / width;
    slope[band] = isMiddle ? slope[band] : (pair.southSlope - southSlope) / width;
  }
}

/** The light south of −|x| and of |x|, and ∂/∂δ of both: −(1/2π) [xs √(1 − x²/c²) + c(1−x²)h₀]. */
interface EdgePair {
  south: number;
  north: number;
  southSlope: number;
  northSlope: number;
}

/** x ≤ 0. */
function edgePairInto(x: number, sine: number, cosine: number, withSlope: boolean, pair: EdgePair): void {
  const square = (1 - x) * (1 + x);
  const area = sine * square;
  if (-x >= cosine) {
    pair.south = Math.max(0, -area) / 2;
    pair.north = 0.5 - Math.max(0, area) / 2;
    pair.southSlope = sine < 0 ? (-cosine * square) / 2 : 0;
    pair.northSlope = sine > 0 ? (-cosine * square) / 2 : 0;
    return;
  }
  const root = Math.sqrt((cosine - x) * (cosine + x));
  const lever = x * sine;
  const hourAngle = Math.atan2(root, -lever);
  const rest = Math.PI - hourAngle;
  const odd = Math.atan2(x, root) + x * root;
  pair.south = 0.25 + (odd - area * hourAngle) / (2 * Math.PI);
  pair.north = 0.25 - (odd + area * rest) / (2 * Math.PI);
  if (!withSlope) return;
  const along = (lever * root) / cosine;
  pair.southSlope = -(along + cosine * square * hourAngle) / (2 * Math.PI);
  pair.northSlope = (along - cosine * square * rest) / (2 * Math.PI);
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
