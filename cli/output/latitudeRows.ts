/** What the terminal table shows of models with latitude: where and when the extremes are, ice, windows, local lags. */
import type { Finding } from '../../sim/findings/finding.ts';
import { type Column, findingOf, periodOf, type TimeUnit, timeDecimals } from './columns.ts';
import { percent, significant, withError } from './numbers.ts';
import { type Cell, type Defined, type Row, row } from './row.ts';

export function latitudeRows(unit: TimeUnit): readonly Row[] {
  return [...extremeRows(unit), ...profileRows(), ...iceRows(), ...lagRows(unit)];
}

const kelvin = ({ value, plusMinus }: Defined) => withError(value, 2, plusMinus);
const place = ({ value }: Defined) => latitudeText(value);

/** Degrees with their side of the equator. */
function latitudeText(degrees: number): string {
  const text = Math.abs(degrees).toFixed(1);
  return Number(text) === 0 ? '0' : `${text} ${degrees > 0 ? 'N' : 'S'}`;
}

function extremeRows({ symbol, seconds }: TimeUnit): readonly Row[] {
  const section = 'anywhere, through the year';
  const time = ({ value }: Defined) => significant(value / seconds, 4);
  return ['hottest', 'coldest'].flatMap((kind) => [
    row(section, `${kind}, K`, `${kind}Temperature`, kelvin, `${kind} anywhere, K`),
    row(section, `${kind} at latitude`, `${kind}Latitude`, place),
    row(section, `${kind} after periapsis, ${symbol}`, `${kind}Time`, time),
  ]);
}

function profileRows(): readonly Row[] {
  const section = 'by latitude';
  return [
    row(section, 'mean, equator less poles, K', 'contrast', kelvin),
    row(section, 'largest seasonal range, K', 'seasonalRangeMax', kelvin),
    row(section, 'largest range at latitude', 'seasonalRangeLatitude', place),
  ];
}

function iceRows(): readonly Row[] {
  const section = 'ice, through the year';
  const share = row(section, 'share of area and time, %', 'iceFractionMean', ({ value }) => percent(value));
  return [
    { ...edgeRow(section, 'northern', 'North') },
    { ...edgeRow(section, 'southern', 'South') },
    {
      ...share,
      alone: 'area and time under ice, %',
      cell: (column) => (mayFreeze(column) ? share.cell(column) : null),
    },
  ];
}

/** Without a ramp there is no ice to speak of. */
function mayFreeze({ result }: Column): boolean {
  return result.inputs.some(({ key, used }) => used && key === 'planet.albedo.from');
}

/** Both ends of the edge's way in one cell, the one nearer to the equator first. */
function edgeRow(section: string, word: string, side: string): Row {
  const cell = (column: Column): Cell => {
    const [least, greatest] = ['Min', 'Max'].map((end) => findingOf(column.state, `iceEdge${side}${end}`));
    if (!mayFreeze(column) || least === undefined || greatest === undefined) return null;
    if (least.value === null || greatest.value === null) return { reason: least.reason ?? 'not defined' };
    const [near, far] = [least.value, greatest.value].toSorted((a, b) => Math.abs(a) - Math.abs(b)).map(latitudeText);
    const edge = near === far ? near! : `${near!.split(' ')[0]} to ${far}`;
    return { text: `${edge}${ofTheYear(findingOf(column.state, `iceCap${side}Fraction`))}` };
  };
  return { section, label: `${word} edge at latitude`, alone: `${word} ice edge`, cell };
}

/** An edge is known only of the days that have a cap. */
function ofTheYear(fraction: Finding | undefined): string {
  const share = fraction?.value ?? 1;
  return share < 1 ? `, ${percent(share)} % of the year` : '';
}

function lagRows(unit: TimeUnit): readonly Row[] {
  const { symbol, seconds } = unit;
  const time = ({ value, plusMinus = 0 }: Defined, column: Column) =>
    withError(value / seconds, timeDecimals(column, unit), plusMinus / seconds);
  const section = `local lag behind insolation, ${symbol}`;
  return [
    ['equator', 'lagAtEquator'],
    ['45 N', 'lagAt45North'],
    ['45 S', 'lagAt45South'],
    ['north pole', 'lagAtNorthPole'],
    ['south pole', 'lagAtSouthPole'],
  ].map(([label, name]) => row(section, label!, name!, time, `local lag, ${label}, ${symbol}`));
}

/** Of each temperature window: how much of the globe, for how long. */
export function latitudeWindowRows(names: readonly string[], { symbol, seconds }: TimeUnit): readonly Row[] {
  const share = ({ value }: Defined) => percent(value);
  return [
    ...names.map((name) =>
      row('share of area and time in, %', name, `habitableFraction.${name}`, share, `area and time in ${name}, %`),
    ),
    ...names.map((name) =>
      row('share of area inside all year, %', name, `alwaysFraction.${name}`, share, `area always in ${name}, %`),
    ),
    ...names.map((name) => seasonRow(name, symbol, seconds)),
  ];
}

/** Where a stay never ends it has no one latitude. */
function seasonRow(name: string, symbol: string, seconds: number): Row {
  const text = ({ value }: Defined, column: Column): string => {
    if (value >= periodOf(column) * (1 - 1e-9)) return 'all year';
    const where = findingOf(column.state, `longestSeasonLatitude.${name}`)?.value;
    const length = significant(value / seconds, 4);
    return where === null || where === undefined ? length : `${length} at ${latitudeText(where)}`;
  };
  return row(
    `longest season in, ${symbol}`,
    name,
    `longestSeason.${name}`,
    text,
    `longest season in ${name}, ${symbol}`,
  );
}
