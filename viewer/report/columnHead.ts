/** How a column is named at the head of a table: its line sample, its case, its state. */
import type { Column } from '../words/columns.ts';
import { type Child, element, userText } from './element.ts';
import { columnSample } from './lineSample.ts';

export function columnHead(column: Column): Child[] {
  const state = column.stateName === null ? null : element('small', {}, column.stateName);
  return [columnSample(column), userText(column.caseName), state];
}
