/** The sentences of the answer that need latitudes: where it is hottest and coldest, ice, and what thaws. Pure. */

import { type Column, columnName, finding, findingValue } from './columns.ts';
import { degreesOf, edgeText, latitudeText } from './latitude.ts';
import { moment } from './moment.ts';
import { kelvin, percent, type TimeUnit } from './number.ts';

/** One column; empty where its findings know no latitudes. */
export function localAnswer(column: Column, unit: TimeUnit): string {
  return [extremes(column, unit), ice(column), windows(column)].filter((text) => text !== '').join(' ');
}

/** Several columns: the hottest and the coldest place of all. No planet stays in an unstable state. */
export function localPeaks(columns: readonly Column[], unit: TimeUnit): string {
  const places = (kind: Kind): Place[] =>
    columns.filter(({ state }) => state.stable !== false).flatMap((column) => placeOf(column, kind) ?? []);
  const hottest = places('hottest').toSorted((a, b) => b.temperature - a.temperature)[0];
  const coldest = places('coldest').toSorted((a, b) => a.temperature - b.temperature)[0];
  if (hottest === undefined || coldest === undefined) return '';
  const words = (place: Place): string => `${placeText(place, unit)} (“${columnName(place.column)}”)`;
  return `The hottest place of all has ${words(hottest)}, the coldest ${words(coldest)}.`;
}

type Kind = 'hottest' | 'coldest';

interface Place {
  readonly column: Column;
  readonly temperature: number;
  readonly latitudeDeg: number;
  readonly time: number;
}

function placeOf(column: Column, kind: Kind): Place | null {
  const temperature = findingValue(column, `${kind}Temperature`);
  const latitudeDeg = degreesOf(finding(column, `${kind}Latitude`));
  const time = findingValue(column, `${kind}Time`);
  return temperature === null || latitudeDeg === null || time === null
    ? null
    : { column, temperature, latitudeDeg, time };
}

function placeText({ column, temperature, latitudeDeg, time }: Place, unit: TimeUnit): string {
  return `${kelvin(temperature)} at ${latitudeText(latitudeDeg)}, ${moment(time, column, unit)}`;
}

function extremes(column: Column, unit: TimeUnit): string {
  const [hottest, coldest] = [placeOf(column, 'hottest'), placeOf(column, 'coldest')];
  if (hottest === null || coldest === null) return '';
  return `The hottest place has ${placeText(hottest, unit)}; the coldest ${placeText(coldest, unit)}.`;
}

/** Both caps, where there are any. */
function ice(column: Column): string {
  const caps = (['North', 'South'] as const).flatMap((side) => {
    const ends = ['Min', 'Max'].map((end) => degreesOf(finding(column, `iceEdge${side}${end}`)));
    const [from, to] = ends;
    return from === null || to === null || from === undefined || to === undefined ? [] : [{ side, from, to }];
  });
  const share = findingValue(column, 'iceFractionMean');
  if (share === null || share === 0) return '';
  if (share >= 1) return 'Ice covers every latitude all year.';
  const edges = caps.map(
    ({ side, from, to }) => `its ${side === 'North' ? 'northern' : 'southern'} edge at ${edgeText(from, to)}`,
  );
  return `Ice covers ${[`${percent(share)} of area and time`, ...edges].join(', ')}.`;
}

function windows(column: Column): string {
  return column.windows
    .flatMap(({ name }) => {
      const share = findingValue(column, `habitableFraction.${name}`);
      const always = findingValue(column, `alwaysFraction.${name}`);
      return share === null || always === null
        ? []
        : [`Within “${name}” lies ${percent(share)} of area and time, and ${percent(always)} of the area all year.`];
    })
    .join(' ');
}
