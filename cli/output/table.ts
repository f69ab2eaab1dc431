/** The table of `run`: the cases side by side, or one below the other where there are many; then why cells are empty. */
import type { RunResult } from '../../sim/run.ts';
import { type Column, columnsOf } from './columns.ts';
import { type Grid, panels, transposed } from './grid.ts';
import { orbitText, rowsOf } from './quantities.ts';
import type { Cell, Row } from './row.ts';
import type { Terminal } from './terminal.ts';
import { hanging, wrap } from './text.ts';

/** With more of them, the cases stand one below the other. */
const mostPanels = 2;

/** Lines that fit the terminal, from 40 columns up. `fractions` adds the textbook values for other absorbing fractions. */
export function tableLines(result: RunResult, terminal: Terminal, fractions: boolean): string[] {
  const columns = columnsOf(result);
  const { grid, reasons } = gridOf(columns, rowsOf(columns, fractions), terminal);
  const across = panels(grid, terminal);
  const body = across.length > mostPanels ? panels(transposed(grid), terminal) : across;
  return [
    ...headLines(result, columns, terminal),
    '',
    ...body.flatMap((panel, index) => (index === 0 ? panel : ['', ...panel])),
    ...reasonLines(reasons, terminal),
  ];
}

function headLines({ scenario }: RunResult, columns: readonly Column[], terminal: Terminal): string[] {
  const title = wrap(terminal.say(scenario.title ?? scenario.file), terminal.width);
  const orbit = wrap(terminal.say(orbitText(columns)), terminal.width).filter((line) => line !== '');
  return [...title.map((line) => terminal.paint('bold', line)), ...orbit.map((line) => terminal.paint('dim', line))];
}

/** The table as text; a number that does not exist is a mark for its reason. */
function gridOf(
  columns: readonly Column[],
  rows: readonly Row[],
  terminal: Terminal,
): { grid: Grid; reasons: string[] } {
  const reasons: string[] = [];
  const textOf = (cell: Cell): string => {
    if (cell === null) return '';
    if ('text' in cell) return terminal.say(cell.text);
    if (!reasons.includes(cell.reason)) reasons.push(cell.reason);
    return `${terminal.say('—')} [${reasons.indexOf(cell.reason) + 1}]`;
  };
  const grid = {
    headings: columns.map(({ heading }) => terminal.say(heading)),
    rows: rows.map(({ section, label, alone }) => {
      return { section: terminal.say(section), label: terminal.say(label), alone: terminal.say(alone) };
    }),
    cells: rows.map(({ cell }) => columns.map((column) => textOf(cell(column)))),
  };
  return { grid, reasons };
}

function reasonLines(reasons: readonly string[], terminal: Terminal): string[] {
  const lines = reasons.flatMap((reason, index) => hanging(`[${index + 1}] `, terminal.say(reason), terminal.width));
  return lines.map((line) => terminal.paint('dim', line));
}
