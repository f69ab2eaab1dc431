/** What the terminal table shows of each state, in the order and the words a reader wants them. */
import type { Window } from '../../sim/world.ts';
import {
  type Column,
  commonTimeUnit,
  hasLatitudes,
  isForward,
  periodOf,
  type TimeUnit,
  timeDecimals,
} from './columns.ts';
import { latitudeRows, latitudeWindowRows } from './latitudeRows.ts';
import { percent, significant, withError } from './numbers.ts';
import { type Cell, type Defined, type Row, row } from './row.ts';

/** Every row that at least one column can fill. `fractions` adds the textbook values for other absorbing fractions. */
export function rowsOf(columns: readonly Column[], fractions: boolean): readonly Row[] {
  const unit = commonTimeUnit(columns);
  const ofMean = columns.some(({ state }) => hasLatitudes(state)) ? ' of the area mean' : '';
  const rows = [
    ...orbitRows(unit).filter(({ cell }) => commonText(columns, cell) === null),
    ...temperatureRows(ofMean),
    ...timingRows(unit, ofMean),
    ...responseRows(),
    ...groundRows(unit),
    ...latitudeRows(unit),
    ...windowRows(columns, unit, ofMean),
    ...(fractions ? fractionRows(columns) : []),
  ];
  return rows.filter(({ cell }) => columns.some((column) => cell(column) !== null));
}

/** The orbit in words, as far as all columns share it; what they do not share are rows of the table. */
export function orbitText(columns: readonly Column[]): string {
  const shared = orbitRows(commonTimeUnit(columns)).map(({ label, cell }) => {
    const [name, unit = ''] = label.split(', ');
    const text = commonText(columns, cell);
    return text === null ? '' : `${name} ${text} ${unit}`.trim();
  });
  return shared.filter((text) => text !== '').join(', ');
}

function orbitRows(unit: TimeUnit): readonly Row[] {
  return [
    row('orbit', `period, ${unit.symbol}`, 'period', ({ value }) => significant(value / unit.seconds, 5)),
    { section: 'orbit', label: 'eccentricity', alone: 'eccentricity', cell: eccentricityCell },
    row('orbit', 'mean instellation, W/m2', 'orbitMeanInstellation', ({ value }) => significant(value, 5)),
  ];
}

function eccentricityCell({ result }: Column): Cell {
  const found = [...result.derived, ...result.inputs].find(({ key }) => key === 'orbit.eccentricity');
  return found?.value === undefined || found.value === null
    ? null
    : { text: String(Number(found.value.toPrecision(6))) };
}

/** What a quantity reads in every column; null where they differ or have none. */
function commonText(columns: readonly Column[], cell: Row['cell']): string | null {
  const texts = columns.map((column) => {
    const found = cell(column);
    return found !== null && 'text' in found ? found.text : null;
  });
  return texts.every((text) => text === texts[0]) ? (texts[0] ?? null) : null;
}

/** `ofMean` says that a globe's temperature is that of its area mean. */
function temperatureRows(ofMean: string): readonly Row[] {
  const kelvin = ({ value, plusMinus }: Defined) => withError(value, 2, plusMinus);
  return [
    ['textbook equilibrium', 'equilibriumTemperature'],
    ['mean', 'temperatureMean'],
    ['maximum', 'temperatureMax'],
    ['minimum', 'temperatureMin'],
    ['steady value, mean', 'steadyTemperatureMean'],
    ['steady value, maximum', 'steadyTemperatureMax'],
    ['steady value, minimum', 'steadyTemperatureMin'],
  ].map(([label, finding]) => row(`temperature${ofMean}, K`, label!, finding!, kelvin, `${label}${ofMean}, K`));
}

