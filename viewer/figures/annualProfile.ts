/** Figure: annual mean by latitude with the seasonal range as a band, over the annual-mean insolation. Pure. */
import type { Data, Layout, Shape } from 'plotly.js-dist-min';
import { zeroCelsius } from '../../sim/constants.ts';
import { type Column, columnName } from '../words/columns.ts';
import { latitudeText } from '../words/latitude.ts';
import { fixed, kelvin, nbsp, unitText } from '../words/number.ts';
import { type Bands, bandMeans, bandRanges, bandsOf, fieldOf } from './bands.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, traceOf } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { insolationGroups } from './insolationMap.ts';
import { poleToPole } from './latitudeAxis.ts';
import { latitudeAxisLayout, latitudeMargins, latitudeWords } from './latitudeChart.ts';
import { namesBesideLines } from './lineNames.ts';
import { plainLabel } from './plainLabel.ts';
import { stateLook } from './temperatureLines.ts';
import type { Theme } from './theme.ts';
import { translucent } from './translucent.ts';
import type { View } from './view.ts';
import { temperatureBands } from './windowBands.ts';
import { distinctWindows } from './windowSpans.ts';

interface Profile {
  readonly column: Column;
  readonly bands: Bands;
  readonly mean: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
  readonly line: ChartLine;
}

const plotHeight = { wide: 420, narrow: 360 };
/** Shares of the height, from below: insolation, temperature. */
const panels = { insolation: [0, 0.25], temperature: [0.32, 1] } as const;
const fluxUnit = unitText('W/m2');

/** Columns with latitude; at least one. */
export function annualProfile(columns: readonly Column[], style: FigureStyle): Figure {
  const profiles = columns.map((column) => profileOf(column, style.theme));
  const insolation = insolationGroups(columns).map((group) => insolationLine(group, columns.length, style.theme));
  const lines = profiles.map(({ line }) => line);
  const view = style.view ?? { x: poleToPole, y: frameOf(profiles) };
  return {
    name: 'annual-mean-by-latitude',
    title: 'Annual mean by latitude',
    textAlternative: profiles.map(finding).join(' '),
    caption:
      'Lines: mean over the time of one orbit. Bands: from the lowest to the highest temperature that a latitude has in it. Below: the annual mean of what arrives. Equal lengths along the axis are equal areas.',
    lines,
    data: [
      ...profiles.flatMap(rangeTraces),
      // Where some trace is filled Plotly reads the pointer's words from the last to the first.
      ...insolation.map((line) => ({ ...traceOf(line, `%{y:.1f} ${fluxUnit}`), yaxis: 'y2' as const })).toReversed(),
      ...profiles.map(meanTrace).toReversed(),
      latitudeWords(profiles[0]!.bands, view.y[0]),
    ],
    layout: profileLayout(columns, lines, view, style),
    table: () => tableOf(profiles),
  };
}

function tableOf(profiles: readonly Profile[]): FigureTable {
  return {
    columns: [
      words('case'),
      words('state'),
      { name: 'Latitude', unit: 'deg' },
      { name: 'Mean temperature', unit: 'K' },
      { name: 'Lowest temperature', unit: 'K' },
      { name: 'Highest temperature', unit: 'K' },
      { name: 'Mean insolation', unit: fluxUnit },
    ],
    rows: profiles.flatMap(({ column, bands, mean, low, high }) => {
      const { caseName, state, dataset } = column;
      const insolation = bandMeans(dataset, fieldOf(dataset, 'bandInsolation'));
      return bands.middlesDeg.map((latitudeDeg, band) => {
        return [caseName, state.label, latitudeDeg, mean[band], low[band], high[band], insolation[band]];
      });
    }),
  };
}

function profileOf(column: Column, theme: Theme): Profile {
  const field = fieldOf(column.dataset, 'bandTemperature');
  const bands = bandsOf(column.dataset);
  const mean = bandMeans(column.dataset, field);
  return {
    column,
    bands,
    mean,
    ...bandRanges(field),
    line: { ...stateLook(column, theme), x: [...bands.middles], y: mean },
  };
}

