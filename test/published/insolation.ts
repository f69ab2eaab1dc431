/** Insolation by latitude and season: printed tables, and calculated ones. W m⁻². */
import type { Provenance } from './provenance.ts';

/** Elements as such papers give them: longitude of perihelion heliocentric, 180° from the solar longitude there. */
export interface Elements {
  readonly irradiance: number;
  readonly eccentricity: number;
  readonly obliquityDeg: number;
  readonly perihelionDeg: number;
}

/**
 * Monthly means, January to December.
 * Bonfils et al. (1998), insolation appendix of the documentation of the Palaeoclimate Modelling Intercomparison Project: seen.
 * Elements of Berger (1978) J. Atmos. Sci. 35, 2362. Year of 365 days; equinox at day 80.0 (1 January is day 1); the daily value of
 * day d is taken at (d − 80)/365 of a year after the equinox, and the days of a month have equal weight. The rule is ours, found
 * to fit: half a day off gives errors of 4 W m⁻².
 */
export const monthlyElements: Elements = {
  irradiance: 1365,
  eccentricity: 0.016724,
  obliquityDeg: 23.446,
  perihelionDeg: 102.04,
};
export const equinoxDay = 80;
export const monthDays = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

// biome-ignore format: a table
export const monthlyMeans = [
  { latitudeDeg: 90, months: [0, 0, 16.69, 226.23, 428.89, 518.14, 478.16, 316.18, 78, 0, 0, 0] },
  { latitudeDeg: 80, months: [0, 0.5, 58.88, 229.6, 422.37, 510.27, 470.89, 311.54, 116.5, 10.87, 0, 0] },
  { latitudeDeg: 70, months: [0.9, 33.69, 130.22, 269.56, 407.73, 486.89, 449.66, 324.37, 182.88, 65.93, 6.3, 0] },
  { latitudeDeg: 60, months: [40.79, 99.47, 199.95, 320.61, 423.31, 473.71, 449.7, 362.23, 246.58, 135.19, 57.36, 26.96] },
  { latitudeDeg: 50, months: [106.32, 169.74, 264.21, 365.91, 444.6, 480.35, 462.83, 397.32, 303.52, 203.7, 124.8, 89.3] },
  { latitudeDeg: 40, months: [177.08, 237.91, 320.71, 401.78, 458.73, 482.52, 470.22, 423.65, 351.54, 267.46, 194.75, 159.64] },
  { latitudeDeg: 30, months: [246.98, 300.58, 367.62, 426.4, 462.36, 475.32, 467.72, 438.95, 389.07, 323.9, 262.21, 230.72] },
  { latitudeDeg: 20, months: [312.37, 355.26, 403.46, 438.71, 454.24, 457.13, 453.93, 442.15, 414.9, 371.05, 323.99, 298.46] },
  { latitudeDeg: 10, months: [370.54, 400.05, 427.12, 438.2, 434.07, 427.68, 428.57, 432.88, 428.22, 407.35, 377.68, 359.92] },
  { latitudeDeg: 0, months: [419.41, 433.45, 437.87, 424.8, 402.22, 387.51, 392.1, 411.28, 428.62, 431.65, 421.4, 412.83] },
  { latitudeDeg: -10, months: [457.41, 454.42, 435.39, 398.91, 359.59, 337.71, 345.54, 377.98, 416.07, 443.17, 453.75, 455.49] },
  { latitudeDeg: -20, months: [483.47, 462.35, 419.75, 361.34, 307.55, 279.91, 290.39, 334.01, 390.96, 441.61, 473.83, 486.69] },
  { latitudeDeg: -30, months: [497.12, 457.13, 391.43, 313.29, 247.92, 216.25, 228.65, 280.86, 354.07, 427.05, 481.26, 505.91] },
  { latitudeDeg: -40, months: [498.65, 439.17, 351.32, 256.36, 183.04, 149.47, 162.86, 220.41, 306.54, 400.06, 476.35, 513.42] },
  { latitudeDeg: -50, months: [489.55, 409.59, 300.7, 192.61, 116.05, 83.43, 96.55, 155.11, 249.89, 361.73, 460.39, 510.91] },
  { latitudeDeg: -60, months: [474.04, 370.62, 241.2, 124.69, 51.89, 24.98, 35.6, 88.41, 185.96, 313.84, 436.76, 503.6] },
  { latitudeDeg: -70, months: [471, 327.91, 174.97, 56.98, 4.71, 0, 0.34, 27.26, 117.1, 259.78, 417.97, 517.18] },
  { latitudeDeg: -80, months: [492.67, 308.85, 105.78, 6.81, 0, 0, 0, 0.17, 47.56, 214.03, 431.43, 542.01] },
  { latitudeDeg: -90, months: [500.27, 313.1, 64.32, 0, 0, 0, 0, 0, 7.99, 206.29, 438.09, 550.37] },
] as const;

