/** Figure: the orbit seen from above, to scale, coloured by temperature. One column at a time. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import { radiansPerDegree } from '../../sim/constants.ts';
import { meanFromTrue, trueFromEccentric, trueFromMean } from '../../sim/orbit/anomaly.ts';
import type { Radians } from '../../sim/si.ts';
import { type Column, columnName, commonTimeUnit, periodOf } from '../words/columns.ts';
import { hasLatitude } from '../words/latitude.ts';
import { timeText } from '../words/moment.ts';
import { fixed, kelvin, significant, withUnit } from '../words/number.ts';
import { plainLayout } from './chartLayout.ts';
import { colourAt, inkOn, plotlyScale, temperatureScale } from './colourScale.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { colourBar } from './mapKey.ts';
import { momentsBetween } from './moments.ts';
import { circleNames, circles, lines, sightEnd, starDisc } from './orbitLines.ts';
import type { MarkKind } from './orbitMarks.ts';
import { markNames } from './orbitNames.ts';
import { leastStar, lengthText, type Plan, planOf, spotAt } from './orbitPlan.ts';
import { conjunctions, distanceAt, headingAt } from './orbitShape.ts';
import { orbitCaption, orbitFinding } from './orbitWords.ts';
import { throughOrbit } from './throughOrbit.ts';

const turn = 2 * Math.PI;
/** Spots of colour along the path: closer together than they are wide. */
const spots = { wide: 480, narrow: 300 };
const band = { width: 9, rim: 13 };
/** Arrowheads: one each tenth of the period. */
const beats = 10;

/** `columns` are periodic and share the scale of colours; `shown` is the place of the one that this figure shows. */
export function orbitFromAbove(columns: readonly Column[], shown: number, style: FigureStyle): Figure {
  const plan = planOf(columns, shown, style);
  const { column } = plan;
  const isOneOfMany = columns.length > 1;
  return {
    name: `orbit-from-above${isOneOfMany ? `-${shown + 1}` : ''}`,
    title: `The orbit from above, coloured by ${hasLatitude(column) ? 'area-mean ' : ''}temperature${isOneOfMany ? `: ${columnName(column)}` : ''}`,
    textAlternative: orbitFinding(plan),
    caption: orbitCaption(plan, isOneOfMany),
    lines: [],
    data: [rim(plan), path(plan), arrowheads(plan), starDot(), ...signs(plan), ...sightHead(plan)],
    layout: layoutOf(plan),
    moments: momentsBetween(
      [column],
      () => (share) => spotAt(plan, trueFromMean(turn * share, plan.shape.eccentricity)),
    ),
  };
}

/** True anomalies at equal steps of the eccentric anomaly, the first once more at the end. */
function anomalies({ shape: { eccentricity }, style }: Plan): Radians[] {
  const count = style.narrow ? spots.narrow : spots.wide;
  return Array.from({ length: count + 1 }, (_, at) => trueFromEccentric((turn * at) / count, eccentricity));
}

/** Sets the band off from the paper, whatever its colour. */
function rim(plan: Plan): Data {
  const places = anomalies(plan).map((nu) => spotAt(plan, nu));
  return {
    type: 'scatter',
    mode: 'lines',
    name: 'path',
    x: places.map(({ x }) => x),
    y: places.map(({ y }) => y),
    line: { color: plan.style.theme.bandEdge, width: band.rim, simplify: false },
    hoverinfo: 'skip',
  };
}

function path(plan: Plan): Data {
  const { column, shape, unit, range, style } = plan;
  const { dataset } = column;
  const along = anomalies(plan).slice(0, -1);
  const places = along.map((nu) => spotAt(plan, nu));
  const means = along.map((nu) => meanFromTrue(nu, shape.eccentricity));
  const temperature = throughOrbit(dataset, 'temperature');
  const steady = throughOrbit(dataset, 'steadyTemperature');
  const flux = throughOrbit(dataset, 'instellation');
  const time = commonTimeUnit([column]);
  return {
    type: 'scatter',
    mode: 'markers',
    name: 'temperature',
    x: places.map(({ x }) => x),
    y: places.map(({ y }) => y),
    marker: {
      size: band.width,
      color: means.map(temperature),
      colorscale: plotlyScale(temperatureScale),
      cmin: range[0],
      cmax: range[1],
      opacity: 1,
      line: { width: 0 },
      colorbar: { ...colourBar('Temperature (K)', plan.height, 8, style), tickangle: 0, nticks: 5 },
    },
    customdata: along.map((nu, at) => [
      kelvin(temperature(means[at]!)),
      kelvin(steady(means[at]!)),
      timeText((means[at]! / turn) * periodOf(column), column, time),
      `${fixed(nu / radiansPerDegree, 1)}°`,
      lengthText(distanceAt(shape, nu), unit),
      withUnit(significant(flux(means[at]!), 4), 'W/m2'),
    ]) as unknown as string[][],
    hovertemplate:
      '<b>%{customdata[0]}</b> (steady %{customdata[1]})<br>%{customdata[2]} after periapsis<br>true anomaly %{customdata[3]}<br>%{customdata[4]} from the star, %{customdata[5]}<extra></extra>',
  } as Data;
}

