/** Damping and lag of any plain lumped world, from its eccentricity and heat-store number (`storeNumber.ts`) alone. */
import { SimError } from '../../error.ts';
import { plainSolver } from '../../models/lumped/plain.ts';
import { distanceRatioFromBalanced, meanFromBalanced } from '../../orbit/balanced.ts';
import type { Radians } from '../../si.ts';
import { type Curve, curveValue } from '../../solve/curve.ts';
import { extremes } from '../../solve/features.ts';
import { rootBetween } from '../../solve/roots.ts';
import { constantAlbedo } from '../../surface/albedo/constant.ts';
import { quarticEmission } from '../../surface/emission/quartic.ts';
import type { World } from '../../world.ts';

export interface PlainResponse {
  /** Swing of the temperature over that of the steady value. */
  readonly damping: number;
  /**
   * Of the maximum behind that of the steady value, as a share of the orbit. The steady value of a plain world is highest at
   * periapsis: the lag is the time of the maximum as well.
   */
  readonly lag: number;
  /** Numerical error bounds, ±. */
  readonly dampingError: number;
  readonly lagError: number;
}

/** Beyond it the solver's meshes grow large (`numerics` of the lumped model: uniform meshes are good to 0.995). */
export const largestEccentricity = 0.995;
/** Half of the stretch of s in which the maximum is looked for again, by the balance itself. */
const reach = 0.01;

/**
 * A function with the solver's buffers, one per thread: (eccentricity, heat-store number, relative tolerance) → response.
 * Eccentricity 0 stands for the limit of a nearly circular orbit: the first-order response 1/√(1+n²) and atan(n)/(2π).
 * Errors: SimError unless 0 ≤ eccentricity ≤ 0.995 and the heat-store number is finite and above zero.
 * Source: the lumped model's own solver, on the world in which S_a, T₀ and P/(2π) are one.
 */
export function plainResponder(): (eccentricity: number, storeNumber: number, tolerance: number) => PlainResponse {
  const solve = plainSolver();
  return (eccentricity, storeNumber, tolerance) => {
    check(eccentricity, storeNumber);
    if (eccentricity === 0) return nearlyCircular(storeNumber);
    const { curve, errorEstimate } = solve(unitWorld(eccentricity, storeNumber), 1, tolerance);
    const { highest, lowest } = extremes(curve);
    const steadySwing = 1 / Math.sqrt(1 - eccentricity) - 1 / Math.sqrt(1 + eccentricity);
    return {
      damping: (highest.value - lowest.value) / steadySwing,
      dampingError: (errorEstimate * (highest.value + lowest.value)) / steadySwing,
      ...maximum(curve, highest.position, eccentricity, errorEstimate),
    };
  };
}

function check(eccentricity: number, storeNumber: number): void {
  if (!(eccentricity >= 0 && eccentricity <= largestEccentricity)) {
    const mend = `Use 0 ≤ eccentricity ≤ ${largestEccentricity}`;
    throw new SimError('eccentricity', `${eccentricity} is not on the chart of plain worlds`, mend);
  }
  if (!(storeNumber > 0 && Number.isFinite(storeNumber))) {
    throw new SimError('heat-store number', `${storeNumber} is not above zero`, 'Give a finite number above zero');
  }
}

function nearlyCircular(storeNumber: number): PlainResponse {
  return {
    damping: 1 / Math.hypot(1, storeNumber),
    lag: Math.atan(storeNumber) / (2 * Math.PI),
    dampingError: 0,
    lagError: 0,
  };
}

/** S_a = 1, T₀ = 1 and P = 2π, so that C is 4n. */
function unitWorld(eccentricity: number, storeNumber: number): World {
  return {
    star: { luminosity: 4 * Math.PI, temperature: null, radius: null, mass: null },
    orbit: {
      semiMajorAxis: 1,
      eccentricity,
      period: 2 * Math.PI,
      argumentOfPeriapsis: null,
      inclination: null,
      periapsisTime: null,
    },
    surface: {
      albedo: constantAlbedo(0),
      emission: quarticEmission(1),
      absorbingFraction: 1,
      internalHeat: 0,
      heatCapacity: 4 * storeNumber,
    },
  };
}

/**
 * The maximum where arrival and emission balance: a slow world hardly varies, and its balance keeps digits that differences
 * of temperature have lost. An error of temperature δ shifts the balance by 4y⁴δ.
 */
function maximum(curve: Curve, near: Radians, eccentricity: number, errorEstimate: number) {
  const turn = 2 * Math.PI;
  const temperature = (s: Radians): number => curveValue(curve, s - turn * Math.floor(s / turn));
  const heating = (s: Radians): number => 1 / distanceRatioFromBalanced(s, eccentricity) ** 2 - temperature(s) ** 4;
  const [before, after] = [heating(near - reach), heating(near + reach)];
  const s = before > 0 && after < 0 ? rootBetween(heating, near - reach, near + reach) : near;
  const mean = meanFromBalanced(s, eccentricity);
  const width = meanFromBalanced(s + reach, eccentricity) - meanFromBalanced(s - reach, eccentricity);
  const fall = Math.abs(heating(s - reach) - heating(s + reach));
  return {
    lag: Math.max(0, (mean > Math.PI ? mean - turn : mean) / turn),
    lagError: (4 * temperature(s) ** 4 * errorEstimate * width) / (fall * turn),
  };
}
