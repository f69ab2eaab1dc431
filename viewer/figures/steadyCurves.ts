/** The steady temperature as a curve over the instellation, once for all columns that have the same one. Pure. */
import { type Column, columnName } from '../words/columns.ts';
import type { ChartLine } from './chartLine.ts';
import { loopOpening } from './loopOpening.ts';
import { names, signOf } from './temperatureLines.ts';
import type { Theme } from './theme.ts';
import { values } from './variables.ts';

interface Curve {
  readonly column: Column;
  readonly flux: readonly number[];
  readonly temperature: readonly number[];
  /** The same on the way in and out; not so where the ice has a memory of its own. */
  readonly isSingle: boolean;
}

/** K: closer than a line is wide. */
const same = 0.05;
const probes = 7;

export function steadyCurves(columns: readonly Column[], theme: Theme): ChartLine[] {
  const groups: Curve[][] = [];
  for (const column of columns) {
    const curve = curveOf(column);
    const group = groups.find((members) => members.every((member) => agree(member, curve)));
    if (group) group.push(curve);
    else groups.push([curve]);
  }
  return groups.map((group) => lineOf(group, columns.length, theme));
}

function curveOf(column: Column): Curve {
  const flux = values(column.dataset, 'instellation');
  const temperature = values(column.dataset, 'steadyTemperature');
  const isSingle = Math.abs(loopOpening(column, 'steadyTemperature').widest) < same;
  const rows = Array.from(flux, (_, row) => row);
  const ordered = isSingle ? rows.toSorted((a, b) => flux[a]! - flux[b]!) : [...rows, 0];
  return {
    column,
    flux: ordered.map((row) => flux[row]!),
    temperature: ordered.map((row) => temperature[row]!),
    isSingle,
  };
}

/** Where both are curves, at fluxes that both reach. */
function agree(a: Curve, b: Curve): boolean {
  if (!a.isSingle || !b.isSingle) return false;
  const from = Math.max(a.flux[0]!, b.flux[0]!);
  const to = Math.min(a.flux.at(-1)!, b.flux.at(-1)!);
  if (from > to) return false;
  return Array.from({ length: probes }, (_, at) => from + (at / (probes - 1)) * (to - from)).every(
    (flux) => Math.abs(on(a, flux) - on(b, flux)) < 4 * same,
  );
}

/** By straight lines between points; the ends beyond them. */
function on({ flux, temperature }: Curve, wanted: number): number {
  const after = flux.findIndex((one) => one >= wanted);
  if (after <= 0) return after === 0 ? temperature[0]! : temperature.at(-1)!;
  const span = flux[after]! - flux[after - 1]!;
  const share = span > 0 ? (wanted - flux[after - 1]!) / span : 1;
  return temperature[after - 1]! + share * (temperature[after]! - temperature[after - 1]!);
}

function lineOf(group: readonly Curve[], of: number, theme: Theme): ChartLine {
  const isShared = group.length === of;
  const owners = group.map(({ column }) => signOf(column, theme));
  const points = group.flatMap(({ flux, temperature }) => flux.map((x, at) => ({ x, y: temperature[at]! })));
  if (group[0]!.isSingle) points.sort((a, b) => a.x - b.x);
  const whose = group.map(({ column }) => columnName(column)).join(', ');
  return {
    ...names(isShared ? 'steady value' : `steady value: ${whose}`),
    shortName: 'steady value',
    colour: owners.length === 1 && !isShared ? owners[0]!.colour : theme.quiet,
    dash: 'dash',
    width: 1.25,
    marker: null,
    referenceFor: isShared ? [] : owners,
    x: points.map(({ x }) => x),
    y: points.map(({ y }) => y),
  };
}
