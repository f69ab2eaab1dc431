/** Which row of a table of posterior samples a draw takes. */
import { SimError } from '../../error.ts';

/** From a number in (0, 1) to a row. */
export type RowChooser = (share: number) => number;

/**
 * Rows by the inverse of their summed weights. Given the number of one dimension of `sobolDraws`, the first 2^m draws take each row as
 * often as its weight says, to within one or two: far evener than rows at random. Rows keep together, and with them all correlations.
 * Shape:  weights (rows,) in any scale; draw k takes chooseRow(draws.at(k, dimension)), whatever the order.
 * Errors: SimError with `where` for no rows, a weight that is negative or not finite, or none above zero.
 */
export function rowsByWeight(where: string, weights: Float64Array): RowChooser {
  requireWeights(where, weights);
  const reach = new Float64Array(weights.length); // sum of the weights up to and with this row
  let sum = 0;
  for (let row = 0; row < weights.length; row++) {
    sum += weights[row];
    reach[row] = sum;
  }
  return (share) => firstBeyond(reach, share * sum);
}

/** As rowsByWeight, all weights equal. Errors: SimError with `where` for no rows. */
export function rowsEvenly(where: string, rows: number): RowChooser {
  if (rows === 0) throw noRows(where);
  return (share) => Math.min(rows - 1, Math.floor(share * rows));
}

/** First row whose reach passes the level, so never one of weight 0. */
function firstBeyond(reach: Float64Array, level: number): number {
  let low = 0;
  let high = reach.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (reach[middle] > level) high = middle;
    else low = middle + 1;
  }
  return low;
}

function requireWeights(where: string, weights: Float64Array): void {
  if (weights.length === 0) throw noRows(where);
  const bad = weights.findIndex((weight) => !(weight >= 0 && Number.isFinite(weight)));
  if (bad >= 0) {
    const mend = 'Weights are finite numbers, zero or more';
    throw new SimError(where, `the weight of row ${bad + 1} is ${weights[bad]}`, mend);
  }
  if (!weights.some((weight) => weight > 0)) {
    throw new SimError(where, 'no weight is above zero', 'Name another column of weights, or none');
  }
}

function noRows(where: string): SimError {
  return new SimError(where, 'there is no row', 'Give a file with at least one sample');
}
