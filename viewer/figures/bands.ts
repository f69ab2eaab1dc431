/** What figures read from a Dataset with latitude. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { LatitudeDeg } from '../words/latitude.ts';
import type { LatitudePlace } from './latitudeAxis.ts';
import { values } from './variables.ts';

/** South to north. */
export interface Bands {
  readonly middlesDeg: readonly LatitudeDeg[];
  readonly middles: readonly LatitudePlace[];
  /** One more than bands: from the south pole to the north pole. */
  readonly edges: readonly LatitudePlace[];
  /** Share of the globe's area; they sum to 1. */
  readonly areas: readonly number[];
}

export function bandsOf(dataset: Dataset): Bands {
  const latitude = Array.from(values(dataset, 'latitude'));
  const bounds = Array.from(values(dataset, 'latitudeBounds'), Math.sin);
  const edges = [...latitude.map((_, band) => bounds[2 * band]!), bounds.at(-1)!];
  return {
    middlesDeg: latitude.map((angle) => angle / radiansPerDegree),
    middles: latitude.map(Math.sin),
    edges,
    areas: latitude.map((_, band) => (edges[band + 1]! - edges[band]!) / (edges.at(-1)! - edges[0]!)),
  };
}

/** A variable on (time, latitude). Errors: a Dataset whose numbers do not fill its shape is damaged. */
export interface Field {
  readonly rows: number;
  readonly bands: number;
  at(row: number, band: number): number;
}

export function fieldOf(dataset: Dataset, name: string): Field {
  const data = values(dataset, name);
  const [rows, bands] = dataset.variables[name]!.shape as [number, number];
  if (data.length !== rows * bands) throw new Error(`${name} does not fill its shape`);
  return { rows, bands, at: (row, band) => data[row * bands + band]! };
}

/** Least and greatest value of each band through its rows. */
export function bandRanges(field: Field): { readonly low: number[]; readonly high: number[] } {
  const low = new Array<number>(field.bands).fill(Number.POSITIVE_INFINITY);
  const high = new Array<number>(field.bands).fill(Number.NEGATIVE_INFINITY);
  for (let row = 0; row < field.rows; row++) {
    for (let band = 0; band < field.bands; band++) {
      const value = field.at(row, band);
      if (value < low[band]!) low[band] = value;
      if (value > high[band]!) high[band] = value;
    }
  }
  return { low, high };
}

/** Mean of each band over the time that the rows stand for. */
export function bandMeans(dataset: Dataset, field: Field): number[] {
  const weight = values(dataset, 'weight');
  return Array.from({ length: field.bands }, (_, band) => {
    let sum = 0;
    for (let row = 0; row < field.rows; row++) sum += weight[row]! * field.at(row, band);
    return sum;
  });
}

const rounding = 1e-9;

/** Share of area and time in which `test` holds. */
export function areaTimeShare(dataset: Dataset, field: Field, test: (value: number) => boolean): number {
  const weight = values(dataset, 'weight');
  const { areas } = bandsOf(dataset);
  let share = 0;
  for (let row = 0; row < field.rows; row++) {
    for (let band = 0; band < field.bands; band++) {
      if (test(field.at(row, band))) share += weight[row]! * areas[band]!;
    }
  }
  return Math.abs(share - 1) < rounding ? 1 : share;
}
