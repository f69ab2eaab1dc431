/** A Dataset's variables as plain numbers. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';

/** A variable's plain numbers. Errors: a Dataset without it is our own fault. */
export function values(dataset: Dataset, name: string): Float64Array {
  const variable = dataset.variables[name];
  if (!variable) throw new Error(`dataset has no variable ${name}`);
  return variable.data;
}

/** Least and greatest value of a variable. */
export function extremes(dataset: Dataset, name: string): [number, number] {
  const data = values(dataset, name);
  const least = data.reduce((a, b) => Math.min(a, b), Number.POSITIVE_INFINITY);
  return [least, data.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY)];
}
