/** Figure: damping and lag of every plain lumped world, with the cases placed among them. Pure. */
import type { Annotation, Data, Layout } from 'plotly.js-dist-min';
import type { GridCase } from '../../sim/studies/grid/gridReport.ts';
import type { ReadBack } from '../../sim/studies/grid/readBack.ts';
import type { UniversalPlace } from '../../sim/studies/grid/storeNumber.ts';
import type { UniversalChart } from '../../sim/studies/grid/universalChart.ts';
import { membersOf } from '../words/gridMembers.ts';
import { exact, fixed, list, nbsp, significant } from '../words/number.ts';
import { placeText } from '../words/storeReading.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import type { LegendLine } from './chartLine.ts';
import { plotlyScale, temperatureScale } from './colourScale.ts';
import { casedContours, levelContours } from './contourLines.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { decadeTicks } from './gridAxisLayout.ts';
import { colourBar } from './mapKey.ts';
import { plainLabel } from './plainLabel.ts';
import { caseMarker } from './theme.ts';
import { dampingKey, placeNames } from './universalLabels.ts';
import type { View } from './view.ts';

export interface PlacedCase {
  readonly caseIndex: number;
  readonly name: string;
  readonly place: UniversalPlace;
}

/** What was read back, to be marked. */
export interface MarkedReading {
  readonly eccentricity: number;
  readonly reading: Pick<ReadBack, 'storeNumber' | 'low' | 'high'>;
}

const plotHeight = { wide: 420, narrow: 330 };
const plotWidth = { wide: 800, narrow: 300 };
const margins = { wide: { l: 64, r: 224, t: 16, b: 54 }, narrow: { l: 56, r: 14, t: 14, b: 112 } };
const narrowAxisRoom = 58;
/** % of an orbit. */
const lagLevels = [0.1, 0.3, 1, 2, 5, 10, 15, 20];
const dampingLevels = [0.9, 0.7, 0.5, 0.3, 0.2, 0.1, 0.05, 0.02];
const lagRange = [0, 25] as const;

/** Cases of the report that have a place on the chart. */
export function placedCases(cases: readonly GridCase[]): PlacedCase[] {
  return membersOf({ cases }).flatMap(({ name, index, universal }) =>
    universal === null ? [] : [{ caseIndex: index, name, place: universal }],
  );
}

export function universalMap(
  chart: UniversalChart,
  placed: readonly PlacedCase[],
  marked: MarkedReading | null,
  style: FigureStyle,
): Figure {
  const view = style.view ?? wholeView(chart);
  const lag = contoursOf(chart, chart.lag, 100, lagLevels, (level) => `${exact(level)}${nbsp}%`, view, style);
  const damping = contoursOf(chart, chart.damping, 1, dampingLevels, (level) => `×${nbsp}${exact(level)}`, view, style);
  const spots = placed.map(({ place }) => ({ x: Math.log10(place.storeNumber), y: place.eccentricity }));
  const solid = levelContours(lag, { scale: temperatureScale, range: lagRange }, spots);
  const dashed = casedContours(damping, solid.taken);
  return {
    name: 'damping-and-lag-of-plain-worlds',
    title: 'Damping and lag of every plain lumped world',
    textAlternative: finding(placed, marked),
    caption:
      'Constant albedo, emission as T⁴ and no heat from inside leave two numbers: the eccentricity, and the heat-store number 2πτ/P, the radiative time over the orbit’s pace. Colours and thin lines: the lag of the maximum behind periapsis, in % of an orbit. Dashed: damping, the share of the steady swing that is left. Along the foot, where orbits are nearly circular, the lag is atan(2πτ/P)/2π and the damping 1/√(1 + (2πτ/P)²).',
    lines: legend(placed),
    data: [colours(chart, style), ...solid.data, ...dashed.data, ...markers(placed), ...readingMarks(marked, chart)],
    layout: layoutOf(placed, [...solid.annotations, ...dashed.annotations], view, style),
    table: () => tableOf(chart, placed, marked),
  };
}

