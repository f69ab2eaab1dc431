/** The curves of the small plot: each state's temperature, and each steady value that differs. */
import { type Curve, valueAt } from './canvas.ts';
import { type Column, isForward, periodOf, timeUnitFor } from './columns.ts';

const letters = 'abcdefgh';
const colours = ['cyan', 'yellow', 'magenta', 'green', 'blue'] as const;

/** A curve with its name and colour; an empty name is not shown. */
export interface Line extends Curve {
  readonly name: string;
  readonly colour: (typeof colours)[number] | 'dim';
}

export interface Abscissa {
  readonly label: string;
  /** Seconds per unit of the axis, for one column. */
  readonly unitOf: (column: Column) => number;
}

/** Time where all orbits are equally long, else orbits; runs from a start count orbits. */
export function abscissaOf(columns: readonly Column[]): Abscissa {
  const [first, ...rest] = columns.map(periodOf);
  const same = rest.every((period) => Math.abs(period / first! - 1) < 1e-9);
  if (isForward(columns[0]!.state)) return { label: 'orbits after the start', unitOf: periodOf };
  if (!same) return { label: 'orbits after periapsis', unitOf: periodOf };
  const { plural, seconds } = timeUnitFor(first!);
  return { label: `${plural} after periapsis`, unitOf: () => seconds };
}

/** Steady values first, the temperatures before them. */
export function linesOf(columns: readonly Column[], { unitOf }: Abscissa, lettered: boolean): readonly Line[] {
  const single = columns.length === 1;
  const temperatures = columns.map((column, index): Line => {
    const mark = single ? '*' : letters[index % letters.length]!;
    const name = lettered && !single ? `${mark} ${column.heading}` : column.heading;
    const colour = colours[index % colours.length]!;
    return { ...curveOf(column, 'temperature', unitOf(column)), dotted: false, mark, name, colour };
  });
  const steady: Line[] = [];
  for (const column of columns) {
    const curve = curveOf(column, 'steadyTemperature', unitOf(column));
    if (steady.some((other) => isSame(other, curve))) continue;
    steady.push({ ...curve, dotted: true, mark: '.', name: steady.length === 0 ? 'steady value' : '', colour: 'dim' });
  }
  return [...steady, ...temperatures];
}

/** A variable against time; of a periodic state half an orbit to either side of periapsis. */
function curveOf(column: Column, name: 'temperature' | 'steadyTemperature', unit: number): Pick<Curve, 'x' | 'y'> {
  const { variables } = column.state.dataset;
  const [time, y] = [variables.time!.data, variables[name]!.data];
  return isForward(column.state)
    ? { x: time.map((t) => t / unit), y }
    : aroundPeriapsis(time, y, periodOf(column), unit);
}

function aroundPeriapsis(time: Float64Array, y: Float64Array, period: number, unit: number): Pick<Curve, 'x' | 'y'> {
  const [from, to] = [-period / (2 * unit), period / (2 * unit)];
  const twice = [...Array.from(time, (t) => (t - period) / unit), ...Array.from(time, (t) => t / unit)];
  const values = { x: twice, y: [...y, ...y] };
  const inside = twice.map((_, index) => index).filter((index) => twice[index]! > from && twice[index]! < to);
  return {
    x: [from, ...inside.map((index) => twice[index]!), to],
    y: [valueAt(values, from), ...inside.map((index) => values.y[index]!), valueAt(values, to)],
  };
}

/** To a hundredth of a kelvin, at the same times. */
function isSame(one: Pick<Curve, 'x' | 'y'>, other: Pick<Curve, 'x' | 'y'>): boolean {
  if (one.x.length !== other.x.length) return false;
  return Array.from(one.y).every((y, index) => Math.abs(y - other.y[index]!) < 0.01 && one.x[index] === other.x[index]);
}
