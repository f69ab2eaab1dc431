/** Figure: temperature against instellation over one orbit, a line for a planet without memory and a loop for others. Pure. */
import type { Annotation, Data, Layout, ScatterData } from 'plotly.js-dist-min';
import { type Column, columnName, commonTimeUnit } from '../words/columns.ts';
import { hasLatitude } from '../words/latitude.ts';
import { moment } from '../words/moment.ts';
import { kelvin, list, significant, type TimeUnit, withUnit } from '../words/number.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, traceOf } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { lineLabels } from './lineLabels.ts';
import { lineName } from './lineNames.ts';
import { logTicks } from './logTicks.ts';
import { hasFluxSwing, loopOpening } from './loopOpening.ts';
import { momentsBetween } from './moments.ts';
import { steadyCurves } from './steadyCurves.ts';
import { stateLook } from './temperatureLines.ts';
import { throughOrbit } from './throughOrbit.ts';
import { translucent } from './translucent.ts';
import { values } from './variables.ts';
import type { View } from './view.ts';

const turn = 2 * Math.PI;
const plotHeight = { wide: 400, narrow: 320 };
/** A flux that spans more than this factor stands on a logarithmic axis. */
const widestLinear = 5;
/** Signs on each loop: one a tenth of the period. */
const beats = 10;
/** Loops narrower than this are lines to a reader. */
const leastOpening = 0.1;
/** Where on a loop its sense is shown, as shares of the way from least to most flux: apart, for loops that are nearly lines. */
const senseAt = { rising: 0.42, falling: 0.58 };

/** Columns of periodic states, at least one of them with a changing instellation; others are left out. */
export function lagLoop(all: readonly Column[], style: FigureStyle): Figure {
  const columns = all.filter(hasFluxSwing);
  const unit = commonTimeUnit(columns);
  const loops = columns.map((column) => loopOf(column, style));
  const steady = steadyCurves(columns, style.theme);
  const lines = [...steady, ...loops];
  const isLog = isWide(lines);
  const view = style.view ?? frameOf(lines, isLog);
  const what = columns.some(hasLatitude) ? 'Area-mean temperature' : 'Temperature';
  return {
    name: 'lag-loop',
    title: `The lag loop: ${what.toLowerCase()} against instellation`,
    textAlternative: columns.map((column) => finding(column, columns.length > 1)).join(' '),
    caption: caption(all, columns),
    lines,
    data: [
      ...steady.map((line) => ({ ...traceOf(line, ''), hoverinfo: 'skip' }) as Data),
      ...columns.map((column, at) => loopTrace(column, loops[at]!, unit)),
      ...columns.map((column, at) => senseTrace(column, loops[at]!, isLog)),
      ...columns.map((column, at) => beatTrace(column, loops[at]!)),
    ],
    layout: layoutOf(what, lines, isLog, view, style),
    moments: momentsBetween(columns, loopPlace),
  };
}

function loopPlace({ dataset }: Column): (share: number) => { x: number; y: number } {
  const [flux, temperature] = [throughOrbit(dataset, 'instellation'), throughOrbit(dataset, 'temperature')];
  return (share) => ({ x: flux(turn * share), y: temperature(turn * share) });
}

/** Round once, back to its first row. */
function loopOf(column: Column, { theme }: FigureStyle): ChartLine {
  const closed = (name: string): number[] => {
    const data = values(column.dataset, name);
    return [...data, data[0]!];
  };
  return { ...stateLook(column, theme), x: closed('instellation'), y: closed('temperature') };
}

function isWide(lines: readonly ChartLine[]): boolean {
  const { least, most } = span(lines.map(({ x }) => x));
  return most > widestLinear * least;
}

function span(all: readonly (readonly number[])[]): { least: number; most: number } {
  const fold = (pick: (a: number, b: number) => number): number =>
    all.map((numbers) => numbers.reduce(pick)).reduce(pick);
  return { least: fold((a, b) => Math.min(a, b)), most: fold((a, b) => Math.max(a, b)) };
}

function frameOf(lines: readonly ChartLine[], isLog: boolean): View {
  const flux = span(lines.map(({ x }) => x));
  const temperature = span(lines.map(({ y }) => y));
  const [left, right] = [flux.least, flux.most].map((value) => (isLog ? Math.log10(value) : value)) as [number, number];
  const air = { x: 0.02 * (right - left), y: Math.max(1, 0.06 * (temperature.most - temperature.least)) };
  return {
    x: [left - air.x, right + air.x],
    y: [Math.max(0, temperature.least - air.y), temperature.most + air.y],
  };
}

/** The line itself; its signs are another trace, at moments of their own. */
function loopTrace(column: Column, line: ChartLine, unit: TimeUnit): Data {
  const time = values(column.dataset, 'time');
  const steady = values(column.dataset, 'steadyTemperature');
  const rows = [...time.keys(), 0];
  const trace = traceOf({ ...line, marker: null }, '') as Partial<ScatterData>;
  return {
    ...trace,
    line: { ...trace.line, simplify: false },
    customdata: rows.map((row) => [
      kelvin(line.y[row]!),
      withUnit(significant(line.x[row]!, 4), 'W/m2'),
      moment(time[row]!, column, unit),
      kelvin(steady[row]!),
    ]) as unknown as string[][],
    hovertemplate: `${line.name}: <b>%{customdata[0]}</b><br>%{customdata[1]}, %{customdata[2]}<br>steady %{customdata[3]}<extra></extra>`,
  } as Data;
}