/** One that all columns share is drawn in quiet ink; another looks like the first column of its group. */
function insolationLine(group: readonly Column[], count: number, theme: Theme): ChartLine {
  const { dataset } = group[0]!;
  const look = stateLook(group[0]!, theme);
  const shared = group.length === count ? { colour: theme.ink, marker: null } : {};
  const plainName = `insolation${group.length === count ? '' : `: ${[...new Set(group.map(({ caseName }) => caseName))].join(', ')}`}`;
  return {
    ...look,
    ...shared,
    plainName,
    name: plainLabel(plainName, 60),
    shortName: plainLabel(plainName, 60),
    width: 2,
    x: [...bandsOf(dataset).middles],
    y: bandMeans(dataset, fieldOf(dataset, 'bandInsolation')),
  };
}

/** Lower and upper edge; the fill hangs on the upper. */
function rangeTraces({ line, low, high }: Profile): Data[] {
  const edge = (name: string, y: readonly number[], fill: Partial<Data>): Data =>
    ({
      type: 'scatter',
      mode: 'lines',
      name: `${line.name}, ${name}`,
      x: line.x,
      y: [...y],
      line: { color: line.colour, width: 0.75, dash: line.dash },
      hoverinfo: 'skip',
      ...fill,
    }) as Data;
  return [
    edge('lowest', low, {}),
    edge('highest', high, { fill: 'tonexty', fillcolor: translucent(line.colour, 0.16) } as Partial<Data>),
  ];
}

function meanTrace({ line, low, high }: Profile): Data {
  const range = low.map((least, band) => [least, high[band]!]);
  const hover = '%{y:.1f} K (%{customdata[0]:.1f} to %{customdata[1]:.1f} K)';
  return { ...traceOf(line, hover), customdata: range } as Data;
}

function frameOf(profiles: readonly Profile[]): [number, number] {
  const low = Math.min(...profiles.flatMap((profile) => profile.low));
  const high = Math.max(...profiles.flatMap((profile) => profile.high));
  const air = Math.max(1, 0.05 * (high - low));
  return [Math.max(0, low - air), high + air];
}

function profileLayout(
  columns: readonly Column[],
  lines: readonly ChartLine[],
  view: View,
  style: FigureStyle,
): Partial<Layout> {
  const total = style.narrow ? plotHeight.narrow : plotHeight.wide;
  const margin = style.narrow ? latitudeMargins.narrow : latitudeMargins.wide;
  const height = (panels.temperature[1] - panels.temperature[0]) * total;
  const windows = temperatureBands(
    distinctWindows(columns, 'temperature'),
    { lines, topNames: [], view, height },
    style,
  );
  const axis = { ...axisStyle(style), gridcolor: style.theme.hairline };
  return {
    ...plainLayout(style),
    height: total + margin.t + margin.b,
    margin,
    hovermode: 'x unified',
    hoversubplots: 'axis',
    xaxis: { ...latitudeAxisLayout(view.x, style), anchor: 'y2' },
    yaxis: {
      ...axis,
      title: { text: 'Temperature (K)', standoff: 10 },
      range: [...view.y],
      domain: [...panels.temperature],
    },
    yaxis2: {
      ...axis,
      title: { text: style.narrow ? fluxUnit : `Insolation (${fluxUnit})`, standoff: 10 },
      rangemode: 'tozero',
      domain: [...panels.insolation],
      fixedrange: true,
      nticks: 4,
    },
    shapes: [...windows.shapes, freezing(style)],
    annotations: [...windows.annotations, ...(style.narrow ? [] : namesBesideLines(lines, view, height, style))],
  };
}

function freezing({ theme }: FigureStyle): Partial<Shape> {
  const line = { color: theme.bandEdge, width: 1, dash: 'dot' } as const;
  return {
    type: 'line',
    name: 'freezing',
    xref: 'paper',
    x0: 0,
    x1: 1,
    yref: 'y',
    y0: zeroCelsius,
    y1: zeroCelsius,
    line,
    layer: 'below',
  };
}

function finding({ column, bands, mean, low, high }: Profile): string {
  const at = (band: number): string => latitudeText(bands.middlesDeg[band]!);
  const best = (sign: 1 | -1, numbers: readonly number[]): number =>
    numbers.reduce((found, value, band) => (sign * (value - numbers[found]!) > 0 ? band : found), 0);
  const [warmest, coldest] = [best(1, mean), best(-1, mean)];
  const ranges = high.map((most, band) => most - low[band]!);
  const widest = best(1, ranges);
  return `${columnName(column)}: the annual mean goes from ${kelvin(mean[coldest]!)} at ${at(coldest)} to ${kelvin(mean[warmest]!)} at ${at(warmest)}; the seasonal range is largest at ${at(widest)}, ${fixed(ranges[widest]!, 1)}${nbsp}K.`;
}
