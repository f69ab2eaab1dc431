/** A settled year as curves in time, one a band: quintic Hermite from T, T′ = f and T″ = J f + ∂f/∂t at the step ends. */

import type { Seconds } from '../../si.ts';
import { banded, multiplyBanded } from '../../solve/banded.ts';
import type { Curve } from '../../solve/curve.ts';
import type { StageHistory } from '../../solve/rodas4.ts';
import type { YearMesh } from './mesh.ts';
import type { ZonalSystem } from './systemShape.ts';

export interface YearCurves {
  /** Means over each band's surfaces, south to north; positions are seconds after periapsis, 0 … period. */
  readonly bands: readonly Curve[];
  readonly sea: readonly Curve[];
  /** Null where the world has no land. */
  readonly land: readonly Curve[] | null;
  /** Mean over the globe. */
  readonly mean: Curve;
  /** The unknowns at a time after periapsis, 0 … period, as the system orders them: all curves at once. */
  unknownsInto(time: Seconds, into: Float64Array): void;
}

export function yearCurves(system: ZonalSystem, history: StageHistory): YearCurves {
  const { mesh, physics } = system;
  const second = secondDerivatives(system, history);
  const surfaces = physics.land === null ? 1 : 2;
  const curvesOf = (surface: number) =>
    Array.from({ length: physics.bands.count }, (_, band) => {
      return curveOf(mesh, system.size, band * surfaces + surface, history, second);
    });
  const sea = curvesOf(0);
  const land = physics.land === null ? null : curvesOf(1);
  const fraction = physics.land?.fraction;
  const bands =
    land === null || fraction === undefined
      ? sea
      : sea.map((curve, i) => weightedSum([curve, land[i]], [1 - fraction[i], fraction[i]]));
  return {
    bands,
    sea,
    land,
    mean: weightedSum(bands, new Array(bands.length).fill(1 / bands.length)),
    unknownsInto: rowInterpolation(mesh, system.size, history, second),
  };
}

/** Quintic Hermite as the curves have it, with the weights of the six ordinates worked out once for a row. */
function rowInterpolation(
  { time, steps }: YearMesh,
  size: number,
  { value, rate }: StageHistory,
  second: Float64Array,
): (at: Seconds, into: Float64Array) => void {
  let step = 0;
  return (at, into) => {
    while (step > 0 && at < time[step]) step--;
    while (step < steps - 1 && at >= time[step + 1]) step++;
    const h = time[step + 1] - time[step];
    const x = (at - time[step]) / h;
    const cube = x * x * x;
    const arrive = cube * (10 - x * (15 - 6 * x));
    const leaveSlope = h * x * (1 - x * x * (6 - x * (8 - 3 * x)));
    const arriveSlope = h * cube * (x * (7 - 3 * x) - 4);
    const leaveBend = 0.5 * h * h * x * x * (1 - x) ** 3;
    const arriveBend = 0.5 * h * h * cube * (1 - x) ** 2;
    for (let i = 0; i < size; i++) {
      const a = step * size + i;
      const b = a + size;
      into[i] =
        value[a] +
        arrive * (value[b] - value[a]) +
        leaveSlope * rate[a] +
        arriveSlope * rate[b] +
        leaveBend * second[a] +
        arriveBend * second[b];
    }
  };
}

function curveOf(mesh: YearMesh, size: number, column: number, history: StageHistory, second: Float64Array): Curve {
  const { steps, time } = mesh;
  const curve = emptyCurve(time, steps);
  for (let end = 0; end < 2 * steps; end++) {
    const entry = ((end + 1) >> 1) * size + column;
    curve.value[end] = history.value[entry];
    curve.slope[end] = history.rate[entry];
    curve.curvature[end] = second[entry];
  }
  return curve;
}

function emptyCurve(position: Float64Array, pieces: number): Curve {
  const column = () => new Float64Array(2 * pieces);
  return { position, value: column(), slope: column(), curvature: column() };
}

/** Curves on one mesh, combined. */
function weightedSum(curves: readonly Curve[], weights: readonly number[]): Curve {
  const sum = emptyCurve(curves[0].position, curves[0].position.length - 1);
  for (const part of ['value', 'slope', 'curvature'] as const) {
    const into = sum[part];
    for (const [k, curve] of curves.entries())
      for (let i = 0; i < into.length; i++) into[i] += weights[k] * curve[part][i];
  }
  return sum;
}

/**
 * Above this |∂f/∂T| h, transport apart, a store is fast: J f would multiply what the march leaves of error by (|∂f/∂T| h)²/64
 * between the steps.
 */
const fast = 4;

/** T″ at every step end, J f + ∂f/∂t, or for a fast store the difference of T′ about it; the last is the first, the year being closed. */
function secondDerivatives(system: ZonalSystem, history: StageHistory): Float64Array {
  const { size, mesh } = system;
  const { steps, width } = mesh;
  const second = new Float64Array((steps + 1) * size);
  const jacobian = banded(size, system.width);
  const main = jacobian.diagonals[system.width];
  const drift = new Float64Array(size);
  const transport = new Float64Array(size);
  for (let step = 0; step < steps; step++) {
    const row = (values: Float64Array, at: number) => values.subarray(at * size, (at + 1) * size);
    const here = row(history.rate, step);
    system.jacobianInto(step, row(history.value, step), jacobian);
    system.driftInto(step, row(history.value, step), drift);
    system.transportRatesInto(row(history.value, step), transport);
    const into = row(second, step);
    multiplyBanded(jacobian, here, into);
    const previous = (step + steps - 1) % steps;
    const [before, after] = [row(history.rate, previous), row(history.rate, step + 1)];
    const [a, b] = [width[previous], width[step]];
    const longest = Math.max(a, b);
    for (let i = 0; i < size; i++) {
      if (Math.abs(main[i] + transport[i]) * longest < fast) into[i] += drift[i];
      else into[i] = ((here[i] - before[i]) * (b / a) + (after[i] - here[i]) * (a / b)) / (a + b);
    }
  }
  second.copyWithin(steps * size, 0, size);
  return second;
}
