/** What `grid` shows of each case: how far the chief findings go over the grid, and where. */
import { formatNumber, inUnit } from '../../sim/quantity/index.ts';
import type { GridAxis, GridCase, GridFinding, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { type Grid, panels } from './grid.ts';
import { extremesOf } from './gridFiles.ts';
import type { Terminal } from './terminal.ts';
import { hanging, wrap } from './text.ts';

/** Shown where a case has them, or all where few were asked for; the files have all. */
const chief = [
  'temperatureMax',
  'temperatureMean',
  'temperatureMin',
  'hottestTemperature',
  'coldestTemperature',
  'lagOfMax',
  'damping',
  'iceFractionMean',
];
const few = 8;

/** Lines that fit the terminal, from 40 columns up. */
export function gridLines({ scenario, axes, hold, cases, notes }: GridReport, terminal: Terminal): string[] {
  const title = wrap(terminal.say(scenario.title ?? scenario.file), terminal.width);
  const over = axes.map(axisText).join('; ');
  const held = hold === null ? '' : `; ${hold} held`;
  return [
    ...title.map((line) => terminal.paint('bold', line)),
    ...wrap(terminal.say(`over ${over}${held}`), terminal.width).map((line) => terminal.paint('dim', line)),
    ...cases.flatMap((one) => ['', ...caseLines(one, axes, terminal)]),
    ...(notes.length > 0 ? [''] : []),
    ...notes.flatMap((text) => hanging('note      ', terminal.say(text), terminal.width)),
  ];
}

function axisText({ key, unit, log, nodes }: GridAxis): string {
  const range = `${formatNumber(nodes[0]!)} to ${formatNumber(nodes.at(-1)!)}`;
  return `${key} ${range}${unit === '1' ? '' : ` ${unit}`}${log ? ' log' : ''}, ${nodes.length} values`;
}

function caseLines(one: GridCase, axes: readonly GridAxis[], terminal: Terminal): string[] {
  const shown = one.findings.length <= few ? one.findings : one.findings.filter(({ name }) => chief.includes(name));
  const [least, greatest] = endColumns(shown, axes, terminal);
  const together = panels(sideBySide(least, greatest), terminal);
  // A value and its place stay together where all do not fit.
  const shownPanels = together.length === 1 ? together : [least, greatest].flatMap((end) => panels(end, terminal));
  const name = wrap(terminal.say(`${one.name} (${one.model})`), terminal.width);
  return [
    ...name.map((line) => terminal.paint('bold', line)),
    ...shownPanels.flatMap((panel, index) => (index === 0 ? panel : ['', ...panel])),
    ...failedLines(one, terminal),
    ...one.warnings.flatMap((text) => hanging('warning   ', terminal.say(text), terminal.width)),
    ...one.notes.flatMap((text) => hanging('note      ', terminal.say(text), terminal.width)),
  ];
}

/** Lowest values with their places, and highest. */
function endColumns(shown: readonly GridFinding[], axes: readonly GridAxis[], terminal: Terminal): [Grid, Grid] {
  const at = terminal.say(`at ${axes.map(({ key }) => key.split('.').at(-1)).join(', ')}`);
  const rows = shown.map((finding) => {
    const label = terminal.say(labelOf(finding));
    return { section: label, label: '', alone: label };
  });
  const cellsOf = (which: 'least' | 'greatest') =>
    shown.map((finding) => {
      const end = extremesOf(finding, axes)[which];
      if (end === null) return ['—', ''];
      return [valueText(finding, end.value), end.at.map((value) => formatNumber(value, 4)).join(', ')];
    });
  return [
    { headings: ['least', at], rows, cells: cellsOf('least') },
    { headings: ['greatest', at], rows, cells: cellsOf('greatest') },
  ];
}

function sideBySide(left: Grid, right: Grid): Grid {
  return {
    headings: [...left.headings, ...right.headings],
    rows: left.rows,
    cells: left.cells.map((row, index) => [...row, ...right.cells[index]!]),
  };
}

function failedLines({ failed, findings }: GridCase, terminal: Terminal): string[] {
  if (failed.length === 0) return [];
  const nodes = findings[0]?.values.length ?? 0;
  const messages = [...new Set(failed.map(({ message }) => message))];
  const text = `${failed.length} of ${nodes} nodes have no world that can be computed: ${messages[0]}`;
  return hanging('note      ', terminal.say(messages.length > 1 ? `${text}; and other reasons` : text), terminal.width);
}

function labelOf({ label, unit }: GridFinding): string {
  return unit === '1' ? label : `${label}, ${unit === 's' ? 'd' : unit}`;
}

function valueText({ unit }: GridFinding, value: number): string {
  return formatNumber(unit === 's' ? inUnit(value, 'd') : value, 5);
}
