/** The small plot under the table: temperature and steady value over the orbit, periapsis in the middle. */
import type { RunResult } from '../../sim/run.ts';
import { type RowScale, rowScale, ticks, tickText } from './axis.ts';
import { type Canvas, type DrawnCell, draw } from './canvas.ts';
import { type Column, columnsOf, isForward } from './columns.ts';
import { abscissaOf, type Line, linesOf } from './orbitCurves.ts';
import type { Terminal } from './terminal.ts';
import { padEnd, padStart, textWidth, wrap } from './text.ts';

const mostCurves = 5;
const widestPlot = 110;
/** Below this width the names stand under the plot. */
const narrowWidth = 60;
const mostRows = { narrow: 9, wide: 13 } as const;
const widestName = 18;

/** One plot of the periodic states and one of the runs from a start, whichever there are. */
export function plotLines(result: RunResult, terminal: Terminal): string[] {
  const columns = columnsOf(result);
  const kinds = [columns.filter(({ state }) => !isForward(state)), columns.filter(({ state }) => isForward(state))];
  const plots = kinds.filter((kind) => kind.length > 0).map((kind) => onePlot(kind, terminal));
  return plots.flatMap((plot, index) => (index === 0 ? plot : ['', ...plot]));
}

function onePlot(columns: readonly Column[], terminal: Terminal): string[] {
  const shown = columns.slice(0, mostCurves);
  const abscissa = abscissaOf(shown);
  const isWide = terminal.width >= narrowWidth;
  const braille = terminal.unicode && (isWide || terminal.colour || shown.length === 1);
  const lines = linesOf(shown, abscissa, !braille).map((line) => ({ ...line, name: terminal.say(line.name) }));
  const scale = rowScale(...rangeOf(lines.map(({ y }) => y)), isWide ? mostRows.wide : mostRows.narrow);
  const named = lines.filter(({ name }) => name !== '');
  const namesBeside = isWide && named.length <= scale.rows;
  const layout = layoutOf(lines, scale, namesBeside ? nameWidth(named) + 1 : 0, braille, terminal);
  return [
    ...wrap(headingText(braille), terminal.width).map((line) => terminal.paint('dim', line)),
    ...bodyLines(lines, layout, !isForward(shown[0]!.state), terminal),
    ...horizontalAxis(layout, terminal),
    terminal.paint('dim', centred(abscissa.label, layout)),
    ...(namesBeside || shown.length === 1 ? [] : namesBeneath(named, terminal)),
    ...wrap(remainder(columns.length - shown.length), terminal.width).filter((line) => line !== ''),
  ];
}

function headingText(braille: boolean): string {
  return braille
    ? 'temperature (solid) and steady value (dotted), K'
    : 'temperature (letters) and steady value (dots), K';
}

function remainder(missing: number): string {
  return missing === 0 ? '' : `${missing} more in the report.`;
}

/** Where everything stands. */
export interface Layout {
  readonly canvas: Canvas;
  /** Text left of the axis, a row each. */
  readonly values: readonly string[];
  /** Columns left of the drawing, the axis included. */
  readonly margin: number;
  /** Columns right of the drawing. */
  readonly names: number;
}

export function layoutOf(
  lines: readonly Line[],
  scale: RowScale,
  names: number,
  braille: boolean,
  terminal: Terminal,
): Layout {
  const { lowest, step, rows } = scale;
  const values = Array.from({ length: rows }, (_, fromTop) => {
    const value = lowest + (rows - 1 - fromTop) * step;
    return Math.round(value / step) % 2 === 0 ? tickText(value, 2 * step) : '';
  });
  const margin = Math.max(...values.map(textWidth)) + 2;
  const columns = Math.min(terminal.width, widestPlot) - margin - names;
  const y = [lowest - step / 2, lowest + (rows - 0.5) * step] as const;
  return { canvas: { columns, rows, x: rangeOf(lines.map((line) => line.x)), y, braille }, values, margin, names };
}

