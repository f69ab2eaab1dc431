/** The inputs of a spread as they were drawn, those that were not, and the draws that failed. */
import type { SpreadReport } from '../../../sim/studies/spread/spreadReport.ts';
import { list } from '../../words/number.ts';
import { drawsText, failedRows } from '../../words/spreadDraws.ts';
import { drawnColumns, drawnRows, type IdleRow, idleRows } from '../../words/spreadInputs.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element, userText } from '../element.ts';
import { caseSample } from '../lineSample.ts';
import { content } from './spreadFindings.ts';

export function spreadInputsSection(report: SpreadReport): HTMLElement {
  const rows = drawnRows(report);
  const idle = idleRows(report);
  const table = dataTable({
    caption: [element('b', {}, 'Table 2. '), 'The uncertain inputs as they were drawn.'],
    label: 'The uncertain inputs as drawn',
    corner: 'Input',
    columns: drawnColumns(report).map((name) => ({ head: [name] })),
    rows: rows.map(({ key, label, symbol, caseNames, cells }) => ({
      head: [...keyed(label, key, caseNames === null ? null : list(caseNames)), unitNote(symbol)],
      cells: cells.map((cell, at) => (at === 0 ? [userText(cell.text)] : content(cell))),
    })),
  });
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'Inputs as drawn'),
    element(
      'div',
      { class: 'tables' },
      rows.length > 0 ? table : element('p', { class: 'words' }, 'No input was drawn.'),
      idle.length > 0 ? idleTable(idle) : null,
    ),
    element(
      'aside',
      {},
      element(
        'p',
        {},
        'Centre is what a plain run uses. Cut away is the share of the stated spread that lies beyond what is physical.',
      ),
      element('p', {}, 'Inputs without a spread are fixed; the report of a plain run lists them.'),
    ),
  );
}

function idleTable(rows: readonly IdleRow[]): HTMLElement {
  return dataTable({
    caption: ['With a spread, but not drawn.'],
    label: 'Inputs with a spread that were not drawn',
    corner: 'Input',
    columns: [{ head: ['Why'] }],
    rows: rows.map(({ key, label, reason }) => ({
      head: keyed(label, key, null),
      cells: [[element('span', { class: 'reason' }, reason)]],
    })),
  });
}

function keyed(label: string, key: string, caseNames: string | null): Child[] {
  return [
    userText(label),
    element('small', {}, element('code', {}, key)),
    caseNames === null ? null : element('small', { class: 'tag' }, 'only ', userText(caseNames)),
  ];
}

function unitNote(symbol: string): Child {
  return symbol === '' ? null : element('small', {}, `in ${symbol}`);
}

export function drawsSection(report: SpreadReport): HTMLElement {
  const failed = failedRows(report);
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'The draws'),
    element(
      'div',
      { class: 'tables' },
      element('p', { class: 'words' }, drawsText(report)),
      failed.length > 0
        ? dataTable({
            caption: ['Draws that could not be computed, or not within the tolerance.'],
            label: 'Failed draws',
            corner: 'Case',
            columns: [{ head: ['Failed'] }, { head: ['Share'] }],
            rows: failed.map(({ caseIndex, name, count, share }) => ({
              head: [caseSample(caseIndex), ' ', userText(name)],
              cells: [[count], [share]],
            })),
          })
        : null,
    ),
  );
}