/** The nodes of the chart; then what is marked on it, by eccentricity and heat-store number alone. */
function tableOf(
  { eccentricities, storeNumbers, lag, damping }: UniversalChart,
  placed: readonly PlacedCase[],
  marked: MarkedReading | null,
): FigureTable {
  const nodes = Array.from(eccentricities).flatMap((eccentricity, row) =>
    Array.from(storeNumbers, (storeNumber, column) => {
      const at = row * storeNumbers.length + column;
      return ['chart', null, eccentricity, storeNumber, 100 * lag[at]!, damping[at]!];
    }),
  );
  const cases = placed.map(({ name, place }) => ['case', name, place.eccentricity, place.storeNumber, null, null]);
  const readings = marked === null ? [] : [['read back', null, marked.eccentricity, marked.reading.storeNumber]];
  return {
    columns: [
      ...['what', 'case', 'eccentricity', 'heat-store number'].map(words),
      { name: 'lag', unit: '% of an orbit' },
      words('damping'),
    ],
    rows: [...nodes, ...cases, ...readings.map((reading) => [...reading, null, null])],
  };
}

function wholeView({ storeNumbers, eccentricities }: UniversalChart): View {
  return {
    x: [Math.log10(storeNumbers[0]!), Math.log10(storeNumbers.at(-1)!)],
    y: [eccentricities[0]!, eccentricities.at(-1)!],
  };
}

function rowsOf({ eccentricities, storeNumbers }: UniversalChart, values: Float64Array, times: number): number[][] {
  const width = storeNumbers.length;
  return Array.from(eccentricities, (_, row) =>
    Array.from(values.subarray(row * width, (row + 1) * width), (value) => times * value),
  );
}

function contoursOf(
  chart: UniversalChart,
  values: Float64Array,
  times: number,
  levels: readonly number[],
  text: (level: number) => string,
  view: View,
  { narrow }: FigureStyle,
) {
  return {
    x: [...chart.storeNumbers],
    y: [...chart.eccentricities],
    mesh: {
      x: Array.from(chart.storeNumbers, Math.log10),
      y: [...chart.eccentricities],
      z: rowsOf(chart, values, times),
    },
    levels: levels.map((level) => ({ place: level, text: text(level) })),
    window: {
      ...view,
      width: narrow ? plotWidth.narrow : plotWidth.wide,
      height: narrow ? plotHeight.narrow : plotHeight.wide,
    },
  };
}

function colours(chart: UniversalChart, style: FigureStyle): Data {
  const lag = rowsOf(chart, chart.lag, 100);
  const damping = rowsOf(chart, chart.damping, 1);
  return {
    type: 'heatmap',
    name: 'lag',
    x: midpoints(Array.from(chart.storeNumbers, Math.log10)).map((place) => 10 ** place),
    y: midpoints([...chart.eccentricities]),
    z: lag,
    customdata: lag.map((row, at) =>
      row.map((value, column) => [
        `${significant(value, 3)}${nbsp}% of an orbit`,
        significant(damping[at]![column]!, 3),
        fixed(chart.eccentricities[at]!, 3),
        significant(chart.storeNumbers[column]!, 3),
      ]),
    ) as unknown as string[][],
    zmin: lagRange[0],
    zmax: lagRange[1],
    colorscale: plotlyScale(temperatureScale),
    colorbar: colourBar(
      'Lag (% of an orbit)',
      style.narrow ? plotHeight.narrow : plotHeight.wide,
      narrowAxisRoom,
      style,
    ),
    hovertemplate:
      '<b>lag %{customdata[0]}</b><br>damping %{customdata[1]}<br>eccentricity %{customdata[2]}<br>heat-store number %{customdata[3]}<extra></extra>',
  } as Data;
}

/** Bounds of the cells; the outermost nodes end the map. */
function midpoints(places: readonly number[]): number[] {
  const between = places.slice(1).map((place, at) => (place + places[at]!) / 2);
  return [places[0]!, ...between, places.at(-1)!];
}

