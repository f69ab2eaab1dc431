/**
 * Curves of a draw at places that are the same for all draws: temperature at shares of the period since periapsis, which lie as close as
 * the orbit at the centre asks for, and for models with latitude the year's mean, highest and lowest temperature of every band.
 */
import type { Dataset } from '../../dataset/dataset.ts';
import { SimError } from '../../error.ts';
import { models } from '../../models/index.ts';
import type { Model } from '../../models/model.ts';
import { balancedFromMean, meanFromBalanced } from '../../orbit/balanced.ts';
import type { CaseDrawn } from '../../scenario/drawn.ts';
import type { SolveOptions, World } from '../../world.ts';

export interface BandSampler {
  readonly bands: readonly BandPlace[];
  /** Names of the numbers of a draw: bands one after the other. */
  readonly columns: readonly string[];
  /** Errors: SimError where the draw is no sound planet, or its state is not known to the tolerance. */
  at(values: ArrayLike<number>): Float64Array;
}

export interface BandPlace {
  readonly name: 'orbit' | 'latitudeMean' | 'latitudeMax' | 'latitudeMin';
  readonly label: string;
  readonly along: 'orbit' | 'latitude';
  /** Share of the period, or degrees of latitude. */
  readonly positions: Float64Array;
}

const places = 120;
/** Rows of a draw's own year; the cubic between them is off by some 1e-6 of the swing, far below the spread that is shown. */
const rows = 240;

/** Nothing for a run from a start, which is no orbit that repeats. */
export function bandSampler(drawn: CaseDrawn, centre: readonly number[]): BandSampler {
  if (drawn.options.start !== 'periodic') return { bands: [], columns: [], at: () => new Float64Array(0) };
  const model = models[drawn.model];
  const world = drawn.worldAt(centre);
  const { eccentricity } = world.orbit;
  const phases = Float64Array.from({ length: places + 1 }, (_, i) => {
    return meanFromBalanced((2 * Math.PI * i) / places, eccentricity) / (2 * Math.PI);
  });
  const orbit: BandPlace = { name: 'orbit', label: 'Temperature', along: 'orbit', positions: phases };
  const bands = world.globe ? [orbit, ...latitudeBands(world.globe.bands)] : [orbit];
  return {
    bands,
    columns: bands.flatMap(({ name, positions }) => Array.from(positions, (_, i) => `${name}.${i}`)),
    at(values) {
      const { world: one, options } = drawn.builtAt(values);
      const parts = model.orbitInto
        ? [throughOrbit(model, one, options, phases)]
        : fromYear(model, one, options, phases);
      const row = new Float64Array(parts.reduce((sum, { length }) => sum + length, 0));
      let offset = 0;
      for (const part of parts) {
        row.set(part, offset);
        offset += part.length;
      }
      return row;
    },
  };
}

function throughOrbit(model: Model, world: World, options: SolveOptions, phases: Float64Array): Float64Array {
  const { eccentricity } = world.orbit;
  const positions = phases.map((phase) => balancedFromMean(2 * Math.PI * phase, eccentricity));
  const temperatures = new Float64Array(phases.length);
  requireTolerance(model.orbitInto!(world, options, positions, temperatures));
  return temperatures;
}

/** From the rows of a year that the model has to compute as a whole. */
function fromYear(model: Model, world: World, options: SolveOptions, phases: Float64Array): Float64Array[] {
  const [state] = model.solve(world, { ...options, samples: rows, spacing: 'balancedAnomaly' }, []).states;
  requireTolerance(state.converged);
  return [betweenRows(state.dataset, world, phases), ...(world.globe ? alongLatitude(state.dataset) : [])];
}

function requireTolerance(isKept: boolean): void {
  if (!isKept) throw new SimError('solve.tolerance', 'the state is not known to it', 'Raise it');
}

function latitudeBands(count: number): BandPlace[] {
  const positions = Float64Array.from(
    { length: count },
    (_, i) => (Math.asin((2 * i + 1 - count) / count) * 180) / Math.PI,
  );
  return [
    { name: 'latitudeMean', label: 'Annual mean temperature by latitude', along: 'latitude', positions },
    { name: 'latitudeMax', label: 'Highest temperature of the year by latitude', along: 'latitude', positions },
    { name: 'latitudeMin', label: 'Lowest temperature of the year by latitude', along: 'latitude', positions },
  ];
}

/** Between rows, equal in the draw's own balanced anomaly, by the cubic through four of them. */
function betweenRows({ variables }: Dataset, { orbit }: World, phases: Float64Array): Float64Array {
  const temperatures = variables.temperature.data;
  const count = temperatures.length;
  const row = (i: number) => temperatures[((i % count) + count) % count];
  return phases.map((phase) => {
    const place = (balancedFromMean(2 * Math.PI * phase, orbit.eccentricity) / (2 * Math.PI)) * count;
    const i = Math.floor(place);
    const x = place - i;
    const [a, b, c, d] = [row(i - 1), row(i), row(i + 1), row(i + 2)];
    // Lagrange through −1, 0, 1, 2
    return (
      (-x * (x - 1) * (x - 2) * a) / 6 +
      ((x + 1) * (x - 1) * (x - 2) * b) / 2 -
      ((x + 1) * x * (x - 2) * c) / 2 +
      ((x + 1) * x * (x - 1) * d) / 6
    );
  });
}

function alongLatitude({ variables }: Dataset): Float64Array[] {
  const { data, shape } = variables.bandTemperature;
  const [count, bands] = shape;
  const weight = variables.weight.data;
  const mean = new Float64Array(bands);
  const highest = new Float64Array(bands).fill(Number.NEGATIVE_INFINITY);
  const lowest = new Float64Array(bands).fill(Number.POSITIVE_INFINITY);
  for (let row = 0; row < count; row++) {
    for (let band = 0; band < bands; band++) {
      const value = data[row * bands + band];
      mean[band] += weight[row] * value;
      highest[band] = Math.max(highest[band], value);
      lowest[band] = Math.min(lowest[band], value);
    }
  }
  return [mean, highest, lowest];
}