export function bodyLines(lines: readonly Line[], layout: Layout, marksZero: boolean, terminal: Terminal): string[] {
  const { canvas, values, margin, names } = layout;
  const [left, right] = canvas.x;
  const zero = marksZero ? Math.floor((-left / (right - left)) * canvas.columns) : -1;
  const ends = names === 0 ? new Map<number, Line>() : endNames(lines, canvas);
  return draw(lines, canvas).map((cells, row) => {
    const text = values[row]!;
    const axis = terminal.unicode ? (text === '' ? '│' : '┤') : text === '' ? '|' : '+';
    const end = ends.get(row);
    const name = end === undefined ? '' : ` ${terminal.paint(end.colour, shortened(end.name, names - 1, terminal))}`;
    return `${padStart(text, margin - 1)}${axis}${drawnText(cells, zero, lines, terminal)}${name}`.trimEnd();
  });
}

/** Cells as text, a colour for each stretch of one curve; the line of periapsis shows through. */
function drawnText(cells: readonly DrawnCell[], zero: number, lines: readonly Line[], terminal: Terminal): string {
  let text = '';
  for (let from = 0, to = 1; from < cells.length; from = to++) {
    const { curve } = cells[from]!;
    while (to < cells.length && cells[to]!.curve === curve && (curve >= 0 || (to !== zero && from !== zero))) to++;
    const stretch = cells.slice(from, to).map((cell) => cell.text);
    if (curve >= 0) text += terminal.paint(lines[curve]!.colour, stretch.join(''));
    else text += from === zero ? terminal.paint('dim', terminal.unicode ? '┊' : ':') : stretch.join('');
  }
  return text;
}

/** Names by row, at the right ends of their curves, moved apart where they would meet. */
function endNames(lines: readonly Line[], { rows, y: [bottom, top] }: Canvas): ReadonlyMap<number, Line> {
  const rowOf = ({ y }: Line) => Math.min(rows - 1, Math.floor(((top - y[y.length - 1]!) / (top - bottom)) * rows));
  const named = lines.filter(({ name }) => name !== '').toSorted((a, b) => rowOf(a) - rowOf(b));
  const placed = new Map<number, Line>();
  let next = 0;
  for (const [index, line] of named.entries()) {
    const row = Math.max(next, Math.min(rowOf(line), rows - named.length + index));
    placed.set(row, line);
    next = row + 1;
  }
  return placed;
}

function nameWidth(lines: readonly Line[]): number {
  return Math.min(widestName, Math.max(...lines.map(({ name }) => textWidth(name))));
}

/** The middle left out: names of cases often differ at their ends. */
function shortened(name: string, width: number, terminal: Terminal): string {
  if (textWidth(name) <= width) return name;
  const letters = [...name];
  const head = letters.slice(0, Math.floor((width - 1) / 3));
  let tail = letters.length;
  while (textWidth([...head, ...letters.slice(tail - 1)].join('')) + 1 <= width) tail--;
  return head.join('') + (terminal.unicode ? '…' : '~') + letters.slice(tail).join('');
}

export function horizontalAxis({ canvas: { columns, x }, margin }: Layout, terminal: Terminal): string[] {
  const [left, right] = x;
  const values = ticks(left, right, Math.floor(columns / 10));
  const step = values.length > 1 ? values[1]! - values[0]! : right - left;
  const [line, tick, corner] = terminal.unicode ? ['─', '┴', '└'] : ['-', '+', '+'];
  const axis = Array<string>(columns).fill(line);
  let texts = '';
  for (const value of values) {
    const column = Math.min(columns - 1, Math.floor(((value - left) / (right - left)) * columns));
    const text = tickText(value, step);
    const start = margin + column - Math.floor(text.length / 2);
    if (start <= texts.length || start + text.length > margin + columns) continue;
    axis[column] = tick;
    texts = padEnd(texts, start) + text;
  }
  return [`${' '.repeat(margin - 1)}${corner}${axis.join('')}`, texts];
}

export function centred(text: string, { canvas, margin }: Layout): string {
  return ' '.repeat(Math.max(0, margin + Math.floor((canvas.columns - textWidth(text)) / 2))) + text;
}

/** Each in its colour or with its letter; the heading tells of the steady value. */
function namesBeneath(lines: readonly Line[], terminal: Terminal): string[] {
  const temperatures = lines.filter(({ dotted }) => !dotted);
  return temperatures.flatMap(({ name, colour }) =>
    wrap(name, terminal.width).map((text) => terminal.paint(colour, text)),
  );
}

function rangeOf(series: readonly ArrayLike<number>[]): readonly [number, number] {
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const values of series) {
    for (let at = 0; at < values.length; at++) {
      low = Math.min(low, values[at]!);
      high = Math.max(high, values[at]!);
    }
  }
  return [low, high];
}
