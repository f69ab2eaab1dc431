/** Table 1: the cases beside the steady value. */

import type { CaseResult } from '../../../sim/run.ts';
import { caseTable, steadyIsShared, withBefore } from '../../words/caseTable.ts';
import type { Cell, TableRow } from '../../words/cells.ts';
import type { Column } from '../../words/columns.ts';
import { hasLatitude } from '../../words/latitude.ts';
import { fixed, nbsp } from '../../words/number.ts';
import { columnHead } from '../columnHead.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element } from '../element.ts';

/** `originals` are the columns of the file's own cases. */
export function casesSection(
  cases: readonly CaseResult[],
  columns: readonly Column[],
  originals: readonly Column[],
): HTMLElement {
  const rows = withBefore(caseTable(columns), columns, originals);
  const shared = steadyIsShared(rows);
  const steadyMeaning = columns.some(hasLatitude)
    ? 'the temperature that would emit at once what the area absorbs and what comes from inside'
    : 'what a surface without heat store would have';
  const table = dataTable({
    caption: [
      element('b', {}, 'Table 1. '),
      shared
        ? `The cases beside the steady value, which is ${steadyMeaning}.`
        : `The cases; “steady” is ${steadyMeaning}.`,
    ],
    label: 'The cases beside the steady value',
    corner: 'Quantity',
    columns: [
      ...(shared ? [{ head: ['Steady value'] }] : []),
      ...columns.map((column) => ({ head: columnHead(column) })),
    ],
    rows: rows.map((row) => ({
      head: [row.label],
      cells: [...(shared ? [[row.cells[0]!.steady ?? '']] : []), ...row.cells.map((cell) => content(cell, !shared))],
    })),
  });
  return element('section', { class: 'grid' }, element('h2', {}, 'The cases'), table, notes(cases, rows));
}

function content({ text, reason, steady, detail, was }: Cell, showSteady: boolean): Child[] {
  return [
    text,
    was === undefined ? null : element('small', { class: 'was' }, `was ${was}`),
    showSteady && steady !== undefined ? element('small', {}, `steady ${steady}`) : null,
    detail === undefined ? null : element('small', { class: 'detail' }, detail),
    reason === undefined ? null : element('small', { class: 'reason' }, reason),
  ];
}

/** In the margin: how to read the rows that a newcomer would ask about. */
function notes(cases: readonly CaseResult[], rows: readonly TableRow[]): HTMLElement {
  const hasError = rows.some(({ cells }) => cells.some(({ hasError: has }) => has));
  return element(
    'aside',
    {},
    element('p', {}, 'Damping 1 follows the star at once; near 0 the temperature hardly moves.'),
    element('p', {}, 'A radiative time constant well below the period follows; well above it, remembers.'),
    ...groundNote(rows),
    ...steadyByFraction(cases),
    element(
      'p',
      {},
      `± is the numerical error, shown where it reaches the last digit${hasError ? '' : '; here it nowhere does'}. How well the inputs are known is another matter.`,
    ),
  );
}

function groundNote(rows: readonly TableRow[]): HTMLElement[] {
  if (!rows.some(({ label }) => label.includes('half-space'))) return [];
  const text =
    'Ground is computed as one lumped store; real ground conducts into a half-space. The rows on a small swing show how far the two are apart; under strong swings the peaks can differ by many kelvin.';
  return [element('p', {}, text)];
}

/** The textbook's number for other ways to spread the heat, where it is the same for all cases. */
function steadyByFraction(cases: readonly CaseResult[]): HTMLElement[] {
  const lists = cases.map(({ steadyByFraction: entries }) =>
    entries.map(({ fraction, temperature }) => `f = ${fractionText(fraction)}: ${fixed(temperature, 1)}${nbsp}K`),
  );
  const [first, ...others] = lists;
  if (!first?.length || others.some((other) => other.join() !== first.join())) return [];
  const entries = first.map((text) => element('li', {}, text));
  return [element('p', {}, 'The textbook value for other absorbing fractions:'), element('ul', {}, ...entries)];
}

function fractionText(fraction: number): string {
  const known: readonly (readonly [number, string])[] = [
    [1 / 4, '¼'],
    [1 / 2, '½'],
    [2 / 3, '⅔'],
    [1, '1'],
  ];
  return known.find(([value]) => Math.abs(value - fraction) < 1e-12)?.[1] ?? fixed(fraction, 3);
}
