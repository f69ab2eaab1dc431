/** Figure: temperature by latitude and season, with freezing, windows and ice edges as lines. One a state. Pure. */
import type { Annotation, Data } from 'plotly.js-dist-min';
import { zeroCelsius } from '../../sim/constants.ts';
import type { Kelvin } from '../../sim/si.ts';
import { type Column, columnName, commonTimeUnit } from '../words/columns.ts';
import { latitudeText } from '../words/latitude.ts';
import { kelvin, list, percent } from '../words/number.ts';
import { areaTimeShare, bandRanges, fieldOf } from './bands.ts';
import { colourAt, inkOn, temperatureScale } from './colourScale.ts';
import { extremePlace } from './extremePlaces.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { latitudePlace } from './latitudeAxis.ts';
import { gridValues, type MapGrid, mapGrid, mapTime, momentAndSeason } from './mapGrid.ts';
import { casedLine, type Ground, isCrossed, levelLine, type MapLine } from './mapLines.ts';
import { seasonMapFigure } from './seasonMap.ts';
import { type TemperatureLevel, temperatureLevels } from './temperatureLevels.ts';
import { extremes } from './variables.ts';

const kinds = ['hottest', 'coldest'] as const;
const iceName = 'edge of the ice (solid)';

/** `columns` with latitude, which share the scale of colours; `shown` is the place of the one that this figure shows. */
export function temperatureMap(columns: readonly Column[], shown: number, style: FigureStyle): Figure {
  const column = columns[shown]!;
  const grid = mapGrid(column, commonTimeUnit(columns));
  const z = gridValues(column, 'bandTemperature', grid);
  const ground = { scale: temperatureScale, range: sharedRange(columns) };
  const ice = gridValues(column, 'bandIceFraction', grid);
  const levels = temperatureLevels(column);
  const drawn = levels.filter(({ value }) => isCrossed(value, z));
  const iceEdge = isCrossed(0.5, ice) ? [iceLine(ice, grid, ground)] : [];
  return seasonMapFigure(
    {
      column,
      grid,
      z,
      beside: { column: { name: 'Ice fraction', unit: '' }, z: ice },
      quantity: 'Temperature',
      unit: 'K',
      ground,
      lines: [...drawn.map((level) => levelLine(level, z, grid, ground)), ...iceEdge],
      marks: [extremeMarks(column, grid)],
      names: extremeNames(column, grid, ground, style),
      isOneOfMany: columns.length > 1,
      style,
    },
    {
      name: `temperature-by-latitude-and-season${columns.length > 1 ? `-${shown + 1}` : ''}`,
      title: `Temperature by latitude and season${columns.length > 1 ? `: ${columnName(column)}` : ''}`,
      textAlternative: finding(column, grid),
      caption: caption(columns, shown, levels, drawn, iceEdge.length > 0),
    },
  );
}

/** Least and greatest temperature of all latitudes, times and states. */
function sharedRange(columns: readonly Column[]): [Kelvin, Kelvin] {
  const ranges = columns.map(({ dataset }) => extremes(dataset, 'bandTemperature'));
  return [Math.min(...ranges.map(([low]) => low)), Math.max(...ranges.map(([, high]) => high))];
}

function iceLine(ice: number[][], grid: MapGrid, ground: Ground): MapLine {
  const [low, high] = ground.range;
  const beneath = colourAt(ground.scale, Math.min(high, Math.max(low, zeroCelsius)), ground.range);
  return casedLine({ value: 0.5, plainName: iceName, labels: [iceName], width: 2 }, ice, grid, beneath);
}

/** Two triangles. */
function extremeMarks(column: Column, grid: MapGrid): Data {
  const places = kinds.map((kind) => extremePlace(column, kind));
  return {
    type: 'scatter',
    mode: 'markers',
    name: 'hottest and coldest',
    x: places.map(({ time }) => mapTime(grid, time)),
    y: places.map(({ latitudeDeg }) => latitudePlace(latitudeDeg)),
    marker: {
      symbol: ['triangle-up', 'triangle-down'],
      size: 10,
      color: '#ffffff',
      line: { color: '#000000', width: 1.5 },
    },
    cliponaxis: false,
    hoverinfo: 'skip',
  };
}

