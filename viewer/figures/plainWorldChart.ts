/** Figure: the cases of a run among all plain lumped worlds, on the chart of their damping and lag. Pure. */
import { largestEccentricity } from '../../sim/studies/grid/plainResponse.ts';
import type { UniversalChart } from '../../sim/studies/grid/universalChart.ts';
import { type Column, findingValue } from '../words/columns.ts';
import { list, percent, significant } from '../words/number.ts';
import { placeText } from '../words/storeReading.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type PlacedCase, universalMap } from './universalMap.ts';

/** Beyond these heat-store numbers the chart would be empty paper: nothing changes there but damping above. */
const storeNumbers = [1e-3, 1e3] as const;

/** Periodic cases that the chart can hold. `universalChart(chartNodes(…))` of their places makes the chart. */
export function placedColumns(columns: readonly Column[]): PlacedCase[] {
  return casesOf(columns).flatMap(({ caseIndex, caseName, plain }) =>
    plain.place === null || beyond(plain.place) !== null ? [] : [{ caseIndex, name: caseName, place: plain.place }],
  );
}

/** At least one of the columns is placed on `chart`. */
export function plainWorldChart(columns: readonly Column[], chart: UniversalChart, style: FigureStyle): Figure {
  const placed = placedColumns(columns);
  const figure = universalMap(chart, placed, null, style);
  return {
    ...figure,
    textAlternative: casesOf(columns).flatMap(sentence).join(' '),
    caption: [figure.caption, ...notPlaced(columns)].join(' '),
  };
}

/** A plain world has one periodic state; of other cases the first stands for all. */
function casesOf(columns: readonly Column[]): Column[] {
  return columns.filter(({ stateIndex }) => stateIndex === 0);
}

function sentence(column: Column): string[] {
  const { place } = column.plain;
  if (place === null || beyond(place) !== null) return [];
  const damping = findingValue(column, 'damping');
  const lag = findingValue(column, 'lagOfMaxOrbits');
  const found = [
    ...(damping === null ? [] : [`keeps ${percent(damping)} of the steady swing`]),
    ...(lag === null ? [] : [`is hottest ${percent(lag)} of an orbit late`]),
  ];
  return [`${column.caseName}: ${placeText(place)}${found.length === 0 ? '' : `; ${list(found)}`}.`];
}

function beyond({ eccentricity, storeNumber }: { eccentricity: number; storeNumber: number }): string | null {
  if (eccentricity > largestEccentricity) return 'its orbit is longer than the chart reaches';
  const [low, high] = storeNumbers;
  if (storeNumber >= low && storeNumber <= high) return null;
  const side = storeNumber < low ? 'left' : 'right';
  return `its heat-store number, ${significant(storeNumber, 2)}, lies beyond the ${side} edge`;
}

function notPlaced(columns: readonly Column[]): string[] {
  const left = casesOf(columns).flatMap(({ caseName, plain }) => {
    const reason = plain.place === null ? plain.reason : beyond(plain.place);
    return reason === null ? [] : [{ caseName, reason }];
  });
  if (left.length === 0) return [];
  const reasons = [...new Set(left.map(({ reason }) => reason))];
  const texts = reasons.map((reason) => {
    const names = left.filter((one) => one.reason === reason).map(({ caseName }) => `“${caseName}”`);
    return `${list(names)} (${reason})`;
  });
  return [`Not placed: ${texts.join('; ')}.`];
}
