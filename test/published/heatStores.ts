/** Heat stores and their linear response. */

/** Sea water 1025 kg m⁻³ × 3990 J kg⁻¹ K⁻¹: calculated; 4.6 yr for 75 m and B = 2.09 W m⁻² K⁻¹ printed by North & Coakley (1979) J. Atmos. Sci. 36, 1189 (from memory). */
// biome-ignore format: a table
export const mixedLayers = [
  { depth: 1, heatCapacity: 4_089_750, yearsAtB209: 0.0620078 },
  { depth: 50, heatCapacity: 204_487_500, yearsAtB209: 3.1003913 },
  { depth: 75, heatCapacity: 306_731_250, yearsAtB209: 4.650587 },
  { depth: 100, heatCapacity: 408_975_000, yearsAtB209: 6.2007826 },
] as const;

/**
 * Radiative time constant of an atmosphere, p c_p/(4 g σ T³): textbook form (Goody & Walker 1972, Atmospheres; from memory),
 * values calculated. Definitions differ by a factor of 4 in print, and for Venus the choice of T by a factor of 30.
 */
// biome-ignore format: a table
export const radiativeTimes = [
  { body: 'Earth', surfacePressure: 101_325, specificHeat: 1004, gravity: 9.81, temperature: 255, days: 31.913564 },
  { body: 'Mars', surfacePressure: 610, specificHeat: 735, gravity: 3.71, temperature: 210, days: 0.665886 },
  { body: 'Venus', surfacePressure: 9.2e6, specificHeat: 1000, gravity: 8.87, temperature: 232, days: 11.60445 * 365.25 },
  { body: 'Titan', surfacePressure: 146_700, specificHeat: 1044, gravity: 1.354, temperature: 85, days: 25.732352 * 365.25 },
] as const;

/**
 * Planetary Data System Atmospheres Node, table of radiative time constants (yr, three decimals) and seasonal lags
 * atan(2πτ/P) (degrees): seen. Orbital periods in Julian years from the fact sheets (seen to Jupiter, memory beyond).
 * The table does not give its own periods. Up to Jupiter its two figures agree with the sheets'; beyond, they imply 29.52,
 * 84.5 and 166.2 yr, which is up to 0.9 % longer: `periodSlack`.
 */
// biome-ignore format: a table
export const seasonalLags = [
  { body: 'Venus', years: 0.007, lagDeg: 3.94, period: 224.701 / 365.25, periodSlack: 0 },
  { body: 'Earth', years: 0.131, lagDeg: 39.47, period: 365.256 / 365.25, periodSlack: 0 },
  { body: 'Mars', years: 0.006, lagDeg: 1.17, period: 686.98 / 365.25, periodSlack: 0 },
  { body: 'Jupiter', years: 4.534, lagDeg: 67.39, period: 4332.589 / 365.25, periodSlack: 0 },
  { body: 'Saturn', years: 20.794, lagDeg: 77.27, period: 10_759.22 / 365.25, periodSlack: 0.01 },
  { body: 'Uranus', years: 131.311, lagDeg: 84.15, period: 30_685.4 / 365.25, periodSlack: 0.01 },
  { body: 'Neptune', years: 121.008, lagDeg: 77.67, period: 60_189 / 365.25, periodSlack: 0.01 },
] as const;

/** The same table's row for Titan: its two figures cannot both hold. */
export const titanLag = {
  years: 0.053,
  lagDeg: 82.54,
  period: 10_759.22 / 365.25,
  lagOfYearsDeg: 0.65,
  yearsOfLag: 35.8,
} as const;

/** Radiating half-space, Φ = Γ√ω/(dE/dT): amplitude 1/√(1+√2Φ+Φ²) and lag (Carslaw & Jaeger 1959, §2.6), 12 digits: calculated. */
// biome-ignore format: a table
export const radiatingGround = [
  { phi: 0.01, amplitude: 0.99295410494, lagDeg: 0.402291057239 },
  { phi: 0.1, amplitude: 0.931929071648, lagDeg: 3.7783772159 },
  { phi: 0.3, amplitude: 0.812641863444, lagDeg: 9.92665499579 },
  { phi: 1, amplitude: 0.541196100146, lagDeg: 22.5 },
  { phi: 3, amplitude: 0.264974902467, lagDeg: 34.2009195082 },
  { phi: 10, amplitude: 0.0931929071648, lagDeg: 41.2216227841 },
  { phi: 100, amplitude: 0.0099295410494, lagDeg: 44.5977089428 },
] as const;
