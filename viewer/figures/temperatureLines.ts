/** The lines of a temperature chart: every state, its steady value, the textbook's one number. Pure. */
import { type Column, columnName, findingValue } from '../words/columns.ts';
import { kelvin } from '../words/number.ts';
import type { ChartLine, Owner } from './chartLine.ts';
import type { AxisUnit } from './orbitAxis.ts';
import type { Span } from './orbitSpan.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour, caseMarker, type Theme } from './theme.ts';
import { translucent } from './translucent.ts';
import { values } from './variables.ts';

export interface TemperatureLine {
  readonly column: Column;
  readonly span: Span;
}

/** References first, so that temperatures lie above them. One that several columns share is drawn once, in quiet ink. */
export function temperatureLines(lines: readonly TemperatureLine[], unit: AxisUnit, theme: Theme): ChartLine[] {
  return [
    ...groups(lines, sameTextbookValue).flatMap((group) => textbookLine(group, lines, unit, theme)),
    ...groups(lines, sameSteadyValue).map((group) => steadyLine(group, lines, unit, theme)),
    ...lines.map((line) => stateLine(line, unit, theme)),
  ];
}

function stateLine({ column, span }: TemperatureLine, unit: AxisUnit, theme: Theme): ChartLine {
  return { ...stateLook(column, theme), x: inUnit(span, unit), y: along(column, span, 'temperature') };
}

/** A state as it was before its numbers were moved. */
export function originalLine({ column, span }: TemperatureLine, unit: AxisUnit, theme: Theme): ChartLine {
  const { colour, dash } = stateLook(column, theme);
  return {
    ...names(`${columnName(column)}, before`),
    colour: translucent(colour, 0.55),
    dash,
    width: 1.25,
    marker: null,
    referenceFor: [],
    x: inUnit(span, unit),
    y: along(column, span, 'temperature'),
  };
}

/** Solid for the first state of a case, dash-dotted for further stable ones, dotted for unstable; dashes mean steady. */
export function stateLook(column: Column, theme: Theme): Omit<ChartLine, 'x' | 'y'> {
  const { marker, colour } = signOf(column, theme);
  const isUnstable = column.state.stable === false;
  const stableDash = column.stateIndex === 0 ? 'solid' : 'dashdot';
  return {
    ...names(columnName(column)),
    colour,
    dash: isUnstable ? 'dot' : stableDash,
    width: isUnstable ? 1.5 : 2.5,
    marker,
    referenceFor: null,
  };
}

function steadyLine(group: Group, all: Group, unit: AxisUnit, theme: Theme): ChartLine {
  const { column, span } = group[0]!;
  const y = along(column, span, 'steadyTemperature');
  return { ...reference('steady value', group, all, theme), x: inUnit(span, unit), y, dash: 'dash' };
}

function textbookLine(group: Group, all: Group, unit: AxisUnit, theme: Theme): ChartLine[] {
  const value = findingValue(group[0]!.column, 'equilibriumTemperature');
  if (value === null) return [];
  const ends = group.flatMap(({ span }) => [span.time[0]!, span.time.at(-1)!]);
  const x = [Math.min(...ends) / unit.seconds, Math.max(...ends) / unit.seconds];
  return [{ ...reference(`textbook ${kelvin(value)}`, group, all, theme), x, y: [value, value], dash: 'dot' }];
}

type Group = readonly TemperatureLine[];

/** One that belongs to all is named plainly; another says whose it is, and carries their signs. */
function reference(what: string, group: Group, all: Group, theme: Theme): Omit<ChartLine, 'x' | 'y' | 'dash'> {
  const isShared = group.length === all.length;
  const owners = firstOfEachCase(group).map(({ column }) => signOf(column, theme));
  const whose = [
    ...new Set(group.map(({ column }) => (hasOtherStates(column, group) ? column.caseName : columnName(column)))),
  ];
  return {
    ...names(isShared ? what : `${what}: ${whose.join(', ')}`),
    shortName: what,
    colour: new Set(owners.map(({ colour }) => colour)).size === 1 && !isShared ? owners[0]!.colour : theme.quiet,
    width: 1.5,
    marker: null,
    referenceFor: isShared ? [] : owners,
  };
}

function hasOtherStates({ caseIndex }: Column, group: Group): boolean {
  return group.filter(({ column }) => column.caseIndex === caseIndex).length > 1;
}

/** States of one case that share a reference need its sign once. */
function firstOfEachCase(group: Group): Group {
  return group.filter(
    ({ column }, at) => group.findIndex((other) => other.column.caseIndex === column.caseIndex) === at,
  );
}

export function names(plainName: string): Pick<ChartLine, 'plainName' | 'name' | 'shortName'> {
  return { plainName, name: plainLabel(plainName, 60), shortName: plainLabel(plainName, 22) };
}

/** Filled markers for the first state of a case, open ones for the others. */
export function signOf({ caseIndex, stateIndex }: Column, theme: Theme): Owner {
  return { marker: { shape: caseMarker(caseIndex), open: stateIndex > 0 }, colour: caseColour(theme, caseIndex) };
}

function groups(lines: Group, same: (a: Column, b: Column) => boolean): Group[] {
  const found: TemperatureLine[][] = [];
  for (const line of lines) {
    const group = found.find((members) => same(members[0]!.column, line.column));
    if (group) group.push(line);
    else found.push([line]);
  }
  return found;
}

function sameSteadyValue(a: Column, b: Column): boolean {
  return ['time', 'steadyTemperature'].every((name) => {
    const one = values(a.dataset, name);
    const other = values(b.dataset, name);
    return one.length === other.length && one.every((value, row) => nearly(value, other[row]!));
  });
}

function sameTextbookValue(a: Column, b: Column): boolean {
  const one = findingValue(a, 'equilibriumTemperature');
  const other = findingValue(b, 'equilibriumTemperature');
  return one === other || (one !== null && other !== null && nearly(one, other));
}

function nearly(a: number, b: number): boolean {
  return Math.abs(a - b) <= 1e-9 * Math.max(Math.abs(a), Math.abs(b));
}

function inUnit(span: Span, unit: AxisUnit): number[] {
  return span.time.map((t) => t / unit.seconds);
}

function along(column: Column, span: Span, name: string): number[] {
  const data = values(column.dataset, name);
  return span.rows.map((row) => data[row]!);
}
