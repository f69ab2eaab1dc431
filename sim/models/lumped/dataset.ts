/** A trajectory as rows: the Dataset of the lumped model (names and units in `dataset/names.ts`). */
import { type Dataset, series } from '../../dataset/dataset.ts';
import { steadyTemperature } from '../../findings/steadyState.ts';
import { type Curve, curveValuesInto } from '../../solve/curve.ts';
import type { SolveOptions, World } from '../../world.ts';
import type { OrbitClock } from './clock.ts';

type Sampling = Pick<SolveOptions, 'samples' | 'spacing'>;

/** One orbit, rows from periapsis on, without the repeated last one. */
export function periodicDataset(world: World, curve: Curve, clock: OrbitClock, sampling: Sampling): Dataset {
  const { samples } = sampling;
  const positions = new Float64Array(samples);
  const weights = new Float64Array(samples);
  for (let i = 0; i < samples; i++) {
    const turn = (2 * Math.PI * i) / samples;
    positions[i] = sampling.spacing === 'time' ? clock.fromMean(turn) : turn;
    // The trapezoidal rule on a circle: spectrally accurate for means over the orbit.
    weights[i] = sampling.spacing === 'time' ? 1 : clock.pace(turn);
  }
  return rows(world, curve, clock, positions, normalised(weights), 0);
}

/** All orbits of a run from a start, first and last moment included. */
export function forwardDataset(
  world: World,
  curve: Curve,
  clock: OrbitClock,
  sampling: Sampling,
  orbits: number,
): Dataset {
  const count = Math.max(1, Math.round(sampling.samples * orbits)) + 1;
  const from = curve.position[0];
  const to = curve.position[curve.position.length - 1];
  const positions = new Float64Array(count);
  const means = new Float64Array(count);
  const meanFrom = clock.mean(from);
  const meanTo = clock.mean(to);
  for (let i = 0; i < count; i++) {
    const share = i / (count - 1);
    const inTime = sampling.spacing === 'time';
    positions[i] = inTime ? clock.fromMean(meanFrom + share * (meanTo - meanFrom)) : from + share * (to - from);
    if (i === 0) positions[i] = from;
    if (i === count - 1) positions[i] = to;
    means[i] = clock.mean(positions[i]);
  }
  const weights = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    weights[i] = (means[Math.min(i + 1, count - 1)] - means[Math.max(i - 1, 0)]) / 2;
  }
  return rows(world, curve, clock, positions, normalised(weights), meanFrom);
}

function normalised(weights: Float64Array): Float64Array {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return weights.map((weight) => weight / total);
}

function rows(
  world: World,
  curve: Curve,
  clock: OrbitClock,
  positions: Float64Array,
  weight: Float64Array,
  meanAtStart: number,
): Dataset {
  const { surface } = world;
  const temperature = new Float64Array(positions.length);
  curveValuesInto(curve, positions, temperature);
  const column = (value: (s: number, i: number) => number) => Float64Array.from(positions, value);
  const onCircle = (angle: number) => angle - 2 * Math.PI * Math.floor(angle / (2 * Math.PI));
  const instellation = column((s) => clock.instellation(s));
  const absorbed = column(
    (_, i) => surface.absorbingFraction * instellation[i] * (1 - surface.albedo.at(temperature[i])),
  );
  const line = (data: Float64Array, unit: string, longName: string) => series('time', data, unit, longName);
  return {
    variables: {
      time: line(
        column((s) => (clock.mean(s) - meanAtStart) * clock.secondsPerRadian),
        's',
        meanAtStart === 0 ? 'Time after periapsis' : 'Time after the start',
      ),
      weight: line(weight, '1', 'Share of the time that the row stands for'),
      meanAnomaly: line(
        column((s) => onCircle(clock.mean(s))),
        'rad',
        'Mean anomaly',
      ),
      trueAnomaly: line(
        column((s) => onCircle(clock.true(s))),
        'rad',
        'True anomaly',
      ),
      distance: line(
        column((s) => clock.distance(s)),
        'm',
        'Distance from the star',
      ),
      instellation: line(instellation, 'W/m2', 'Instellation'),
      absorbed: line(absorbed, 'W/m2', 'Absorbed starlight'),
      emitted: line(
        column((_, i) => surface.emission.at(temperature[i])),
        'W/m2',
        'Emitted flux',
      ),
      temperature: line(temperature, 'K', 'Temperature'),
      steadyTemperature: line(
        column((_, i) => steadyTemperature(surface, instellation[i], temperature[i])),
        'K',
        'Steady temperature',
      ),
    },
  };
}
