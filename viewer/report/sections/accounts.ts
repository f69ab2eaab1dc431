/** Table 2: the two accounts that every run must keep. */

import type { CaseResult, RunResult } from '../../../sim/run.ts';
import type { Column } from '../../words/columns.ts';
import { fixed, significant, unitText } from '../../words/number.ts';
import { columnHead } from '../columnHead.ts';
import { dataTable } from '../dataTable.ts';
import { type Child, element } from '../element.ts';

interface Account {
  readonly label: string;
  readonly show: (oneCase: CaseResult, column: Column) => Child;
}

const inFlux = `, ${unitText('W/m2')}`;

/** To the milliwatt; a smaller one, which should vanish, in full. */
function flux(value: number): string {
  const isSmall = Math.abs(value) < 5e-4;
  return isSmall ? significant(value, 1) : fixed(value, 3);
}

const relative = (value: number): string => (value === 0 ? '0' : significant(value, 1));
const verdict = (kept: boolean): Child =>
  element('b', { class: kept ? 'kept' : 'missed' }, kept ? '✓ kept' : '✗ not kept');

const accounts: readonly Account[] = [
  {
    label: `Orbit-mean instellation, by quadrature${inFlux}`,
    show: ({ checks }) => flux(checks.orbitMeanInstellation.computed),
  },
  { label: `The same in closed form${inFlux}`, show: ({ checks }) => flux(checks.orbitMeanInstellation.closedForm) },
  { label: 'Relative difference', show: ({ checks }) => relative(checks.orbitMeanInstellation.relativeDifference) },
  { label: 'First account', show: ({ checks }) => verdict(checks.orbitMeanInstellation.passed) },
  { label: `Absorbed, mean${inFlux}`, show: (_, { state }) => flux(state.energyBalance.absorbed) },
  { label: `From inside${inFlux}`, show: (_, { state }) => flux(state.energyBalance.internalHeat) },
  { label: `Emitted, mean${inFlux}`, show: (_, { state }) => flux(state.energyBalance.emitted) },
  { label: `Change of stored heat, mean${inFlux}`, show: (_, { state }) => flux(state.energyBalance.stored) },
  {
    label: 'What is missing, relative to absorbed',
    show: (_, { state }) => relative(state.energyBalance.relativeDifference),
  },
  {
    label: 'Second account',
    show: ({ accountLimit }, { state }) => verdict(Math.abs(state.energyBalance.relativeDifference) <= accountLimit),
  },
  { label: 'Limit for both', show: ({ accountLimit }) => relative(accountLimit) },
  { label: 'Relative temperature error, at most', show: (_, { state }) => significant(state.errorEstimate, 2) },
];

export function accountsSection(result: RunResult, columns: readonly Column[]): HTMLElement {
  const table = dataTable({
    caption: [element('b', {}, 'Table 2. '), 'Two accounts, both by a quadrature that the solver did not use.'],
    label: 'The two accounts',
    corner: 'Account',
    columns: columns.map((column) => ({ head: columnHead(column) })),
    rows: accounts.map(({ label, show }) => ({
      head: [label],
      cells: columns.map((column) => [show(result.cases[column.caseIndex]!, column)]),
    })),
  });
  const note = element(
    'aside',
    {},
    element('p', {}, 'The first tests what arrives from the star, the second that no heat was made or lost.'),
  );
  return element('section', { class: 'grid' }, element('h2', {}, 'The two accounts'), table, note);
}
