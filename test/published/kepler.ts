/**
 * Kepler's equation M = E − e sin E: worked examples in print, and hard cases.
 * Meeus (1998) Astronomical Algorithms 2nd ed., ch. 30, example 30.a and the table of that chapter; Vallado (2013)
 * Fundamentals of Astrodynamics 4th ed., example 2-1; Curtis (2014) Orbital Mechanics for Engineering Students 3rd ed.,
 * examples 3.1 and 3.2; Colwell (1993) Solving Kepler's Equation over Three Centuries.
 * `eccentric` and `trueAnomaly` hold 15 digits from 30-digit arithmetic (mpmath); `printed` is the book's own figure
 * and `printedTo` half a unit of its last digit.
 */
import type { Provenance } from './provenance.ts';

interface WorkedExample {
  readonly source: string;
  readonly provenance: Provenance;
  readonly eccentricity: number;
  readonly meanDeg: number;
  readonly printedDeg: number;
  readonly printedTo: number;
  readonly eccentricDeg: number;
  readonly trueDeg: number;
}

const meeus = { source: 'Meeus (1998) ch. 30', provenance: 'seen' } as const;
const degreesPerRadian = 180 / Math.PI;

// biome-ignore format: a table
export const workedExamples: readonly WorkedExample[] = [
  { ...meeus, eccentricity: 0.1, meanDeg: 5, printedDeg: 5.554589, printedTo: 5e-7, eccentricDeg: 5.55458925387232, trueDeg: 6.13976152084045 },
  { ...meeus, eccentricity: 0.2, meanDeg: 5, printedDeg: 6.246908, printedTo: 5e-7, eccentricDeg: 6.24690770706418, trueDeg: 7.64708427656981 },
  { ...meeus, eccentricity: 0.3, meanDeg: 5, printedDeg: 7.13496, printedTo: 5e-7, eccentricDeg: 7.13496009806525, trueDeg: 9.71257115121905 },
  { ...meeus, eccentricity: 0.4, meanDeg: 5, printedDeg: 8.313903, printedTo: 5e-7, eccentricDeg: 8.3139034616376, trueDeg: 12.6701418726436 },
  { ...meeus, eccentricity: 0.5, meanDeg: 5, printedDeg: 9.950063, printedTo: 5e-7, eccentricDeg: 9.95006258922112, trueDeg: 17.1482924412401 },
  { ...meeus, eccentricity: 0.6, meanDeg: 5, printedDeg: 12.356653, printedTo: 5e-7, eccentricDeg: 12.3566534283162, trueDeg: 24.4324503497365 },
  { ...meeus, eccentricity: 0.7, meanDeg: 5, printedDeg: 16.16799, printedTo: 5e-7, eccentricDeg: 16.1679899471013, trueDeg: 37.3621807989415 },
  { ...meeus, eccentricity: 0.8, meanDeg: 5, printedDeg: 22.656579, printedTo: 5e-7, eccentricDeg: 22.6565786695678, trueDeg: 62.0117069134107 },
  { ...meeus, eccentricity: 0.99, meanDeg: 5, printedDeg: 45.361023, printedTo: 5e-7, eccentricDeg: 45.3610229365312, trueDeg: 160.745615960693 },
  { ...meeus, eccentricity: 0.99, meanDeg: 1, printedDeg: 24.725822, printedTo: 5e-7, eccentricDeg: 24.7258222409381, trueDeg: 144.1559515702 },
  { ...meeus, eccentricity: 0.99, meanDeg: 2, printedDeg: 32.361007, printedTo: 5e-7, eccentricDeg: 32.3610074720311, trueDeg: 152.542133893645 },
  { source: 'Colwell (1993)', provenance: 'seen', eccentricity: 0.75, meanDeg: 70, printedDeg: 110.302, printedTo: 5e-4, eccentricDeg: 110.302228352331, trueDeg: 150.511502072736 },
  { ...meeus, eccentricity: 0.99, meanDeg: 0.2 * degreesPerRadian, printedDeg: 1.066997365282 * degreesPerRadian, printedTo: 5e-13 * degreesPerRadian, eccentricDeg: 1.0669973652815632 * degreesPerRadian, trueDeg: 166.311977270287 },
  { source: 'Vallado (2013) example 2-1', provenance: 'memory', eccentricity: 0.4, meanDeg: 235.4, printedDeg: 220.512074, printedTo: 1e-6, eccentricDeg: 220.512074767522, trueDeg: 360 - 152.836008230786 },
  { source: 'Curtis (2014) example 3.1', provenance: 'memory', eccentricity: 0.37255, meanDeg: 3.6029 * degreesPerRadian, printedDeg: 3.4794 * degreesPerRadian, printedTo: 5e-5 * degreesPerRadian, eccentricDeg: 3.47942204434248 * degreesPerRadian, trueDeg: 360 - 166.845025721411 },
];

