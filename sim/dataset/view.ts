/** A Variable as an `ndarray`, where slicing and transposing read best: outputs and fields. Loops that count use `data`. */
import ndarray, { type NdArray } from 'ndarray';
import type { Variable } from './dataset.ts';

/** Shape as the variable's own; the same memory, not a copy. `view(field).pick(null, 3)` is the fourth column. */
export function view(variable: Variable): NdArray<Float64Array> {
  return ndarray(variable.data, [...variable.shape]);
}
