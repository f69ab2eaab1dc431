/** Figure: the climates of every case against the input that changes, with the folds where they end; ice below. Pure. */
import type { Annotation, Data, Layout, ScatterData, Shape } from 'plotly.js-dist-min';
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { type Along, axisTitle, labelInText } from '../words/along.ts';
import { type Arc, arcsOf, type TraceCase, type TracePoint } from '../words/arcs.ts';
import { type ClimateEnd, climateEnds, foldsOf, spansOf } from '../words/climates.ts';
import { axisPlace } from '../words/gridAxes.ts';
import { unitText } from '../words/number.ts';
import { endsText } from '../words/traceAnswer.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import type { ChartLine } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { type CaseLook, foldLabels } from './foldLabels.ts';
import { namesBesideLines } from './lineNames.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour, caseMarker } from './theme.ts';
import type { View } from './view.ts';

type Panel = 'y' | 'y2';

const plotHeight = { wide: 500, narrow: 430 };
/** Shares of the height, from below. */
const panels = { ice: [0, 0.22], temperature: [0.28, 1] } as const;
const width = { stable: 2.75, unstable: 1.25 };

export function climateLoop({ cases, along }: TraceReport, style: FigureStyle): Figure {
  const looks = cases.map((oneCase, index): CaseLook => {
    return {
      oneCase,
      name: plainLabel(oneCase.name, 60),
      colour: caseColour(style.theme, index),
      shape: caseMarker(index),
    };
  });
  const view = style.view ?? {
    x: [axisPlace(along, along.from), axisPlace(along, along.to)],
    y: frameOf(cases, along),
  };
  return {
    name: 'climates-and-where-they-end',
    title: `Climates against ${labelInText(along)}, and where they end`,
    textAlternative: cases.map((oneCase) => `${oneCase.name}: ${endsText(oneCase, along)}`).join(' '),
    caption:
      'Solid: stable climates. Dashed and thin: unstable states, which no planet stays in; they divide what warms to the upper climate from what cools to the lower. Open signs: folds, where a climate ends; dotted: the jump to the climate that is left, which the way back does not undo. Below: ice, on the same axis.',
    lines: looks.map((look) => rightmost(look, along)),
    data: looks.flatMap((look) => tracesOf(look, along, style)),
    layout: loopLayout(looks, along, view, style),
    table: () => tableOf(cases, along),
  };
}

/** Every point in the order in which its branch runs, so that the lines can be drawn again. */
function tableOf(cases: readonly TraceCase[], { label, unit }: Along): FigureTable {
  return {
    columns: [
      ...['case', 'branch', 'stable', 'fold'].map(words),
      { name: label, unit },
      { name: 'Mean temperature', unit: 'K' },
      { name: 'Lowest temperature', unit: 'K' },
      { name: 'Highest temperature', unit: 'K' },
      words('ice fraction'),
    ],
    rows: cases.flatMap(({ name, branches }) =>
      branches.flatMap(({ points }, branch) =>
        points.map((point) => {
          const { stable, fold, value, temperatureMean, temperatureMin, temperatureMax, iceFraction } = point;
          return [name, branch + 1, stable, fold, value, temperatureMean, temperatureMin, temperatureMax, iceFraction];
        }),
      ),
    ),
  };
}

function tracesOf(look: CaseLook, along: Along, style: FigureStyle): Data[] {
  const arcs = arcsOf(look.oneCase).toSorted((a, b) => Number(a.stable) - Number(b.stable));
  const ends = climateEnds(look.oneCase, along);
  const folds = foldsOf(look.oneCase, along);
  return (['y2', 'y'] as const).flatMap((panel) => [
    ...arcs.map((arc) => arcTrace(arc, look, along, panel)),
    ...(panel === 'y' ? ends.flatMap((end) => jumpTrace(end, look)) : []),
    ...(folds.length > 0 ? [foldTrace(folds, look, along, panel, style)] : []),
  ]);
}

function arcTrace({ stable, points }: Arc, look: CaseLook, along: Along, panel: Panel): Data {
  return {
    ...common(points, along, panel),
    mode: 'lines',
    name: `${look.name}, ${stable ? 'stable' : 'unstable'}`,
    line: {
      color: look.colour,
      width: stable ? width.stable : width.unstable,
      dash: stable ? 'solid' : 'dash',
    },
  };
}

function foldTrace(
  folds: readonly TracePoint[],
  look: CaseLook,
  along: Along,
  panel: Panel,
  { theme }: FigureStyle,
): Data {
  return {
    ...common(folds, along, panel),
    mode: 'markers',
    name: `${look.name}, fold`,
    marker: {
      symbol: look.shape,
      size: panel === 'y' ? 10 : 7,
      color: theme.paper,
      line: { color: look.colour, width: 2 },
    },
  };
}

/** Down or up from the fold to the climate that is left, with its direction half-way. */
function jumpTrace({ point, next }: ClimateEnd, { name, colour }: CaseLook): Data[] {
  if (next === null) return [];
  const from = point.temperatureMean;
  return [
    {
      type: 'scatter',
      mode: 'lines+markers',
      name: `${name}, jump`,
      x: [point.value, point.value, point.value],
      y: [from, (from + next) / 2, next],
      line: { color: colour, width: 1.5, dash: 'dot' },
      marker: {
        symbol: next < from ? 'triangle-down' : 'triangle-up',
        size: [0, 11, 0],
        color: colour,
        opacity: 1,
        line: { width: 0 },
      },
      hoverinfo: 'skip',
    },
  ];
}