interface MidMonth extends Elements {
  readonly source: string;
  readonly provenance: Provenance;
  readonly latitudeDeg: number;
  readonly solarLongitudeDeg: number;
  readonly expected: number;
  readonly within: number;
}

/**
 * "Mid-month" insolation of Berger & Loutre (1991) Quat. Sci. Rev. 10, 297, from NOAA's table orbit91: seen. Mid-month means
 * a solar longitude (120° for July, 300° for January), not a date.
 * Present: elements of the same table; half a unit of the last digit is 0.005, and the last digits of the elements move the
 * value by up to 0.006. The past: elements of Berger (1978) as listed for model intercomparison (seen), another solution than
 * the table's; the two are known to differ by up to 0.4 W m⁻², so 1 is allowed.
 */
const now = { irradiance: 1360, eccentricity: 0.017236, obliquityDeg: 23.446, perihelionDeg: 101.37, within: 0.011 };
const midMonth = { source: 'Berger & Loutre (1991)', provenance: 'seen', irradiance: 1360 } as const;
// biome-ignore format: a table
export const midMonths: readonly MidMonth[] = [
  { ...midMonth, ...now, latitudeDeg: 65, solarLongitudeDeg: 120, expected: 426.76 },
  { ...midMonth, ...now, latitudeDeg: -15, solarLongitudeDeg: 300, expected: 470.35 },
  { ...midMonth, eccentricity: 0.018682, obliquityDeg: 24.105, perihelionDeg: 0.87, latitudeDeg: 65, solarLongitudeDeg: 120, expected: 458.31, within: 1 },
  { ...midMonth, eccentricity: 0.018994, obliquityDeg: 22.949, perihelionDeg: 114.42, latitudeDeg: 65, solarLongitudeDeg: 120, expected: 418.62, within: 1 },
];

/** Elements of J2000 and daily means at solar longitude 0, 90, 180, 270°, with the annual mean: calculated (scipy), 3 decimals. */
export const seasonalElements: Elements = {
  irradiance: 1361,
  eccentricity: 0.016704,
  obliquityDeg: 23.4393,
  perihelionDeg: 102.918,
};
// biome-ignore format: a table
export const seasonalMeans = [
  [90, 0, 524.182, 0, 0, 172.349],
  [80, 75.833, 516.219, 74.709, 0, 178.109],
  [70, 149.362, 492.57, 147.147, 0, 196.801],
  [60, 218.352, 476.798, 215.115, 24.38, 236.32],
  [50, 280.709, 481.972, 276.547, 85.837, 284.112],
  [40, 334.535, 483.013, 329.576, 155.906, 328.301],
  [30, 378.198, 474.831, 372.59, 227.057, 365.211],
  [20, 410.368, 455.792, 404.284, 295.12, 392.81],
  [10, 430.07, 425.622, 423.694, 357.116, 409.842],
  [0, 436.705, 384.849, 430.23, 410.749, 415.596],
  [-10, 430.07, 334.598, 423.694, 454.265, 409.842],
  [-20, 410.368, 276.511, 404.284, 486.466, 392.81],
  [-30, 378.198, 212.74, 372.59, 506.787, 365.211],
  [-40, 334.535, 146.075, 329.576, 515.519, 328.301],
  [-50, 280.709, 80.425, 276.547, 514.408, 284.112],
  [-60, 218.352, 22.843, 215.115, 508.886, 236.32],
  [-70, 149.362, 0, 147.147, 525.72, 196.801],
  [-80, 75.833, 0, 74.709, 550.96, 178.109],
  [-90, 0, 0, 0, 559.459, 172.349],
] as const;

/** Closed forms on a circle, S₀ = 1361 W m⁻², obliquity 23.44°: calculated, 10 digits. */
// biome-ignore format: a table
export const circular = [
  { name: 'equator at the equinox, S₀/π', latitudeDeg: 0, solarLongitudeDeg: 0, expected: 433.2197551 },
  { name: 'pole at the solstice, S₀ sin ε', latitudeDeg: 90, solarLongitudeDeg: 90, expected: 541.3901586 },
  { name: 'equator at the solstice, (S₀/π) cos ε', latitudeDeg: 0, solarLongitudeDeg: 90, expected: 397.4692221 },
  { name: '45° at the equinox', latitudeDeg: 45, solarLongitudeDeg: 0, expected: 306.3326266 },
  { name: '30° at the solstice', latitudeDeg: 30, solarLongitudeDeg: 90, expected: 490.4078067 },
  { name: '60° at the solstice', latitudeDeg: 60, solarLongitudeDeg: 90, expected: 492.4460406 },
] as const;

