/** A field on (time, latitude) laid out for a map: one orbit from a quarter before periapsis, pole to pole. Pure. */

import type { Seconds } from '../../sim/si.ts';
import { type Column, periodOf } from '../words/columns.ts';
import { dateText } from '../words/date.ts';
import { latitudeText } from '../words/latitude.ts';
import { moment } from '../words/moment.ts';
import { fixed, nbsp, type TimeUnit } from '../words/number.ts';
import { type Bands, bandsOf, fieldOf } from './bands.ts';
import { mapRows } from './mapRows.ts';
import { orbitSpan, quarterBefore, type Span } from './orbitSpan.ts';
import { type Seasons, seasonAt, seasonsOf } from './seasonAxis.ts';

export interface MapGrid {
  readonly unit: TimeUnit;
  readonly period: Seconds;
  readonly bands: Bands;
  readonly span: Span;
  /** Middle of each column, in `unit`. */
  readonly times: number[];
  /** One more than columns. */
  readonly timeEdges: number[];
  /** The ends of the map, in `unit`. */
  readonly range: readonly [number, number];
  readonly seasons: Seasons;
}

export function mapGrid(column: Column, unit: TimeUnit): MapGrid {
  const period = periodOf(column);
  const span = orbitSpan(column.dataset, period, mapRows(column.dataset));
  const times = span.time.map((t) => t / unit.seconds);
  const length = period / unit.seconds;
  return {
    unit,
    period,
    bands: bandsOf(column.dataset),
    span,
    times,
    timeEdges: edgesBetween(times),
    range: [-quarterBefore * length, (1 - quarterBefore) * length],
    seasons: seasonsOf(column.dataset, orbitSpan(column.dataset, period), unit),
  };
}

/** Halfway between neighbours; the outer ones as far out as their neighbours are in. */
function edgesBetween(middles: readonly number[]): number[] {
  const between = middles.slice(1).map((value, at) => (value + middles[at]!) / 2);
  return [2 * middles[0]! - between[0]!, ...between, 2 * middles.at(-1)! - between.at(-1)!];
}

/** Where a time after periapsis, 0 … period, stands on the time axis. */
export function mapTime({ period, unit }: MapGrid, seconds: Seconds): number {
  return (seconds > (1 - quarterBefore) * period ? seconds - period : seconds) / unit.seconds;
}

/** `12.1 d after periapsis (Ls 104°)`. */
export function momentAndSeason(column: Column, grid: MapGrid, seconds: Seconds): string {
  return `${moment(seconds, column, grid.unit)} (Ls${nbsp}${seasonText(grid, mapTime(grid, seconds))})`;
}

function seasonText({ seasons }: MapGrid, time: number): string {
  return `${fixed(seasonAt(seasons, time), 0)}°`;
}

/** Rows of a map, south to north: the field's own numbers. */
export function gridValues(column: Column, name: string, { span, bands }: MapGrid): number[][] {
  const field = fieldOf(column.dataset, name);
  return bands.middles.map((_, band) => span.rows.map((row) => field.at(row, band)));
}

/** The words of every cell, for the pointer: latitude, and time with its season. */
export function cellWords(column: Column, grid: MapGrid): [string, string][][] {
  const moments = grid.span.time.map((seconds) => cellMoment(column, seconds, grid));
  return grid.bands.middlesDeg.map((latitudeDeg) => {
    const where = latitudeText(latitudeDeg);
    return moments.map((when) => [where, when]);
  });
}

function cellMoment(column: Column, seconds: Seconds, grid: MapGrid): string {
  const { periapsisTime } = column;
  return [
    moment(seconds < 0 ? seconds + grid.period : seconds, column, grid.unit),
    `L<sub>s</sub> ${seasonText(grid, seconds / grid.unit.seconds)}`,
    ...(periapsisTime === null ? [] : [dateText(periapsisTime + seconds)]),
  ].join('<br>');
}
