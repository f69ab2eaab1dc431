/**
 * Daily-mean insolation by latitude, as a share of the instellation at the planet's present distance:
 *
 *     f(φ, δ) = (1/π) [h₀ sin φ sin δ + cos φ cos δ sin h₀],   cos h₀ = −tan φ tan δ,
 *
 * h₀ half the length of the day. Polar day (f = sin φ sin δ) and polar night (f = 0) are exact, at the poles and at
 * δ = ±90° too. Area mean ¼ at any δ; multiply by L/(4πr²) for W m⁻².
 * Holds when many days pass in a season: distance and δ stand still within a day.
 * Shape:  sineLatitude, cosineLatitude and `into` have one length; allocates nothing. Kernels: they check nothing.
 * Units:  sin φ and sin δ within ±1, cos φ ≥ 0 → 1.
 * Error:  f to about 2e-16, and less towards the night edge, where f falls as h₀³ and its error as h₀. cos δ is taken from
 *         sin δ and has an error of 1e-16/cos δ: it counts only within seconds of arc of δ = ±90°.
 * Source: Berger (1978) J. Atmos. Sci. 35, 2362, from Milankovitch.
 */

export function dailyMeanFactorInto(
  sineLatitude: Float64Array,
  cosineLatitude: Float64Array,
  sinDeclination: number,
  into: Float64Array,
): void {
  const cosDeclination = Math.sqrt((1 - sinDeclination) * (1 + sinDeclination));
  for (let i = 0; i < into.length; i++) {
    into[i] = dailyMeanFactor(sineLatitude[i] * sinDeclination, cosineLatitude[i] * cosDeclination);
  }
}

/**
 * ∂f/∂δ = (1/π) [h₀ sin φ cos δ − cos φ sin δ sin h₀], per rad; times `declinationRate` it is ∂f/∂λ.
 * Continuous between the poles, but with a vertical tangent on the polar circles: it leaves its night value 0 and its day
 * value sin φ cos δ as the square root of the way from there. At a pole it jumps between the two at the equinox: there the
 * middle is given. Error 2e-16, and 1e-16/h₀ (or over π − h₀) by the polar circles.
 */
export function dailyMeanFactorSlopeInto(
  sineLatitude: Float64Array,
  cosineLatitude: Float64Array,
  sinDeclination: number,
  into: Float64Array,
): void {
  const cosDeclination = Math.sqrt((1 - sinDeclination) * (1 + sinDeclination));
  for (let i = 0; i < into.length; i++) {
    const sine = sineLatitude[i];
    const cosine = cosineLatitude[i];
    const ratio = hourAngleRatio(sine * sinDeclination, cosine * cosDeclination);
    const sinHourAngle = Math.sqrt((1 - ratio) * (1 + ratio));
    into[i] = (Math.acos(-ratio) * sine * cosDeclination - sinHourAngle * cosine * sinDeclination) / Math.PI;
  }
}

/** f from the star's height halfway between midnight and noon, sin φ sin δ, and its swing about that, cos φ cos δ. */
export function dailyMeanFactor(middle: number, swing: number): number {
  if (middle >= swing) return Math.max(0, middle);
  if (middle <= -swing) return 0;
  // h₀ and sin h₀ from one rounded ratio, or their difference would not cancel at the night edge
  const ratio = middle / swing;
  const sum = ratio * Math.acos(-ratio) + Math.sqrt((1 - ratio) * (1 + ratio));
  return (swing * Math.max(0, sum)) / Math.PI; // rounding alone could fall below 0
}

/** −cos h₀, held at ±1 in polar day and night. */
function hourAngleRatio(middle: number, swing: number): number {
  if (middle < swing && middle > -swing) return middle / swing;
  return Math.sign(middle);
}