/** Near periapsis of long orbits, where E − e sin E loses half of its digits; calculated by bisection in 40-digit arithmetic (mpmath) from the doubles as written. */
// biome-ignore format: a table
export const hardCases = [
  { eccentricity: 0.999, mean: 0.001, eccentric: 0.17085095632357902, balanced: 1.0400525243298273, trueAnomaly: 2.63063755229913, distanceRatio: 0.015544997150217305 },
  { eccentricity: 0.999, mean: 1e-10, eccentric: 9.999999999983342e-8, balanced: 6.686566967589877e-7, trueAnomaly: 4.471017781206737e-6, distanceRatio: 0.0010000000000049958 },
  { eccentricity: 0.99, mean: 1e-8, eccentric: 9.999999999834991e-7, balanced: 3.7558934994445086e-6, trueAnomaly: 1.4106735979200344e-5, distanceRatio: 0.010000000000495009 },
  { eccentricity: 0.95, mean: 3, eccentric: 3.068949919222049, balanced: 3.112513185070397, trueAnomaly: 3.1299555200725444, distanceRatio: 1.9474945428018426 },
  { eccentricity: 0.93366, mean: 0.01, eccentric: 0.14377460422080005, balanced: 0.3315719499803837, trueAnomaly: 0.7415927945390492, distanceRatio: 0.07597329537206102 },
  { eccentricity: 0.9999, mean: 1e-12, eccentric: 9.999999999999434e-9, balanced: 1.1891922496350191e-7, trueAnomaly: 1.4141782065918453e-6, distanceRatio: 0.00010000000000003898 },
  { eccentricity: 0.9999, mean: 1e-6, eccentric: 0.008846308180180548, balanced: 0.1051034361866511, trueAnomaly: 1.1179418519806372, distanceRatio: 0.00013912441620276533 },
  { eccentricity: 0.9999, mean: 0.001, eccentric: 0.18071515543303396, balanced: 1.6453329004757677, trueAnomaly: 2.9858176993642362, distanceRatio: 0.016382964305883693 },
  { eccentricity: 0.9999, mean: 1, eccentric: 1.9344942764024455, balanced: 3.0257847581788364, trueAnomaly: 3.1318434662340806, distanceRatio: 1.355697142764838 },
  { eccentricity: 0.9999, mean: 3.1, eccentric: 3.120794537274652, balanced: 3.139843662982291, trueAnomaly: 3.1414455797208936, distanceRatio: 1.9996837486022934 },
  { eccentricity: 0.999999, mean: 1e-12, eccentric: 9.999998333048278e-7, balanced: 3.760601995666704e-5, trueAnomaly: 0.0014142127373550353, distanceRatio: 1.000000500028089e-6 },
  { eccentricity: 0.999999, mean: 0.001, eccentric: 0.18180123100593104, balanced: 2.57389247107584, trueAnomaly: 3.1260780358731974, distanceRatio: 0.016481360182868776 },
] as const;
