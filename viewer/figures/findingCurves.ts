/** Figure: a finding of all cases along one input. Pure. */
import type { Annotation, Data, Layout, Shape } from 'plotly.js-dist-min';
import type { GridAxis, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { labelInText } from '../words/along.ts';
import { axisPlace, nodeText, rangeOf } from '../words/gridAxes.ts';
import { lookOf, membersOf } from '../words/gridMembers.ts';
import { list } from '../words/number.ts';
import { extremesOf, type ShownFinding, shownFinding } from '../words/shownFinding.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import { type ChartLine, glyph, traceOf } from './chartLine.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { nodesTable } from './figureTable.ts';
import { fileName } from './fileName.ts';
import { axisRange, gridAxisLayout } from './gridAxisLayout.ts';
import { namesBesideLines } from './lineNames.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour, caseMarker } from './theme.ts';
import { type ValueScale, valueScale } from './valueScale.ts';
import type { View } from './view.ts';

const plotHeight = { wide: 400, narrow: 320 };
/** Failed worlds that are marked, a case. */
const mostCrosses = 60;

/** The report has one axis; `name` is that of a finding of some case. */
export function findingCurves(report: GridReport, name: string, style: FigureStyle): Figure {
  const axis = report.axes[0]!;
  const shown = shownFinding(report, name);
  const scale = valueScale(shown.range ?? [0, 1], shown.log);
  const lines = report.cases.map((_, at) => lineOf(report, at, shown, style));
  const view = style.view ?? { x: axisRange(axis), y: framed(scale) };
  return {
    name: `${fileName(name)}-along-one-input`,
    title: `${shown.label} against ${labelInText(rangeOf(axis))}`,
    textAlternative: report.cases.map((_, at) => finding(report, at, shown)).join(' '),
    caption: caption(report, shown),
    lines,
    data: lines.map((line, at) => gapped(line, shown, at, report)),
    layout: layoutOf(report, axis, shown, scale, lines, view, style),
    table: () => nodesTable(report, shown, [...report.cases.keys()]),
  };
}

/** Nodes that have a value. */
function lineOf(report: GridReport, at: number, shown: ShownFinding, { theme }: FigureStyle): ChartLine {
  const values = shown.cases[at]!;
  const nodes = Array.from(report.axes[0]!.nodes).flatMap((x, node) => {
    const y = values[node] ?? null;
    return y === null ? [] : [{ x, y }];
  });
  const { name } = report.cases[at]!;
  const look = lookOf(report.cases[at]!);
  return {
    plainName: name,
    name: plainLabel(name, 60),
    shortName: plainLabel(name, 22),
    colour: caseColour(theme, look),
    dash: 'solid',
    width: 2.5,
    marker: { shape: caseMarker(look), open: false },
    referenceFor: null,
    x: nodes.map(({ x }) => x),
    y: nodes.map(({ y }) => y),
  };
}

/** With gaps where there is no value. */
function gapped(line: ChartLine, shown: ShownFinding, at: number, report: GridReport): Data {
  const values = shown.cases[at]!;
  const words = values.map((value) => (value === null ? '' : plainLabel(shown.text(value))));
  return {
    ...traceOf(line, '%{customdata}'),
    x: [...report.axes[0]!.nodes],
    y: values.length > 0 ? [...values] : report.axes[0]!.nodes.length > 0 ? [null] : [],
    customdata: words,
    connectgaps: false,
  } as Data;
}

function framed({ range: [low, high] }: ValueScale): [number, number] {
  const air = 0.06 * (high - low);
  return [low - air, high + air];
}

function layoutOf(
  report: GridReport,
  axis: GridAxis,
  shown: ShownFinding,
  scale: ValueScale,
  lines: readonly ChartLine[],
  view: View,
  style: FigureStyle,
): Partial<Layout> {
  const { narrow, theme } = style;
  const height = narrow ? plotHeight.narrow : plotHeight.wide;
  const margin = narrow ? { l: 62, r: 14, t: 26, b: 50 } : { l: 76, r: 200, t: 28, b: 54 };
  const placed = lines
    .map((line) => ({ ...line, x: line.x.map((x) => axisPlace(axis, x)), y: line.y.map(scale.place) }))
    .filter(({ x }) => x.length > 1);
  const own = ownPoints(report, axis, style);
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'x unified',
    xaxis: { ...gridAxisLayout(axis, view.x, style) },
    yaxis: {
      ...axisStyle(style),
      type: shown.log ? 'log' : 'linear',
      title: { text: axisWords(shown, style), standoff: 10 },
      range: [...view.y],
      nticks: 7,
      exponentformat: 'power',
      gridcolor: theme.hairline,
    },
    shapes: own.shapes,
    annotations: [
      ...own.annotations,
      ...crosses(report, axis, style),
      ...(narrow ? [] : namesBesideLines(placed, view, height, style)),
    ],
  };
}

