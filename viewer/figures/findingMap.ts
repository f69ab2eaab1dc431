/** Figure: a finding of one case over two inputs. Pure. */
import type { Annotation, Data, Layout } from 'plotly.js-dist-min';
import type { GridAxis, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { labelInText } from '../words/along.ts';
import { axisPlace, axisText, nodeText } from '../words/gridAxes.ts';
import { list } from '../words/number.ts';
import { extremesOf, type Shown, type ShownFinding, shownFinding } from '../words/shownFinding.ts';
import { plainLayout } from './chartLayout.ts';
import { plotlyScale, temperatureScale } from './colourScale.ts';
import { type ContourDrawing, levelContours } from './contourLines.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { nodesTable } from './figureTable.ts';
import { fileName } from './fileName.ts';
import { axisRange, cellEdges, gridAxisLayout } from './gridAxisLayout.ts';
import { colourBar } from './mapKey.ts';
import { plainLabel } from './plainLabel.ts';
import { caseMarker } from './theme.ts';
import { type ValueScale, valueScale } from './valueScale.ts';
import type { View } from './view.ts';

interface FindingMap {
  readonly report: GridReport;
  readonly caseIndex: number;
  readonly shown: ShownFinding;
  readonly scale: ValueScale;
  readonly x: GridAxis;
  readonly y: GridAxis;
  /** Rows along y of values along x. */
  readonly rows: readonly (readonly Shown[])[];
  readonly failed: readonly number[];
  readonly view: View;
  readonly style: FigureStyle;
}

const plotHeight = { wide: 420, narrow: 320 };
const margins = { wide: { l: 76, r: 224, t: 16, b: 54 }, narrow: { l: 62, r: 14, t: 14, b: 112 } };
/** What the lower axis takes on a phone before the colour bar begins. */
const narrowAxisRoom = 58;
/** Rough width of the map on the page, in pixels: for the room between numbers only. */
const plotWidth = { wide: 800, narrow: 290 };

/** The report has two axes; `name` is that of a finding of some case. */
export function findingMap(report: GridReport, caseIndex: number, name: string, style: FigureStyle): Figure {
  const map = mapOf(report, caseIndex, name, style);
  const { shown, rows } = map;
  const oneCase = report.cases[caseIndex]!;
  const whose = report.cases.length > 1 ? `: ${oneCase.name}` : '';
  const contours = contoursOf(map);
  const own = ownPoints(map);
  return {
    name: `${fileName(name)}-over-two-inputs${report.cases.length > 1 ? `-${caseIndex + 1}` : ''}`,
    title: `${shown.label} over ${list(report.axes.map(labelInText))}${whose}`,
    textAlternative: finding(map),
    caption: caption(map),
    lines: own.map(({ name, index }) => {
      return {
        plainName: name,
        colour: 'currentColor',
        dash: 'solid',
        marker: { shape: caseMarker(index), open: true },
      };
    }),
    data: [...(shown.range === null ? [] : [colours(map, rows)]), ...contours.data, ...marks(map)],
    layout: layoutOf(map, contours.annotations),
    table: () => nodesTable(report, shown, [caseIndex]),
  };
}

function mapOf(report: GridReport, caseIndex: number, name: string, style: FigureStyle): FindingMap {
  const [x, y] = report.axes as readonly [GridAxis, GridAxis];
  const shown = shownFinding(report, name);
  const values = shown.cases[caseIndex]!;
  const inner = y.nodes.length;
  return {
    report,
    caseIndex,
    shown,
    scale: valueScale(shown.range ?? [0, 1], shown.log),
    x,
    y,
    rows: Array.from(y.nodes, (_, row) => Array.from(x.nodes, (_, column) => values[column * inner + row] ?? null)),
    failed: report.cases[caseIndex]!.failed.map(({ node }) => node),
    view: style.view ?? { x: axisRange(x), y: axisRange(y) },
    style,
  };
}

function size({ style }: Pick<FindingMap, 'style'>): { width: number; height: number } {
  return style.narrow
    ? { width: plotWidth.narrow, height: plotHeight.narrow }
    : { width: plotWidth.wide, height: plotHeight.wide };
}

function colours({ report, shown, scale, x, y, style }: FindingMap, rows: FindingMap['rows']): Data {
  const inner = y.nodes.length;
  const { text, symbol } = shown;
  const words = rows.map((row, at) =>
    row.map((value, column) => [
      value === null ? '' : plainLabel(text(value)),
      plainLabel(nodeText(report.axes, column * inner + at), 120),
    ]),
  );
  return {
    type: 'heatmap',
    name: plainLabel(shown.label, 60),
    x: cellEdges(x),
    y: cellEdges(y),
    z: rows.map((row) => row.map((value) => (value === null ? null : scale.place(value)))),
    customdata: words as unknown as string[][],
    zmin: scale.range[0],
    zmax: scale.range[1],
    colorscale: plotlyScale(temperatureScale),
    colorbar: {
      ...colourBar(barTitle(shown.label, symbol), size({ style }).height, narrowAxisRoom, style),
      ...(shown.log ? barTicks(scale, shown) : {}),
    },
    hoverongaps: false,
    hovertemplate: '<b>%{customdata[0]}</b><br>%{customdata[1]}<extra></extra>',
  } as Data;
}

/** Two lines where one would be cut. */
function barTitle(label: string, symbol: string): string {
  const unit = symbol === '' ? '' : ` (${symbol})`;
  const words = plainLabel(label, 56).split(' ');
  const lines = [''];
  for (const word of [...words, ...unit.trim().split(' ').filter(Boolean)]) {
    if (`${lines.at(-1)} ${word}`.length > 24) lines.push(word);
    else lines[lines.length - 1] = `${lines.at(-1)} ${word}`.trim();
  }
  return lines.join('<br>');
}

/** At most five, evenly taken. */
function barTicks({ levels, place }: ValueScale, { short }: ShownFinding) {
  const whole = levels.filter((value) => Number.isInteger(Math.log10(value)));
  const offered = whole.length > 1 ? whole : levels;
  const stride = Math.ceil(offered.length / 5);
  const taken = offered.filter((_, at) => at % stride === 0);
  const bare = (value: number): string => plainLabel(short(value).split('\u00a0')[0]!);
  return { tickmode: 'array' as const, tickvals: taken.map(place), ticktext: taken.map(bare) };
}

function contoursOf(map: FindingMap): ContourDrawing {
  const { x, y, rows, scale, shown, view } = map;
  const z = rows.map((row) => row.map((value) => (value === null ? null : scale.place(value))));
  return levelContours(
    {
      x: [...x.nodes],
      y: [...y.nodes],
      mesh: {
        x: Array.from(x.nodes, (value) => axisPlace(x, value)),
        y: Array.from(y.nodes, (value) => axisPlace(y, value)),
        z,
      },
      levels: scale.levels.map((value) => ({ place: scale.place(value), text: shown.short(value) })),
      window: { ...view, ...size(map) },
    },
    { scale: temperatureScale, range: scale.range },
    ownPoints(map).map((own) => ({ x: axisPlace(x, own.x), y: axisPlace(y, own.y) })),
  );
}

interface OwnPoint {
  /** What the sign says; of cases that became one, whose it is. */
  readonly name: string;
  readonly caseName: string;
  readonly index: number;
  readonly x: number;
  readonly y: number;
}

/** Those that the scenario has within the ranges: one a member. */
function ownPoints({ report, caseIndex }: FindingMap): OwnPoint[] {
  const { members } = report.cases[caseIndex]!;
  return members.flatMap(({ name, index, own: [x, y] }) => {
    if (typeof x !== 'number' || typeof y !== 'number') return [];
    const said = members.length > 1 ? `own point of ${name}` : 'the scenario’s own point';
    return [{ name: said, caseName: name, index, x, y }];
  });
}

function marks(map: FindingMap): Data[] {
  const { failed, x, y, style } = map;
  const inner = y.nodes.length;
  const base = { type: 'scatter', mode: 'markers', cliponaxis: false } as const;
  return [
    {
      ...base,
      name: 'not computed',
      x: failed.map((node) => x.nodes[Math.floor(node / inner)]!),
      y: failed.map((node) => y.nodes[node % inner]!),
      marker: { symbol: 'x-thin', size: 6, line: { color: style.theme.quiet, width: 1.25 } },
      hovertemplate: 'not computed<extra></extra>',
    },
    ...ownPoints(map).map((own) => ({
      ...base,
      name: plainLabel(own.name, 60),
      x: [own.x],
      y: [own.y],
      marker: { symbol: caseMarker(own.index), size: 12, color: '#ffffff', line: { color: '#000000', width: 1.75 } },
      hovertemplate: `${plainLabel(own.caseName)}, as in the scenario<extra></extra>`,
    })),
  ] as Data[];
}

function layoutOf(map: FindingMap, numbers: readonly Partial<Annotation>[]): Partial<Layout> {
  const { x, y, view, style } = map;
  const margin = style.narrow ? margins.narrow : margins.wide;
  const { height } = size(map);
  return {
    ...plainLayout(style),
    height: height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    xaxis: { ...gridAxisLayout(x, view.x, style), mirror: true },
    yaxis: { ...gridAxisLayout(y, view.y, style), mirror: true },
    annotations: [...numbers, ...keyOf(map)],
  };
}

/** Beside the map, under the colour bar: what the signs are. */
function keyOf(map: FindingMap): Partial<Annotation>[] {
  const { style, failed, rows } = map;
  if (style.narrow) return [];
  const blank = rows.flat().filter((value) => value === null).length - failed.length;
  const glyphs = { circle: '○', square: '□', 'triangle-up': '△', diamond: '◇', cross: '✛', star: '☆', hexagon: '⬡' };
  const entries = [
    ...ownPoints(map).map(({ name, index }) => `${glyphs[caseMarker(index)]}  ${plainLabel(name, 26)}`),
    ...(failed.length > 0 ? ['×  not computed'] : []),
    ...(blank > 0 ? ['blank: no value'] : []),
  ];
  return entries.map((text, at) => ({
    text,
    showarrow: false,
    align: 'left',
    font: { color: style.theme.ink, size: 12 },
    x: 1,
    xref: 'paper',
    xanchor: 'left',
    xshift: 18,
    y: 1,
    yref: 'paper',
    yanchor: 'top',
    yshift: -(104 + 22 * at),
  }));
}

function finding(map: FindingMap): string {
  const { report, caseIndex, shown, failed } = map;
  const { name } = report.cases[caseIndex]!;
  const found = extremesOf(shown.cases[caseIndex]!);
  if (found === null) return `${name}: ${labelInText(shown)} has no value anywhere.`;
  const at = ({ value, node }: { value: number; node: number }): string =>
    `${shown.text(value)} at ${nodeText(report.axes, node)}`;
  const owns = ownPoints(map).map((own) => {
    const [x, y] = report.axes as readonly [GridAxis, GridAxis];
    return `${own.name[0]!.toUpperCase()}${own.name.slice(1)}: ${list([axisText(x, own.x), axisText(y, own.y)])}.`;
  });
  return [
    `${name}: lowest ${at(found.low)}; highest ${at(found.high)}.`,
    ...owns,
    ...(failed.length > 0 ? [`${failed.length} nodes were not computed.`] : []),
  ].join(' ');
}

function caption(map: FindingMap): string {
  const { report, rows, failed, shown } = map;
  const own = ownPoints(map).length;
  const nodes = rows.flat();
  const blank = nodes.filter((value) => value === null).length - failed.length;
  return [
    'Every cell is a world of its own; lines join equal values and are interpolated between the nodes.',
    ...(shown.log ? ['The colours go by the logarithm.'] : []),
    ...(own === 1 ? ['The white sign is the scenario’s own point.'] : []),
    ...(own > 1 ? ['The white signs are the scenario’s own points.'] : []),
    ...(failed.length > 0 ? [`Crosses: ${failed.length} of ${nodes.length} worlds could not be computed.`] : []),
    ...(blank > 0 ? [`Blank: in ${blank} of ${nodes.length} worlds it has no value.`] : []),
    ...(report.cases.length > 1 ? ['The colours mean the same in every case.'] : []),
  ].join(' ');
}