/**
 * Share of the instellation near the polar circles, where the closed form cancels: calculated with 40 digits (mpmath) from
 * the doubles as written, rad; 14 digits or more.
 */
// biome-ignore format: a table
export const polarEdges = [
  { latitude: 0.5, declination: 0.3, expected: 0.34152646370144 },
  { latitude: 1.2, declination: -0.3, expected: 0.0096976130510696 },
  { latitude: 1.2, declination: -0.37, expected: 1.16040342216762e-5 },
  { latitude: 1.2, declination: -0.3707, expected: 4.88210089281413e-7 },
  { latitude: -1.4, declination: 0.1707, expected: 6.93272044682786e-7 },
  { latitude: 1.2, declination: 0.3707, expected: 0.3376483981348677 },
  { latitude: 0, declination: 1.5707, expected: 3.06617710725793e-5 },
] as const;

/**
 * Annual means relative to the globe's, as coefficients of Legendre polynomials in sin φ, and at pole and equator.
 * Nadeau & McGehee (2017) Icarus 291, 46: closed forms from memory; evaluated and checked by projection of the daily means: 10 digits.
 */
// biome-ignore format: a table
export const annualMeans = [
  { obliquityDeg: 0, s2: -0.625, s4: -0.140625, s6: -0.0634765625, pole: 0, equator: 1.273239545 },
  { obliquityDeg: 10, s2: -0.596730916, s4: -0.1199825858, s6: -0.04471741891, pole: 0.2210957267, equator: 1.263586367 },
  { obliquityDeg: 23.44, s2: -0.4766540344, s4: -0.04477009367, s6: 0.008070450879, pole: 0.5064800581, equator: 1.221269173 },
  { obliquityDeg: 30, s2: -0.390625, s4: -0.003295898438, s6: 0.02374172211, pole: 0.6366197724, equator: 1.189480064 },
  { obliquityDeg: 45, s2: -0.15625, s4: 0.05712890625, s6: 0.009422302246, pole: 0.9003163162, equator: 1.094790694 },
  { obliquityDeg: 54.7356103, s2: -2.660383719e-10, s4: 0.05468750003, s6: -0.01410590275, pole: 1.039595735, equator: 1.022278826 },
  { obliquityDeg: 60, s2: 0.078125, s4: 0.04064941406, s6: -0.02051830292, pole: 1.102657791, equator: 0.9816450414 },
  { obliquityDeg: 90, s2: 0.3125, s4: -0.052734375, s6: 0.01983642578, pole: 1.273239545, equator: 0.8105694691 },
] as const;

/** Obliquity at which pole and equator have one annual mean: OEIS A381254, seen (Ward 1974, J. Geophys. Res. 79, 3375: about 54°). */
export const poleAsEquator = { obliquityDeg: 53.89623586295, obliquity: 0.94066677024 } as const;

/**
 * Global annual means, S₀ = 1361 W m⁻²: calculated, 9 digits. Elements seen: Berger (1978) and Berger & Loutre (1991) as used in
 * model intercomparison; Laskar et al. (2004) A&A 428, 261.
 */
// biome-ignore format: a table
export const globalMeans = [
  { epoch: '0 ka, Berger (1978)', eccentricity: 0.016724, obliquityDeg: 23.446, perihelionDeg: 102.04, expected: 340.297593 },
  { epoch: '0 ka, Berger & Loutre (1991)', eccentricity: 0.017236, obliquityDeg: 23.446, perihelionDeg: 101.37, expected: 340.300552 },
  { epoch: '6 ka', eccentricity: 0.018682, obliquityDeg: 24.105, perihelionDeg: 0.87, expected: 340.309392 },
  { epoch: '127 ka', eccentricity: 0.039378, obliquityDeg: 24.04, perihelionDeg: 275.41, expected: 340.514108 },
  { epoch: 'J2000, Laskar et al. (2004)', eccentricity: 0.0167023623, obliquityDeg: 23.4393, perihelionDeg: 102.918, expected: 340.29747 },
] as const;
