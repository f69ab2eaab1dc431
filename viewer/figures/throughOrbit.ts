/** A variable of a periodic state at any moment of the orbit, by straight lines between rows. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Radians } from '../../sim/si.ts';
import { values } from './variables.ts';

const turn = 2 * Math.PI;

/** The variable's value at a mean anomaly of any number of turns. Not for angles, which jump. */
export function throughOrbit(dataset: Dataset, name: string): (meanAnomaly: Radians) => number {
  const mean = values(dataset, 'meanAnomaly');
  const data = values(dataset, name);
  const last = mean.length - 1;
  return (anomaly) => {
    const wanted = anomaly - turn * Math.floor(anomaly / turn);
    const after = firstBeyond(mean, wanted);
    const [before, next] = [after === 0 ? last : after - 1, after > last ? 0 : after];
    const start = after === 0 ? mean[last]! - turn : mean[before]!;
    const end = after > last ? mean[0]! + turn : mean[next]!;
    const share = end > start ? (wanted - start) / (end - start) : 0;
    return data[before]! + share * (data[next]! - data[before]!);
  };
}

/** Place of the first row whose mean anomaly is larger; their number where none is. Rows increase. */
function firstBeyond(mean: Float64Array, wanted: Radians): number {
  let [low, high] = [0, mean.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (mean[middle]! > wanted) high = middle;
    else low = middle + 1;
  }
  return low;
}