function markers(placed: readonly PlacedCase[]): Data[] {
  return placed.map(({ caseIndex, name, place }) => ({
    type: 'scatter',
    mode: 'markers',
    name: plainLabel(name, 60),
    x: [place.storeNumber],
    y: [place.eccentricity],
    marker: { symbol: caseMarker(caseIndex), size: 12, color: '#ffffff', line: { color: '#000000', width: 1.75 } },
    cliponaxis: false,
    hovertemplate: `<b>${plainLabel(name, 60)}</b><br>${placeText(place)}<extra></extra>`,
  }));
}

/** A cross at what was read, if anything was, with a bar for its uncertainty; a side without a limit goes to the edge. */
function readingMarks(marked: MarkedReading | null, { storeNumbers }: UniversalChart): Data[] {
  if (marked === null) return [];
  const { eccentricity, reading } = marked;
  const low = reading.low ?? storeNumbers[0]!;
  const high = reading.high ?? storeNumbers.at(-1)!;
  const bar = { x: [low, high], y: [eccentricity, eccentricity] };
  return [
    { type: 'scatter', mode: 'lines', name: 'read back, edge', ...bar, line: { color: '#000000', width: 5 } },
    { type: 'scatter', mode: 'lines', name: 'read back', ...bar, line: { color: '#ffffff', width: 2.5 } },
    ...(reading.storeNumber === null
      ? []
      : [
          {
            type: 'scatter',
            mode: 'markers',
            name: 'read back',
            x: [reading.storeNumber],
            y: [eccentricity],
            marker: { symbol: 'x', size: 11, color: '#ffffff', line: { color: '#000000', width: 1.5 } },
          },
        ]),
  ].map((trace) => ({ ...trace, hoverinfo: 'skip' })) as Data[];
}

function layoutOf(
  placed: readonly PlacedCase[],
  numbers: readonly Partial<Annotation>[],
  view: View,
  style: FigureStyle,
): Partial<Layout> {
  const { narrow } = style;
  const margin = narrow ? margins.narrow : margins.wide;
  const height = narrow ? plotHeight.narrow : plotHeight.wide;
  const key = narrow ? { shapes: [], annotations: [] } : dampingKey(style);
  const size = { width: plotWidth.wide, height: plotHeight.wide };
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: {
      ...axisStyle(style),
      type: 'log',
      title: { text: 'Heat-store number 2πτ/P', standoff: 8 },
      range: [...view.x],
      ...decadeTicks(view.x, style),
      showgrid: false,
      mirror: true,
    },
    yaxis: {
      ...axisStyle(style),
      title: { text: 'Eccentricity', standoff: 10 },
      range: [...view.y],
      showgrid: false,
      mirror: true,
    },
    shapes: key.shapes,
    annotations: [...numbers, ...(narrow ? [] : placeNames(placed, view, size)), ...key.annotations],
  };
}

function legend(placed: readonly PlacedCase[]): LegendLine[] {
  return placed.map(({ caseIndex, name }) => ({
    plainName: name,
    colour: 'currentColor',
    dash: 'solid',
    marker: { shape: caseMarker(caseIndex), open: true },
  }));
}

function finding(placed: readonly PlacedCase[], marked: MarkedReading | null): string {
  const cases = placed.map(({ name, place }) => `${name}: ${placeText(place)}`);
  return [
    'The lag grows with the heat store, up to a quarter of an orbit on a nearly circular one and less on an eccentric one; the damping hardly depends on the eccentricity.',
    ...(cases.length > 0 ? [`${list(cases)}.`] : []),
    ...(marked === null || marked.reading.storeNumber === null
      ? []
      : [
          `Read back at eccentricity ${exact(marked.eccentricity)}: heat-store number ${significant(marked.reading.storeNumber, 3)}.`,
        ]),
  ].join(' ');
}
