/** The table of cases: the numbers that people quote, each beside the steady value. Same rows as on the terminal. Pure. */
import type { Window } from '../../sim/world.ts';
import { type Cell, type TableRow, temperature, time, without } from './cells.ts';
import { type Column, commonTimeUnit, finding, findingValue, periodOf } from './columns.ts';
import { hasLatitude } from './latitude.ts';
import { latitudeRows, latitudeWindowRows } from './latitudeRows.ts';
import { percent, significant, type TimeUnit, withUnit } from './number.ts';

export function caseTable(columns: readonly Column[]): TableRow[] {
  const unit = commonTimeUnit(columns);
  const ofMean = columns.some(hasLatitude) ? ', area mean' : '';
  const row = (label: string, cell: (column: Column) => Cell): TableRow => ({ label, cells: columns.map(cell) });
  return [
    row('Textbook equilibrium temperature', (column) => temperature(column, 'equilibriumTemperature')),
    row(`Mean temperature${ofMean}`, (column) => besideSteady(column, 'temperatureMean', 'steadyTemperatureMean')),
    row(`Maximum temperature${ofMean}`, (column) => besideSteady(column, 'temperatureMax', 'steadyTemperatureMax')),
    row(`Minimum temperature${ofMean}`, (column) => besideSteady(column, 'temperatureMin', 'steadyTemperatureMin')),
    ...timeOfMaxRows(columns, unit, ofMean),
    row('Lag of the maximum behind the steady maximum', (column) => time(column, 'lagOfMax', unit)),
    row('Damping: swing over steady swing', (column) => ratio(column, 'damping', 1)),
    row('Radiative time constant, in orbits', (column) => ratio(column, 'radiativeTimeConstant', periodOf(column))),
    ...groundRows(columns, unit),
    ...latitudeRows(columns, unit),
    ...windowsOf(columns).map((window) => row(shareLabel(window, ofMean), (column) => share(column, window.name))),
    ...latitudeWindowRows(columns, unit),
    ...meanWindows(columns).map(({ name }) =>
      row(`Orbit-mean instellation in “${name}”`, (column) => meanInside(column, name)),
    ),
    ...(hasSeveralStates(columns) || columns.some(hasLatitude)
      ? [row('Stability margin (0: tips over, below 0: unstable)', margin)]
      : []),
  ];
}

/** Each cell with what stood there before, where a reader has moved the case and that changed it. */
export function withBefore(
  rows: readonly TableRow[],
  columns: readonly Column[],
  originals: readonly Column[],
): readonly TableRow[] {
  const befores = columns.map((column) =>
    originals.findIndex((one) => one.caseName === column.caseName && one.stateIndex === column.stateIndex),
  );
  if (befores.every((at, i) => at < 0 || originals[at]!.state === columns[i]!.state)) return rows;
  const before = new Map(caseTable(originals).map(({ label, cells }) => [label, cells]));
  return rows.map(({ label, cells }) => ({
    label,
    cells: cells.map((cell, i) => {
      const was = before.get(label)?.[befores[i]!]?.text;
      return was === undefined || was === cell.text ? cell : { ...cell, was };
    }),
  }));
}

/** True where every column has the same steady values, so that one column can show them for all. */
export function steadyIsShared(rows: readonly TableRow[]): boolean {
  return rows.every(({ cells }) => cells.every(({ steady }) => steady === cells[0]!.steady));
}

function besideSteady(column: Column, name: string, steadyName: string): Cell {
  const steady = findingValue(column, steadyName);
  const cell = temperature(column, name);
  return steady === null ? cell : { ...cell, steady: temperature(column, steadyName).text };
}

function ratio(column: Column, name: string, divisor: number): Cell {
  const found = finding(column, name);
  if (found === undefined || found.value === null) return without(found);
  return { text: significant(found.value / divisor, 3) };
}

/** Real ground beside the one store that stands for it: only where some case has ground. */
function groundRows(columns: readonly Column[], unit: TimeUnit): TableRow[] {
  const rows: readonly (readonly [label: string, half: string, lumped: string, divisor: number, symbol: string])[] = [
    ['Damping', 'halfSpaceDamping', 'lumpedDamping', 1, '1'],
    ['Lag', 'halfSpaceLag', 'lumpedLag', unit.seconds, unit.symbol],
  ];
  return rows
    .flatMap(([label, half, lumped, divisor, symbol]) => [
      groundRow(columns, `${label} of a small swing, half-space ground`, half, divisor, symbol),
      groundRow(columns, `${label} of a small swing, this one lumped store`, lumped, divisor, symbol),
    ])
    .filter(({ cells }) => cells.some(({ text }) => text !== '—'));
}

function groundRow(columns: readonly Column[], label: string, name: string, divisor: number, symbol: string): TableRow {
  const cells = columns.map(({ derived }) => {
    const found = derived.filter(({ key }) => key.endsWith(`.ground.${name}`));
    return { text: found.map(({ value }) => withUnit(significant(value / divisor, 3), symbol)).join(', ') || '—' };
  });
  return { label, cells };
}

function share(column: Column, name: string): Cell {
  const found = finding(column, `fractionInWindow.${name}`);
  if (found === undefined) return { text: '—', reason: 'this case has no such window' };
  return found.value === null ? without(found) : { text: percent(found.value) };
}

function meanInside(column: Column, name: string): Cell {
  const found = finding(column, `orbitMeanInWindow.${name}`);
  if (found === undefined || found.value === null) return without(found);
  return { text: found.value === 1 ? 'yes' : 'no' };
}

function margin(column: Column): Cell {
  const { stabilityMargin } = column.state;
  const isTelling = column.stateName !== null || hasLatitude(column);
  if (!isTelling || stabilityMargin === null) return { text: '—', reason: 'one state only' };
  return { text: significant(stabilityMargin, 3) };
}

function windowsOf(columns: readonly Column[]): Window[] {
  return [...new Map(columns.flatMap(({ windows }) => windows.map((window) => [window.name, window]))).values()];
}

function meanWindows(columns: readonly Column[]): Window[] {
  return windowsOf(columns).filter(({ name }) =>
    columns.some((column) => finding(column, `orbitMeanInWindow.${name}`)),
  );
}

/** The instellation of a moment is not what a climate feels: the row says that it is meant. */
function shareLabel({ name, of }: Window, ofMean: string): string {
  return `Share of time in “${name}”${of === 'instellation' ? ' (instantaneous)' : ofMean}`;
}

/** Periodic states count from periapsis, runs from their start: a row for each that occurs. */
function timeOfMaxRows(columns: readonly Column[], unit: TimeUnit, ofMean: string): TableRow[] {
  const origins = [...new Set(columns.map(({ isForwardRun }) => isForwardRun))].toSorted();
  return origins.map((forward) => ({
    label: `Maximum comes${ofMean}, after ${forward ? 'the start' : 'periapsis'}`,
    cells: columns.map((column) => (column.isForwardRun === forward ? time(column, 'timeOfMax', unit) : { text: '—' })),
  }));
}

function hasSeveralStates(columns: readonly Column[]): boolean {
  return columns.some(({ stateName }) => stateName !== null);
}