/** Two arrowheads, one while the starlight grows and one while it fades. */
function senseTrace(column: Column, line: ChartLine, isLog: boolean): Data {
  const flux = throughOrbit(column.dataset, 'instellation');
  const temperature = throughOrbit(column.dataset, 'temperature');
  const { least, most } = span([line.x]);
  const wanted = (share: number): number => (isLog ? least * (most / least) ** share : least + share * (most - least));
  const falling = meanWhere(flux, wanted(senseAt.falling));
  const rising = turn - meanWhere(flux, wanted(senseAt.rising));
  const means = [rising, falling].flatMap((mean) => [mean - 0.004, mean + 0.004]);
  return {
    type: 'scatter',
    mode: 'markers',
    name: `${line.name}, sense`,
    x: means.map(flux),
    y: means.map(temperature),
    marker: {
      symbol: 'arrow',
      angleref: 'previous',
      size: [0, 13, 0, 13],
      color: line.colour,
      opacity: 1,
      line: { width: 0 },
    },
    hoverinfo: 'skip',
  } as Data;
}

/** Mean anomaly between periapsis and apoapsis at which the flux has fallen to `wanted`. */
function meanWhere(flux: (mean: number) => number, wanted: number): number {
  let [near, far] = [0, Math.PI];
  for (let halving = 0; halving < 40; halving++) {
    const middle = (near + far) / 2;
    if (flux(middle) > wanted) near = middle;
    else far = middle;
  }
  return (near + far) / 2;
}

function beatTrace(column: Column, line: ChartLine): Data {
  const means = Array.from({ length: beats }, (_, at) => (turn * at) / beats);
  const { shape, open } = line.marker!;
  return {
    type: 'scatter',
    mode: 'markers',
    name: `${line.name}, tenths`,
    x: means.map(throughOrbit(column.dataset, 'instellation')),
    y: means.map(throughOrbit(column.dataset, 'temperature')),
    marker: { symbol: open ? `${shape}-open` : shape, size: 7, color: line.colour },
    hoverinfo: 'skip',
  } as Data;
}

function layoutOf(
  what: string,
  lines: readonly ChartLine[],
  isLog: boolean,
  view: View,
  style: FigureStyle,
): Partial<Layout> {
  const { theme, narrow } = style;
  const height = narrow ? plotHeight.narrow : plotHeight.wide;
  const margin = narrow ? { l: 56, r: 12, t: 12, b: 46 } : { l: 64, r: 224, t: 12, b: 50 };
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: {
      ...axisStyle(style),
      type: isLog ? 'log' : 'linear',
      title: { text: 'Instellation (W m⁻²)', standoff: 8 },
      range: [...view.x],
      nticks: narrow ? 5 : 10,
      ...(isLog ? logTicks(view.x, narrow ? 4 : 8) : {}),
      showgrid: false,
    },
    yaxis: {
      ...axisStyle(style),
      title: { text: `${what} (K)`, standoff: 6 },
      range: [...view.y],
      gridcolor: theme.hairline,
    },
    annotations: narrow ? [] : namesAtPeriapsis(lines, isLog, view, height, style),
  };
}

/** Beside the point of most starlight, where every line is at its rightmost. */
function namesAtPeriapsis(
  lines: readonly ChartLine[],
  isLog: boolean,
  view: View,
  height: number,
  style: FigureStyle,
): Partial<Annotation>[] {
  const ends = lines
    .map((line) => {
      const at = line.x.reduce((best, flux, row) => (flux > line.x[best]! ? row : best), 0);
      return { line, x: isLog ? Math.log10(line.x[at]!) : line.x[at]!, y: line.y[at]! };
    })
    .filter(({ x, y }) => x >= view.x[0] && x <= view.x[1] && y >= view.y[0] && y <= view.y[1]);
  const labels = ends.map(({ line, y }) => ({ text: lineName(line), value: y, colour: line.colour }));
  const [low, high] = view.y;
  return lineLabels(labels, { low, high, height }, style).map((label, at) => ({
    ...label,
    xref: 'x',
    x: ends[at]!.x,
    standoff: 6,
    bgcolor: translucent(style.theme.paper, 0.8),
    borderpad: 1,
  }));
}

function finding(column: Column, isOneOfMany: boolean): string {
  const { widest, flux, opposite, area } = loopOpening(column, 'temperature');
  const who = isOneOfMany ? `${columnName(column)}: ` : '';
  if (Math.abs(widest) < leastOpening) {
    return `${who}${isOneOfMany ? 'a' : 'A'} line, not a loop: under the same starlight the temperature before and after periapsis differs by less than ${kelvin(leastOpening)}.`;
  }
  const crosses = Math.abs(opposite) > 0.2 * Math.abs(widest) ? ', and the loop crosses itself' : '';
  const first = `up to ${kelvin(Math.abs(widest))} ${widest > 0 ? 'warmer' : 'cooler'} after periapsis than before it under the same starlight (${withUnit(significant(flux, 3), 'W/m2')})`;
  return `${who}${isOneOfMany ? first : `${first.charAt(0).toUpperCase()}${first.slice(1)}`}; gone round ${area > 0 ? 'against' : 'with'} the clock${crosses}.`;
}

function caption(all: readonly Column[], columns: readonly Column[]): string {
  const left = all.filter((column) => !columns.includes(column)).map((column) => `“${columnName(column)}”`);
  return [
    'One orbit in each: to the right as the starlight grows towards periapsis, back to the left after it; arrowheads show the sense, signs stand a tenth of the period apart.',
    'Dashed: the steady value. A planet without heat store would go to and fro on it; the wider the loop, the more it remembers of the starlight before, until a slow one hardly moves up or down at all.',
    ...(left.length > 0 ? [`On a circle the starlight is always the same: ${list(left)} left out.`] : []),
  ].join(' ');
}
