/** Figure: insolation by latitude and season. One a distinct insolation: states and cases often share theirs. Pure. */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import { type Column, commonTimeUnit } from '../words/columns.ts';
import { latitudeText } from '../words/latitude.ts';
import { exact, fixed, nbsp, unitText } from '../words/number.ts';
import { bandRanges, type Field, fieldOf } from './bands.ts';
import { insolationScale } from './colourScale.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { gridValues, type MapGrid, mapGrid, momentAndSeason } from './mapGrid.ts';
import { isCrossed, levelLine } from './mapLines.ts';
import { multiples } from './roomyTicks.ts';
import { seasonMapFigure } from './seasonMap.ts';
import { extremes, values } from './variables.ts';

const unit = unitText('W/m2');
/** Above single precision, in which pages carry long fields. */
const sameShare = 1e-6;
/** Below it, W m⁻², the star does not rise: rounding aside. */
const dark = 1e-6;

/** Columns that receive the same, together; in order. */
export function insolationGroups(columns: readonly Column[]): Column[][] {
  const groups: Column[][] = [];
  for (const column of columns) {
    const group = groups.find(([first]) => isSame(first!.dataset, column.dataset));
    if (group) group.push(column);
    else groups.push([column]);
  }
  return groups;
}

function isSame(a: Dataset, b: Dataset): boolean {
  return ['time', 'latitude', 'bandInsolation'].every((name) => {
    const [one, other] = [values(a, name), values(b, name)];
    const tolerance = sameShare * extremes(a, name)[1];
    return one.length === other.length && one.every((value, at) => Math.abs(value - other[at]!) <= tolerance);
  });
}

/** `groups` share the scale of colours; `shown` is the place of the one that this figure shows. */
export function insolationMap(groups: readonly (readonly Column[])[], shown: number, style: FigureStyle): Figure {
  const group = groups[shown]!;
  const column = group[0]!;
  const grid = mapGrid(column, commonTimeUnit(groups.flat()));
  const z = gridValues(column, 'bandInsolation', grid);
  const most = Math.max(...groups.map(([first]) => extremes(first!.dataset, 'bandInsolation')[1]));
  const ground = { scale: insolationScale, range: [0, most] as const };
  const step = contourStep(most);
  const levels = multiples(step, step, most).filter((value) => isCrossed(value, z));
  const lines = levels.map((value) => {
    const plainName = `${exact(value)}${nbsp}${unit}`;
    return levelLine({ value, plainName, labels: [plainName], dash: 'solid', width: 1 }, z, grid, ground);
  });
  const isOneOfMany = groups.length > 1;
  const whose = [...new Set(group.map(({ caseName }) => caseName))].join(', ');
  return seasonMapFigure(
    {
      column,
      grid,
      z,
      quantity: 'Insolation',
      unit,
      ground,
      lines: [],
      marks: lines.flatMap(({ traces }) => traces),
      names: [],
      isOneOfMany,
      style,
    },
    {
      name: `insolation-by-latitude-and-season${isOneOfMany ? `-${shown + 1}` : ''}`,
      title: `Insolation by latitude and season${isOneOfMany ? `: ${whose}` : ''}`,
      textAlternative: `${isOneOfMany ? `${whose}: ` : ''}${finding(column, grid)}`,
      caption: caption(fieldOf(column.dataset, 'bandInsolation'), step, groups.length),
    },
  );
}

/** A round number that leaves four to seven steps. */
function contourStep(most: number): number {
  const rough = most / 7;
  const decade = 10 ** Math.floor(Math.log10(rough));
  return [1, 2, 2.5, 5, 10].find((lead) => lead * decade >= rough)! * decade;
}

function finding(column: Column, grid: MapGrid): string {
  const field = fieldOf(column.dataset, 'bandInsolation');
  const { row, band } = brightest(field);
  const where = latitudeText(grid.bands.middlesDeg[band]!);
  const when = varies(field) ? momentAndSeason(column, grid, values(column.dataset, 'time')[row]!) : 'all year';
  const top = `${fixed(field.at(row, band), 1)}${nbsp}${unit}`;
  return `The most arrives at ${where}, ${when}: ${top}. ${darkness(field)}`;
}

/** False where the inputs hold the insolation the same all year. */
function varies(field: Field): boolean {
  const { low, high } = bandRanges(field);
  return high.some((most, band) => most - low[band]! > 1e-9 * most);
}

function brightest(field: Field): { row: number; band: number } {
  let best = { row: 0, band: 0 };
  for (let row = 0; row < field.rows; row++) {
    for (let band = 0; band < field.bands; band++) {
      if (field.at(row, band) > field.at(best.row, best.band)) best = { row, band };
    }
  }
  return best;
}

function darkness(field: Field): string {
  return bandRanges(field).low.some((least) => least < dark)
    ? 'Some latitudes are dark for a part of the year.'
    : 'No latitude is ever dark for a whole day.';
}

function caption(field: Field, step: number, count: number): string {
  const isSeasonal = varies(field);
  const hasNight = isSeasonal && bandRanges(field).low.some((least) => least < dark);
  return [
    `What arrives on a square metre of ground, ${isSeasonal ? 'mean over the day' : 'which the inputs hold the same all year'}; a line every ${exact(step)}${nbsp}${unit}.`,
    ...(hasNight ? ['Black: polar night.'] : []),
    ...(count > 1 ? ['The colours mean the same in every map of insolation on this page.'] : []),
  ].join(' ');
}