/** Their temperatures, each on the colour that it has there. Inwards from the nearest edges. */
function extremeNames(column: Column, grid: MapGrid, ground: Ground, { narrow }: FigureStyle): Partial<Annotation>[] {
  const middle = (grid.range[0] + grid.range[1]) / 2;
  return kinds.map((kind) => {
    const { temperature, latitudeDeg, time } = extremePlace(column, kind);
    const beneath = colourAt(ground.scale, temperature, ground.range);
    const x = mapTime(grid, time);
    const isLate = x > middle;
    const isPolar = Math.abs(latitudeDeg) > 60;
    return {
      text: narrow ? kelvin(temperature) : `${kind} ${kelvin(temperature)}`,
      showarrow: false,
      font: { color: inkOn(beneath), size: 11 },
      bgcolor: beneath,
      borderpad: 1,
      x,
      xanchor: isLate ? 'right' : 'left',
      xshift: isLate ? -8 : 8,
      y: latitudePlace(latitudeDeg),
      yanchor: 'middle',
      yshift: isPolar ? -8 * Math.sign(latitudeDeg) : 0,
    };
  });
}

function finding(column: Column, grid: MapGrid): string {
  const words = (kind: 'hottest' | 'coldest'): string => {
    const { temperature, latitudeDeg, time } = extremePlace(column, kind);
    return `${kelvin(temperature)} at ${latitudeText(latitudeDeg)}, ${momentAndSeason(column, grid, time)}`;
  };
  const { dataset } = column;
  const thawed = areaTimeShare(dataset, fieldOf(dataset, 'bandTemperature'), (value) => value > zeroCelsius);
  return `${columnName(column)}: hottest ${words('hottest')}; coldest ${words('coldest')}. Above freezing: ${percent(thawed)} of area and time. ${iceWords(column)}`;
}

function iceWords({ dataset }: Column): string {
  const { low, high } = bandRanges(fieldOf(dataset, 'bandIceFraction'));
  if (high.every((most) => most < 0.5)) return 'There is no ice.';
  if (low.every((least) => least >= 0.5)) return 'Ice covers every latitude all year.';
  const everIcy = high.filter((most) => most >= 0.5).length / high.length;
  const alwaysIcy = low.filter((least) => least >= 0.5).length / low.length;
  return `Ice covers ${percent(everIcy)} of the surface at some time and ${percent(alwaysIcy)} all year.`;
}

function caption(
  columns: readonly Column[],
  shown: number,
  levels: readonly TemperatureLevel[],
  drawn: readonly TemperatureLevel[],
  hasIce: boolean,
): string {
  const absent = levels.filter((level) => !drawn.includes(level)).map(({ plainName }) => plainName);
  return [
    ...(shown === 0 ? [reading(columns)] : [`Drawn as for “${columnName(columns[0]!)}”, in the same colours.`]),
    ...(columns[shown]!.dataset.variables.bandLandTemperature
      ? ['Land and sea of a latitude are shown as their mean.']
      : []),
    ...(hasIce && shown === 0
      ? [
          'Dashed and dotted: temperatures. Solid, with a black rim: the edge of the ice, at which half of a band is frozen over; the edge in the table is that of a cap with as much ice as reaches unbroken from the pole.',
        ]
      : []),
    ...(absent.length > 0 ? [`Reached nowhere: ${list(absent)}.`] : []),
  ].join(' ');
}

function reading(columns: readonly Column[]): string {
  const shared = columns.length > 1 ? ' The colours mean the same in every map of temperature on this page.' : '';
  return `One whole orbit from a quarter before periapsis; equal heights are equal areas of the surface, so that the part of the map inside a line is a share of area and time. Triangles: the hottest moment (upwards) and the coldest.${shared}`;
}