/** Runs from a start count from there, periodic states from periapsis. */
function timingRows(unit: TimeUnit, ofMean: string): readonly Row[] {
  const { symbol, seconds } = unit;
  const section = `maximum${ofMean} comes`;
  const time = ({ value, plusMinus = 0 }: Defined, column: Column) =>
    withError(value / seconds, timeDecimals(column, unit), plusMinus / seconds);
  const timeAfter = (origin: string, counts: (column: Column) => boolean): Row => {
    const shown = row(section, `after ${origin}, ${symbol}`, 'timeOfMax', time, `maximum after ${origin}, ${symbol}`);
    return { ...shown, cell: (column) => (counts(column) ? shown.cell(column) : null) };
  };
  return [
    timeAfter('periapsis', ({ state }) => !isForward(state)),
    timeAfter('the start', ({ state }) => isForward(state)),
    row(section, `after the steady maximum, ${symbol}`, 'lagOfMax', time, `lag of maximum, ${symbol}`),
  ];
}

function responseRows(): readonly Row[] {
  const margin = 'stability margin (0 is a fold)';
  return [
    row('damping (swing over steady swing)', '', 'damping', ({ value }) => significant(value, 3), 'damping'),
    row('radiative time constant, orbits', '', 'radiativeTimeConstant', ({ value }, column) =>
      significant(value / periodOf(column), 3),
    ),
    {
      section: margin,
      label: '',
      alone: margin,
      cell: ({ result, state }) => {
        const isTelling = result.states.length > 1 || hasLatitudes(state);
        return !isTelling || state.stabilityMargin === null ? null : { text: significant(state.stabilityMargin, 3) };
      },
    },
  ];
}

/** What a small swing would do in real ground, beside the one store that stands for it: the case's own numbers rest on the latter. */
function groundRows({ symbol, seconds }: TimeUnit): readonly Row[] {
  const section = 'small swing of the ground alone';
  return [
    ['damping, half-space', 'halfSpaceDamping', 1],
    ['damping, one lumped store', 'lumpedDamping', 1],
    [`lag, half-space, ${symbol}`, 'halfSpaceLag', seconds],
    [`lag, one lumped store, ${symbol}`, 'lumpedLag', seconds],
  ].map(([label, name, unit]) => ({
    section,
    label: `${label}`,
    alone: `ground alone: ${label}`,
    cell: ({ result }) => {
      const found = result.derived.filter(({ key }) => key.endsWith(`.ground.${name}`));
      if (found.length === 0) return null;
      return { text: found.map(({ value }) => significant(value / Number(unit), 3)).join(', ') };
    },
  }));
}

function windowRows(columns: readonly Column[], unit: TimeUnit, ofMean: string): readonly Row[] {
  const windows = new Map(columns.flatMap(({ result }) => result.windows.map((window) => [window.name, window])));
  return [
    ...[...windows.values()].map((window) => shareRow(window, ofMean)),
    ...latitudeWindowRows([...windows.keys()], unit),
    ...[...windows.keys()].map((name) =>
      row(
        'orbit-mean instellation in',
        name,
        `orbitMeanInWindow.${name}`,
        ({ value }) => (value === 1 ? 'yes' : 'no'),
        `orbit mean in ${name}`,
      ),
    ),
  ];
}

/** The instant's instellation is not what a climate feels: the row says that it is meant. */
function shareRow({ name, of }: Window, ofMean: string): Row {
  const label = of === 'instellation' ? `${name} (instantaneous)` : name;
  const whose = of === 'temperature' ? ofMean : '';
  const share = ({ value }: Defined) => percent(value);
  return row(`share of time${whose} in, %`, label, `fractionInWindow.${name}`, share, `time${whose} in ${label}, %`);
}

const fractionNames: ReadonlyMap<number, string> = new Map([
  [1 / 4, '1/4'],
  [1 / 2, '1/2'],
  [2 / 3, '2/3'],
  [1, '1'],
]);

function fractionRows(columns: readonly Column[]): readonly Row[] {
  return columns[0]!.result.steadyByFraction.map(({ fraction }, index) => {
    const name = fractionNames.get(fraction) ?? significant(fraction, 3);
    return {
      section: 'textbook equilibrium, K, for',
      label: `absorbing fraction ${name}`,
      alone: `textbook equilibrium for absorbing fraction ${name}, K`,
      cell: ({ result }) => ({ text: withError(result.steadyByFraction[index]!.temperature, 2) }),
    };
  });
}
