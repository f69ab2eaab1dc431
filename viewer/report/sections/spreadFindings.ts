/** Table 1 of a spread: the findings with their intervals; all of them on request. */
import type { SpreadReport } from '../../../sim/studies/spread/spreadReport.ts';
import type { Cell } from '../../words/cells.ts';
import { keptPercents } from '../../words/number.ts';
import { periodsText } from '../../words/spreadNumber.ts';
import { type FindingGroup, findingColumns, findingTables } from '../../words/spreadTable.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element, userText } from '../element.ts';
import { groupedTable } from '../groupedTable.ts';
import { caseSample } from '../lineSample.ts';

export function spreadFindingsSection(report: SpreadReport): HTMLElement {
  const { chief, sections } = findingTables(report);
  const several = report.cases.length > 1;
  const caption = [
    element('b', {}, 'Table 1. '),
    keptPercents('The chief findings: mean, median, and the intervals that hold 68 % and 95 % of the draws.'),
  ];
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'The findings'),
    element(
      'div',
      { class: 'tables' },
      findingsTable(chief, several, caption, 'The chief findings'),
      everyFinding(sections, several),
    ),
    notes(report),
  );
}

/** Cases under each finding; a single case needs no such line. */
function findingsTable(
  groups: readonly FindingGroup[],
  several: boolean,
  caption: readonly Child[],
  label: string,
): HTMLElement {
  const table = { caption, label, columns: findingColumns.map((name) => ({ head: [name] })) };
  if (!several) {
    const rows = groups.flatMap((group) =>
      group.rows.map(({ cells }) => ({ head: [userText(group.label)], cells: cells.map(content) })),
    );
    return dataTable({ ...table, corner: 'Finding', rows });
  }
  return groupedTable({
    ...table,
    corner: 'Finding, case',
    groups: groups.map((group) => ({
      head: [userText(group.label)],
      rows: group.rows.map(({ caseIndex, caseName, cells }) => ({
        head: [caseSample(caseIndex), ' ', userText(caseName)],
        cells: cells.map(content),
      })),
    })),
  });
}

function everyFinding(sections: ReturnType<typeof findingTables>['sections'], several: boolean): HTMLElement {
  const tables = sections.map(({ title, groups }) => findingsTable(groups, several, [element('b', {}, title)], title));
  const made = element(
    'details',
    {},
    element('summary', {}, 'Every finding'),
    element('div', { class: 'tables' }, ...tables),
  );
  addEventListener('beforeprint', () => made.setAttribute('open', ''));
  return made;
}

export function content({ text, detail, reason }: Cell): Child[] {
  return [
    text,
    detail === undefined ? null : element('small', { class: 'detail' }, detail),
    reason === undefined ? null : element('small', { class: 'reason' }, reason),
  ];
}

function notes({ cases }: SpreadReport): HTMLElement {
  const period = periodsText(cases);
  return element(
    'aside',
    {},
    element(
      'p',
      {},
      'The intervals say where a number lies if the stated spreads of the inputs are right. What the model leaves out is in none of them.',
    ),
    element(
      'p',
      {},
      '“Centre” is what a plain run gives, every input at its central value. It need not be the median.',
    ),
    period === null
      ? null
      : element(
          'p',
          {},
          `Times that come round with the orbit are counted in the median orbit, ${period}. Below 0 is before periapsis, at the end of the turn before.`,
        ),
  );
}
