/**
 * Named arrays with units: the one currency after a model has run. Plain data, so it survives a message to a worker.
 */

/** One named quantity on named dimensions. `data` is row-major over `shape`, which follows `dims`. SI units (`s`, `K`, `W/m2`, `m`, `rad`, `1`). */
export interface Variable {
  readonly data: Float64Array;
  readonly dims: readonly string[];
  readonly shape: readonly number[];
  readonly unit: string;
  readonly longName: string;
}

/** Variables by name. Those that share a dimension name share its length. */
export interface Dataset {
  readonly variables: Readonly<Record<string, Variable>>;
}

/** A variable on one dimension. */
export function series(dim: string, data: Float64Array, unit: string, longName: string): Variable {
  return { data, dims: [dim], shape: [data.length], unit, longName };
}
