/** Results as a page carries them: fields of fewer rows, for a page goes by mail and shows no more. */
import type { Dataset } from './dataset.ts';
import { everyRow, rowStride } from './thin.ts';

/** Numbers of a field in a page: some 200 by 90, more than a screen shows. */
const largestField = 18_000;

/** One row in so many is kept. */
export function pageStride(dataset: Dataset): number {
  return rowStride(dataset, largestField);
}

export function forPage(dataset: Dataset): Dataset {
  return everyRow(dataset, pageStride(dataset));
}
