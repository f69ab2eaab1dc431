/** Figure: temperature of runs forward from a start, over all their orbits. Pure. */
import type { Seconds } from '../../sim/si.ts';
import { answerFor } from '../words/answer.ts';
import { type Column, columnName, periodOf } from '../words/columns.ts';
import { timeUnit } from '../words/number.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { wholeSpan } from './orbitSpan.ts';
import { type Moment, temperatureFigure } from './temperatureChart.ts';
import { values } from './variables.ts';

/** Columns of forward runs only; at least one. */
export function temperatureAfterStart(columns: readonly Column[], style: FigureStyle): Figure {
  const lines = columns.map((column) => ({ column, span: wholeSpan(column.dataset) }));
  const to = Math.max(...columns.map(lastTime));
  const unit = timeUnit(to);
  return temperatureFigure(
    {
      lines,
      from: 0,
      to,
      unit,
      timeTitle: `Time after the start (${unit.symbol})`,
      moments: periapsides(columns),
      zeroDate: null,
      style,
    },
    {
      name: 'temperature-after-the-start',
      title: 'Temperature after the start',
      textAlternative: columns.map((column) => `${columnName(column)}: ${answerFor(column, unit)}`).join(' '),
      caption:
        'A run forward from a given start, not a periodic state. Solid: the temperature with its heat store. Dashed: the steady value, what a surface without heat store would have at that moment.',
    },
  );
}

/** Every periapsis, found from the mean anomaly of the start, where all runs start at the same point of the same orbit. */
function periapsides(columns: readonly Column[]): readonly Moment[] {
  const starts = columns.map((column) => values(column.dataset, 'meanAnomaly')[0]! / (2 * Math.PI));
  const periods = columns.map(periodOf);
  if (!allEqual(starts) || !allEqual(periods)) return [];
  const [share, period] = [starts[0]!, periods[0]!];
  const first = share === 0 ? 0 : (1 - share) * period;
  const count = Math.floor((lastTime(columns[0]!) - first) / period) + 1;
  return Array.from({ length: Math.min(count, mostMarks) }, (_, orbit) => mark(first + orbit * period, orbit));
}

/** More would be a grey wall. */
const mostMarks = 60;

function mark(at: Seconds, orbit: number): Moment {
  return { at, label: orbit === 0 ? 'periapsis' : '', strong: orbit === 0 };
}

function lastTime(column: Column): Seconds {
  return values(column.dataset, 'time').at(-1)!;
}

function allEqual(numbers: readonly number[]): boolean {
  return numbers.every((number) => Math.abs(number - numbers[0]!) <= 1e-9 * Math.abs(numbers[0]!));
}
