/** Which rows of a Dataset a map shows: enough to look smooth, few enough to be drawn at once. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import { balancedFromTrue } from '../../sim/orbit/balanced.ts';
import type { Radians } from '../../sim/si.ts';
import { extremes, values } from './variables.ts';

const mostColumns = 200;

/**
 * All rows of a short Dataset of one orbit; of a longer one those nearest to equal steps of the balanced anomaly, so that a
 * periapsis passage keeps its share however the rows are spaced. In order, each once.
 */
export function mapRows(dataset: Dataset): number[] {
  const count = values(dataset, 'time').length;
  const stride = Math.ceil(count / mostColumns);
  if (stride === 1) return Array.from({ length: count }, (_, row) => row);
  const anomaly = balancedAnomalies(dataset);
  const columns = Math.ceil(count / stride);
  const chosen = new Set<number>();
  let row = 0;
  for (let column = 0; column < columns; column++) {
    const wanted = anomaly[0]! + (2 * Math.PI * column) / columns;
    while (row + 1 < count && Math.abs(anomaly[row + 1]! - wanted) <= Math.abs(anomaly[row]! - wanted)) row++;
    chosen.add(row);
  }
  return [...chosen];
}

/** Increasing through the orbit. */
function balancedAnomalies(dataset: Dataset): Radians[] {
  const [near, far] = extremes(dataset, 'distance');
  const eccentricity = (far - near) / (far + near);
  return Array.from(values(dataset, 'trueAnomaly'), (anomaly) => balancedFromTrue(anomaly, eccentricity));
}