function axisWords({ label, symbol }: ShownFinding, { narrow }: FigureStyle): string {
  const words = plainLabel(label, narrow ? 34 : 48);
  return symbol === '' ? words : `${words} (${symbol})`;
}

/** A dotted upright at each own point, said once where the cases share it. */
function ownPoints(
  report: GridReport,
  axis: GridAxis,
  { theme }: FigureStyle,
): { shapes: Partial<Shape>[]; annotations: Partial<Annotation>[] } {
  const places = new Map<number, number[]>();
  const members = membersOf(report);
  for (const { own, index } of members) {
    const [value] = own;
    if (typeof value === 'number') places.set(value, [...(places.get(value) ?? []), index]);
  }
  const all = [...places.entries()];
  return {
    shapes: all.map(([value]) => ({
      type: 'line',
      name: 'the scenario’s own point',
      xref: 'x',
      x0: value,
      x1: value,
      yref: 'paper',
      y0: 0,
      y1: 1,
      line: { color: theme.bandEdge, width: 1.25, dash: 'dot' },
      layer: 'below',
    })),
    annotations: all.map(([value, owners]) => ({
      x: axisPlace(axis, value),
      xref: 'x',
      y: 1,
      yref: 'paper',
      yanchor: 'bottom',
      text:
        owners.length === members.length
          ? 'own point'
          : owners.map((at) => `<span style="color:${caseColour(theme, at)}">${sign(at)}</span>`).join(' '),
      showarrow: false,
      font: { color: theme.quiet, size: 12 },
    })),
  };
}

function sign(at: number): string {
  return glyph({ shape: caseMarker(at), open: false });
}

/** On the axis, where a world could not be computed. */
function crosses(report: GridReport, axis: GridAxis, { theme }: FigureStyle): Partial<Annotation>[] {
  return report.cases.flatMap(({ failed, members }, at) =>
    failed.slice(0, mostCrosses).map(({ node }) => ({
      x: axisPlace(axis, axis.nodes[node]!),
      xref: 'x' as const,
      y: 0,
      yref: 'paper' as const,
      yanchor: 'bottom' as const,
      yshift: 9 * at,
      text: '×',
      showarrow: false,
      font: { color: caseColour(theme, lookOf({ members })), size: 13 },
    })),
  );
}

function finding(report: GridReport, at: number, shown: ShownFinding): string {
  const { name, failed } = report.cases[at]!;
  const found = extremesOf(shown.cases[at]!);
  const missing = failed.length > 0 ? ` ${failed.length} worlds were not computed.` : '';
  if (found === null) return `${name}: no value anywhere.${missing}`;
  const { low, high } = found;
  const words = ({ value, node }: { value: number; node: number }): string =>
    `${shown.text(value)} at ${nodeText(report.axes, node)}`;
  if (shown.text(low.value) === shown.text(high.value))
    return `${name}: ${shown.text(low.value)} throughout.${missing}`;
  return `${name}: lowest ${words(low)}; highest ${words(high)}.${missing}`;
}

function caption(report: GridReport, shown: ShownFinding): string {
  const { cases, axes } = report;
  const failed = cases.reduce((sum, one) => sum + one.failed.length, 0);
  const nodes = cases.length * axes[0]!.nodes.length;
  const blank = shown.cases.flat().filter((value) => value === null).length - failed;
  return [
    `${axes[0]!.nodes.length} worlds a case, joined by straight lines.`,
    ...ownWords(report),
    ...(failed > 0 ? [`Crosses on the axis: ${failed} of ${nodes} worlds could not be computed.`] : []),
    ...(blank > 0 ? [`The lines break where there is no value, in ${blank} of ${nodes} worlds.`] : []),
  ].join(' ');
}

/** The signs of cases that share a line are nowhere else. */
function ownWords(report: GridReport): string[] {
  const owners = membersOf(report).filter(({ own: [value] }) => typeof value === 'number');
  if (owners.length === 0) return [];
  if (!report.cases.some(({ members }) => members.length > 1)) return ['Dotted: the scenario’s own point.'];
  const signs = owners.map(({ name, index }) => `${sign(index)}\u00a0${name}`);
  return [`Dotted: the scenario’s own points, ${list(signs)}.`];
}
