/** Rows of the table of cases that need latitudes: where and when the extremes are, ice, windows, local lags. Pure. */

import { type Cell, numberCell, type TableRow, temperature, time, without } from './cells.ts';
import { type Column, finding, findingValue, periodOf } from './columns.ts';
import { degreesOf, edgeText, latitudeText } from './latitude.ts';
import { moment } from './moment.ts';
import { percent, type TimeUnit } from './number.ts';

/** Every row that at least one column can fill; a column without the finding has a dash. */
export function latitudeRows(columns: readonly Column[], unit: TimeUnit): TableRow[] {
  const rows: readonly RowRule[] = [
    ['Hottest at any latitude', 'hottestTemperature', (column) => extreme(column, 'hottest', unit)],
    ['Coldest at any latitude', 'coldestTemperature', (column) => extreme(column, 'coldest', unit)],
    ['Annual mean, equator less poles', 'contrast', (column) => temperature(column, 'contrast')],
    ['Largest seasonal range', 'seasonalRangeMax', seasonalRange],
    ['Northern ice edge', 'iceEdgeNorthMin', (column) => iceEdge(column, 'North')],
    ['Southern ice edge', 'iceEdgeSouthMin', (column) => iceEdge(column, 'South')],
    [
      'Area and time under ice',
      'iceFractionMean',
      (column) => (mayFreeze(column) ? share(column, 'iceFractionMean') : noIce),
    ],
    ...lagPlaces.map(([where, name]): RowRule => [`Local lag ${where}`, name, (column) => time(column, name, unit)]),
  ];
  return filled(columns, rows).filter(({ label }) => !/\bice\b/.test(label) || columns.some(mayFreeze));
}

/** Of each temperature window: how much of the globe, and for how long. */
export function latitudeWindowRows(columns: readonly Column[], unit: TimeUnit): TableRow[] {
  const names = [...new Set(columns.flatMap(({ windows }) => windows.map(({ name }) => name)))];
  const rows = names.flatMap((name): RowRule[] => [
    [`Area and time in “${name}”`, `habitableFraction.${name}`, (column) => share(column, `habitableFraction.${name}`)],
    [`Area in “${name}” all year`, `alwaysFraction.${name}`, (column) => share(column, `alwaysFraction.${name}`)],
    [`Longest season in “${name}”`, `longestSeason.${name}`, (column) => longestSeason(column, name, unit)],
  ]);
  return filled(columns, rows);
}

type RowRule = readonly [label: string, finding: string, cell: (column: Column) => Cell];

const lagPlaces = [
  ['at the equator', 'lagAtEquator'],
  ['at 45° N', 'lagAt45North'],
  ['at 45° S', 'lagAt45South'],
  ['at the north pole', 'lagAtNorthPole'],
  ['at the south pole', 'lagAtSouthPole'],
] as const;

const noIce: Cell = { text: '—', reason: 'its albedo knows no ice' };

function filled(columns: readonly Column[], rows: readonly RowRule[]): TableRow[] {
  return rows
    .filter(([, name]) => columns.some((column) => finding(column, name) !== undefined))
    .map(([label, , cell]) => ({ label, cells: columns.map(cell) }));
}

function extreme(column: Column, kind: 'hottest' | 'coldest', unit: TimeUnit): Cell {
  const cell = temperature(column, `${kind}Temperature`);
  const latitude = degreesOf(finding(column, `${kind}Latitude`));
  const when = findingValue(column, `${kind}Time`);
  if (latitude === null || when === null) return cell;
  return { ...cell, detail: `${latitudeText(latitude)}, ${moment(when, column, unit)}` };
}

function seasonalRange(column: Column): Cell {
  const cell = temperature(column, 'seasonalRangeMax');
  const latitude = degreesOf(finding(column, 'seasonalRangeLatitude'));
  return latitude === null ? cell : { ...cell, detail: `at ${latitudeText(latitude)}` };
}

function iceEdge(column: Column, side: 'North' | 'South'): Cell {
  const least = finding(column, `iceEdge${side}Min`);
  if (!mayFreeze(column)) return noIce;
  const ends = [degreesOf(least), degreesOf(finding(column, `iceEdge${side}Max`))];
  const [from, to] = ends;
  if (from === null || to === null || from === undefined || to === undefined) return without(least);
  const ofYear = findingValue(column, `iceCap${side}Fraction`) ?? 1;
  // An edge is known only of the days that have a cap.
  return { text: edgeText(from, to), ...(ofYear < 1 ? { detail: `${percent(ofYear)} of the year` } : {}) };
}

/** Without a ramp of the albedo there is no ice to speak of. */
function mayFreeze({ inputs }: Column): boolean {
  return inputs.some(({ key, used }) => used && key === 'planet.albedo.from');
}

function share(column: Column, name: string): Cell {
  const found = finding(column, name);
  return found === undefined || found.value === null ? without(found) : { text: percent(found.value) };
}

/** A stay that never ends has no one latitude. */
function longestSeason(column: Column, window: string, unit: TimeUnit): Cell {
  const found = finding(column, `longestSeason.${window}`);
  if (found === undefined || found.value === null) return without(found);
  if (found.value >= periodOf(column) * (1 - 1e-9)) return { text: 'all year' };
  const cell = numberCell(found, (value) => ({ value: value / unit.seconds, unit: unit.symbol, decimals: 1 }));
  const latitude = degreesOf(finding(column, `longestSeasonLatitude.${window}`));
  return latitude === null ? cell : { ...cell, detail: `at ${latitudeText(latitude)}` };
}