/** Which way the planet goes, and how fast: closer together where it is slow. */
function arrowheads(plan: Plan): Data {
  const { column, shape, range } = plan;
  const temperature = throughOrbit(column.dataset, 'temperature');
  const means = Array.from({ length: beats }, (_, at) => (turn * (at + 0.5)) / beats);
  const along = means.map((mean) => trueFromMean(mean, shape.eccentricity));
  const places = along.map((nu) => spotAt(plan, nu));
  const headings = along.map((nu) => headingAt(shape, nu));
  return {
    type: 'scatter',
    mode: 'markers',
    name: 'motion',
    x: places.map(({ x }) => x),
    y: places.map(({ y }) => y),
    marker: {
      symbol: 'arrow',
      size: band.width,
      angle: headings.map(({ x, y }) => Math.atan2(x, y) / radiansPerDegree),
      color: means.map((mean) => inkOn(colourAt(temperatureScale, temperature(mean), range))),
      line: { width: 0 },
    },
    hoverinfo: 'skip',
  } as Data;
}

/** What a pointer finds in the middle. */
function starDot(): Data {
  return {
    type: 'scatter',
    mode: 'markers',
    name: 'star',
    x: [0],
    y: [0],
    marker: { size: leastStar, opacity: 0 },
    hovertemplate: 'star<extra></extra>',
  };
}

const symbols: Readonly<Record<MarkKind, string>> = {
  periapsis: 'line-ew',
  apoapsis: 'line-ew',
  hottest: 'triangle-up',
  coldest: 'triangle-down',
  transit: 'circle',
  eclipse: 'circle',
};

function signs(plan: Plan): Data[] {
  const { marks, style } = plan;
  return marks.map(({ kind, trueAnomaly }) => {
    const { x, y } = spotAt(plan, trueAnomaly);
    const isTick = symbols[kind] === 'line-ew';
    return {
      type: 'scatter',
      mode: 'markers',
      name: kind,
      x: [x],
      y: [y],
      marker: {
        symbol: symbols[kind],
        size: isTick ? 20 : kind === 'hottest' || kind === 'coldest' ? 11 : 8,
        color: '#ffffff',
        line: { color: isTick ? style.theme.ink : '#000000', width: 1.5 },
      },
      hoverinfo: 'skip',
    } as Data;
  });
}

function layoutOf(plan: Plan): Partial<Layout> {
  const { view, height, style } = plan;
  const margin = style.narrow ? { l: 4, r: 4, t: 4, b: 64 } : { l: 8, r: 136, t: 8, b: 8 };
  const bare = { showgrid: false, zeroline: false, showticklabels: false, ticks: '' } as const;
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: { ...bare, range: [...view.x] },
    yaxis: { ...bare, range: [...view.y], scaleanchor: 'x', scaleratio: 1 },
    shapes: [...circles(plan), ...lines(plan), starDisc(plan)],
    annotations: [...circleNames(plan), ...markNames(plan)],
  };
}

function sightHead(plan: Plan): Data[] {
  const seen = conjunctions(plan.column);
  if (seen === null) return [];
  const { x, y } = sightEnd(plan, seen.transit);
  return [
    {
      type: 'scatter',
      mode: 'markers',
      name: 'to the observer',
      x: [x],
      y: [y],
      marker: { symbol: 'arrow', size: 10, angle: 90 - seen.transit / radiansPerDegree, color: plan.style.theme.quiet },
      hoverinfo: 'skip',
    } as Data,
  ];
}