function common(points: readonly TracePoint[], along: Along, panel: Panel): Partial<ScatterData> {
  const unit = unitText(along.unit);
  return {
    type: 'scatter',
    yaxis: panel,
    x: points.map(({ value }) => value),
    y: points.map(({ temperatureMean, iceFraction }) => (panel === 'y' ? temperatureMean : iceFraction)),
    customdata: points.map((point) => [
      point.temperatureMean,
      point.temperatureMin,
      point.temperatureMax,
      point.iceFraction,
    ]),
    hovertemplate: `%{x:.5~g} ${unit}<br>mean %{customdata[0]:.1f} K (%{customdata[1]:.1f} to %{customdata[2]:.1f} K)<br>ice %{customdata[3]:.1%}`,
  };
}

function frameOf(cases: readonly TraceCase[], { from, to }: Along): [number, number] {
  const points = cases.flatMap(({ branches }) => branches.flatMap((branch) => branch.points));
  const shown = points.filter(({ value }) => value >= from && value <= to);
  const means = (shown.length > 0 ? shown : points).map(({ temperatureMean }) => temperatureMean);
  if (means.length === 0) return [0, 400];
  const [low, high] = [Math.min(...means), Math.max(...means)];
  const air = Math.max(1, 0.07 * (high - low));
  return [Math.max(0, low - air), high + air];
}

/** For legends and names: the stable line that reaches furthest to the right, the warmest of several. */
function rightmost({ oneCase, name, colour, shape }: CaseLook, along: Along): ChartLine {
  const arcs = arcsOf(oneCase).filter(({ stable }) => stable);
  const reach = (points: readonly TracePoint[]): number =>
    Math.min(along.to, Math.max(...points.map(({ value }) => value)));
  const heat = ({ points }: Arc): number => Math.max(...points.map(({ temperatureMean }) => temperatureMean));
  const [arc] = arcs.toSorted((a, b) => reach(b.points) - reach(a.points) || heat(b) - heat(a));
  const points = (arc?.points ?? []).toSorted((a, b) => a.value - b.value);
  return {
    plainName: oneCase.name,
    name,
    shortName: plainLabel(oneCase.name, 22),
    colour,
    dash: 'solid',
    width: width.stable,
    marker: { shape, open: true },
    referenceFor: null,
    x: points.map(({ value }) => axisPlace(along, value)),
    y: points.map(({ temperatureMean }) => temperatureMean),
  };
}

function loopLayout(looks: readonly CaseLook[], along: Along, view: View, style: FigureStyle): Partial<Layout> {
  const { theme, narrow } = style;
  const total = narrow ? plotHeight.narrow : plotHeight.wide;
  const margin = narrow ? { l: 56, r: 12, t: 26, b: 48 } : { l: 64, r: 200, t: 28, b: 52 };
  const height = (panels.temperature[1] - panels.temperature[0]) * total;
  const axis = { ...axisStyle(style), gridcolor: theme.hairline };
  const named = looks.map((look) => rightmost(look, along)).filter(({ x }) => x.length > 1);
  const spans = looks.length === 1 ? severalSpans(looks[0]!.oneCase, along, view, style) : null;
  return {
    ...plainLayout(style),
    height: total + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: {
      ...axisStyle(style),
      type: along.log ? 'log' : 'linear',
      title: { text: plainLabel(axisTitle(along), 60), standoff: 8 },
      range: [...view.x],
      anchor: 'y2',
      nticks: narrow ? 5 : 10,
      exponentformat: 'power',
      showgrid: false,
    },
    yaxis: {
      ...axis,
      title: { text: 'Mean temperature (K)', standoff: 10 },
      range: [...view.y],
      domain: [...panels.temperature],
    },
    yaxis2: {
      ...axis,
      title: { text: narrow ? 'Ice' : 'Ice fraction', standoff: 10 },
      range: [-0.06, 1.06],
      tickvals: [0, 0.5, 1],
      domain: [...panels.ice],
      fixedrange: true,
    },
    shapes: spans?.shapes ?? [],
    annotations: [
      ...(spans?.annotations ?? []),
      ...foldLabels(looks, along, view, height, style),
      ...(narrow ? [] : namesBesideLines(named, view, height, style)),
    ],
  };
}

/** Where more than one climate is stable: shaded, with their number. */
function severalSpans(
  oneCase: TraceCase,
  along: Along,
  view: View,
  { theme, narrow }: FigureStyle,
): { shapes: Partial<Shape>[]; annotations: Partial<Annotation>[] } {
  const spans = spansOf(oneCase, along).filter(({ climates }) => climates > 1);
  const share = (from: number, to: number): number =>
    (axisPlace(along, to) - axisPlace(along, from)) / (view.x[1] - view.x[0]);
  return {
    // A shape on a logarithmic axis takes the value itself, an annotation its logarithm.
    shapes: spans.map(({ from, to, climates }) => ({
      type: 'rect',
      name: `${climates} climates`,
      xref: 'x',
      x0: from,
      x1: to,
      yref: 'paper',
      y0: 0,
      y1: 1,
      fillcolor: theme.band,
      line: { width: 0 },
      layer: 'below',
    })),
    annotations: spans
      .filter(({ from, to }) => share(from, to) > (narrow ? 0.25 : 0.1))
      .map(({ from, to, climates }) => ({
        x: (axisPlace(along, from) + axisPlace(along, to)) / 2,
        xref: 'x',
        y: 1,
        yref: 'paper',
        yanchor: 'bottom',
        text: `${climates} climates`,
        showarrow: false,
        font: { color: theme.quiet, size: 12 },
      })),
  };
}
