/** Figure: how the draws of one finding are distributed, case by case, with the textbook's value and the run's. Pure. */
import type { Annotation, Data, Layout, Shape } from 'plotly.js-dist-min';
import type { Histogram, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { inText, ledBy } from '../words/importance.ts';
import { keptPercents, nbsp, percent } from '../words/number.ts';
import type { FindingInCase, SharedFinding } from '../words/spreadFindings.ts';
import { findingOf, findingWording, labelWithSymbol, scaleOf, type Wording } from '../words/spreadNumber.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { type Panel, type PanelGrid, panelAxes, panelGrid, panelName } from './panels.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour } from './theme.ts';
import { translucent } from './translucent.ts';

interface Bars {
  readonly member: FindingInCase;
  readonly histogram: Histogram;
  readonly panel: Panel;
  readonly colour: string;
  readonly words: Wording;
  readonly marks: readonly Mark[];
}

type Range = readonly [number, number];

interface Mark {
  readonly label: string;
  readonly short: string;
  /** As shown on the axis. */
  readonly value: number;
  readonly text: string;
  readonly dash: 'solid' | 'dash';
}

const panelHeights = { alone: 260, several: 150 };
/** Bars within the 68 % interval, within the 95 % interval, beyond. */
const opacities = [0.85, 0.5, 0.22] as const;

/** Differences of temperature, beside which the textbook's temperature means nothing. */
const differences = /^(contrast|seasonalRange)/;

export function spreadHistogram(shared: SharedFinding, report: SpreadReport, style: FigureStyle): Figure {
  const { name, label, inCases } = shared;
  const shown = inCases.filter(({ finding }) => finding.histogram !== null);
  const grid = panelGrid(
    Math.max(1, shown.length),
    1,
    shown.length > 1 ? panelHeights.several : panelHeights.alone,
    style,
  );
  const bars = shown.map((member, at) => barsOf(member, grid.panels[at]!, report, style));
  return {
    name: `histogram-${name}`,
    title: `The draws: ${inText(label)}`,
    textAlternative: inCases.map((one) => ledBy(one.oneCase.name, sentence(one, report), report.cases)).join(' '),
    caption: captionOf(shared, bars),
    lines: [],
    data: bars.map(traceOf),
    layout: layoutOf(bars, shared, report, grid, style),
    table: () => tableOf(bars, label, scaleOf(shared, report.cases).symbol),
  };
}

/** A row for each bin; beside it, what the case's marks say. */
function tableOf(bars: readonly Bars[], label: string, unit: string): FigureTable {
  return {
    columns: [
      words('case'),
      { name: `${label} from`, unit },
      { name: `${label} to`, unit },
      words('draws'),
      words('share of the draws'),
      { name: 'every input at its centre', unit },
      { name: 'textbook', unit },
    ],
    rows: bars.flatMap(({ member, histogram, words: { scale }, marks }) => {
      const { from, to, counts, beyond } = histogram;
      const width = (to - from) / counts.length / scale.one;
      const total = counts.reduce((sum, count) => sum + count, 0) + beyond;
      const mark = (wanted: Mark['short']) => marks.find(({ short }) => short === wanted)?.value;
      return counts.map((count, bin) => [
        member.oneCase.name,
        from / scale.one + bin * width,
        from / scale.one + (bin + 1) * width,
        count,
        count / Math.max(1, total),
        mark('centre'),
        mark('textbook'),
      ]);
    }),
  };
}

function barsOf(member: FindingInCase, panel: Panel, { cases }: SpreadReport, { theme }: FigureStyle): Bars {
  const words = findingWording(member.finding, cases);
  return {
    member,
    histogram: member.finding.histogram!,
    panel,
    colour: caseColour(theme, member.caseIndex),
    words,
    marks: marksOf(member, words),
  };
}

/** The run at the centre, and for a temperature the textbook's number. */
function marksOf({ oneCase, finding }: FindingInCase, words: Wording): Mark[] {
  const mark = (label: string, short: string, si: number, dash: Mark['dash']): Mark => {
    return { label, short, value: si / words.scale.one, text: words.text(si), dash };
  };
  const textbook = findingOf(oneCase, 'equilibriumTemperature');
  const isTemperature = finding.unit === 'K' && !differences.test(finding.name) && finding.name !== textbook?.name;
  const centre = finding.atCentre;
  return [
    ...(centre === null ? [] : [mark('every input at its centre', 'centre', centre, 'solid')]),
    ...(isTemperature && textbook && textbook.atCentre !== null
      ? [mark('textbook', 'textbook', textbook.atCentre, 'dash')]
      : []),
  ];
}

function traceOf({ member, histogram, panel, colour, words }: Bars): Data {
  const { from, to, counts, beyond } = histogram;
  const width = (to - from) / counts.length;
  const total = counts.reduce((sum, count) => sum + count, 0) + beyond;
  const levels = member.finding.summary.percentiles;
  const opacity = (middle: number): number => {
    if (levels === null) return opacities[1];
    if (middle >= levels['16'] && middle <= levels['84']) return opacities[0];
    return middle >= levels['2.5'] && middle <= levels['97.5'] ? opacities[1] : opacities[2];
  };
  const middles = counts.map((_, bin) => from + (bin + 0.5) * width);
  return {
    type: 'bar',
    name: plainLabel(member.oneCase.name, 60),
    x: middles.map((middle) => middle / words.scale.one),
    y: counts.map((count) => (100 * count) / Math.max(1, total)),
    width: width / words.scale.one,
    xaxis: panel.x,
    yaxis: panel.y,
    marker: { color: middles.map((middle) => translucent(colour, opacity(middle))), line: { width: 0 } },
    customdata: middles.map((middle) => `${words.interval(middle - width / 2, middle + width / 2)}`),
    hovertemplate: '%{customdata}: %{y:.1f} % of the draws<extra></extra>',
  } as Data;
}

/** Values on the axis: the bins, and marks that do not squeeze them below half of the width. */
function rangeOf(bars: readonly Bars[]): [number, number] {
  const ends = bars.flatMap(({ histogram, words }) => [
    histogram.from / words.scale.one,
    histogram.to / words.scale.one,
  ]);
  const [low, high] = [Math.min(...ends), Math.max(...ends)];
  const room = high - low || Math.abs(high) || 1;
  const marks = bars.flatMap(({ marks: own }) => own.map(({ value }) => value));
  const near = marks.filter((value) => value > low - 0.6 * room && value < high + 0.6 * room);
  const [left, right] = [Math.min(low, ...near), Math.max(high, ...near)];
  const air = 0.03 * (right - left || room);
  return [left - air, right + air];
}

function layoutOf(
  bars: readonly Bars[],
  { label, name, unit }: SharedFinding,
  report: SpreadReport,
  grid: PanelGrid,
  style: FigureStyle,
): Partial<Layout> {
  const { theme, narrow } = style;
  const several = bars.length > 1;
  const isNamed = report.cases.length > 1;
  const margin = narrow ? { l: 48, r: 14, t: isNamed ? 28 : 40, b: 48 } : { l: 64, r: 24, t: isNamed ? 30 : 42, b: 52 };
  const range: Range = bars.length > 0 ? (style.view?.x ?? rangeOf(bars)) : [0, 1];
  const title = plainLabel(labelWithSymbol(label, scaleOf({ name, unit }, report.cases)), narrow ? 46 : 80);
  return {
    ...plainLayout(style),
    height: grid.height + margin.t + margin.b,
    margin,
    bargap: 0,
    hovermode: 'closest',
    ...panelAxes(grid, (panel) => ({
      x: {
        ...axisStyle(style),
        range: [...range],
        ...(panel.x === 'x' ? {} : { matches: 'x' as const }),
        title: { text: panel.isBottom ? title : '', standoff: 8 },
        nticks: narrow ? 5 : 10,
        showgrid: false,
      },
      y: {
        ...axisStyle(style),
        rangemode: 'tozero',
        fixedrange: true,
        nticks: several ? 3 : 5,
        ticksuffix: narrow ? '' : `${nbsp}%`,
        title: { text: several ? '' : narrow ? '% of draws' : 'Draws', standoff: 8 },
        gridcolor: theme.hairline,
      },
    })),
    shapes: bars.flatMap((one) => one.marks.flatMap((mark) => markLines(mark, one, range, style))),
    annotations: [
      ...(isNamed
        ? bars.map(({ panel, member }) => panelName(panel, member.oneCase.name, member.caseIndex, style))
        : []),
      ...bars.flatMap((one) => markNames(one, range, style)),
      ...(bars.length === 0 ? [emptyNote(style)] : []),
    ],
  };
}

function isWithin(value: number, [from, to]: Range): boolean {
  return value >= from && value <= to;
}

/** With an edge of paper, so that it stands out from bars of its own colour. */
function markLines(
  { value, label, dash }: Mark,
  { panel }: Bars,
  range: Range,
  { theme }: FigureStyle,
): Partial<Shape>[] {
  if (!isWithin(value, range)) return [];
  const line = (name: string, color: string, width: number, dashed: Mark['dash']): Partial<Shape> => ({
    type: 'line',
    name,
    xref: panel.x,
    x0: value,
    x1: value,
    yref: `${panel.y} domain` as 'y',
    y0: 0,
    y1: 1,
    line: { color, width, dash: dashed },
    layer: 'above',
  });
  return [line(`edge of ${label}`, theme.paper, 4, 'solid'), line(label, theme.ink, 2, dash)];
}

/** Beside their lines, each on the side away from the other; at the edge, with an arrow, where the line lies beyond it. */
function markNames({ marks, panel }: Bars, [from, to]: Range, { theme, narrow }: FigureStyle): Partial<Annotation>[] {
  const inOrder = marks.toSorted((a, b) => a.value - b.value);
  const places = inOrder.map(({ value }) => Math.min(to, Math.max(from, value)));
  const needed = narrow ? 0.36 : 0.2;
  const onLeft = places.map((at, place) => {
    const share = (at - from) / (to - from);
    return inOrder.length > 1 && place === 0 ? share > needed : share > 1 - needed;
  });
  return inOrder.map((mark, place) => ({
    text: `${arrow(mark.value, from, to)}${narrow ? mark.short : mark.label} <b>${mark.text}</b>`,
    showarrow: false,
    x: places[place]!,
    xref: panel.x,
    xanchor: onLeft[place] ? 'right' : 'left',
    xshift: onLeft[place] ? -5 : 5,
    y: panel.yDomain[1],
    yref: 'paper',
    yanchor: 'top',
    yshift: place > 0 && meets(places, onLeft, needed * (to - from)) ? -18 : 0,
    bgcolor: translucent(theme.paper, 0.75),
    borderpad: 1,
    font: { color: theme.ink, size: 12 },
  }));
}

function arrow(value: number, from: number, to: number): string {
  return value < from ? '← ' : value > to ? '→ ' : '';
}

/** Whether two names would meet on one line; `width` is the room of one. */
function meets([one, other]: readonly number[], [oneOnLeft, otherOnLeft]: readonly boolean[], width: number): boolean {
  const gap = other! - one!;
  if (oneOnLeft === otherOnLeft) return gap < width;
  return !oneOnLeft && gap < 2 * width;
}

function emptyNote({ theme }: FigureStyle): Partial<Annotation> {
  return {
    text: 'Fewer than two draws have this number.',
    showarrow: false,
    x: 0.5,
    xref: 'paper',
    y: 0.5,
    yref: 'paper',
    font: { color: theme.quiet },
  };
}

function sentence({ oneCase, finding }: FindingInCase, { cases }: SpreadReport): string {
  const { percentiles, defined, reason } = finding.summary;
  const words = findingWording(finding, cases);
  const exists = defined < 1 ? ` ${percent(defined)} of the draws have it.` : '';
  if (percentiles === null) return `none; ${reason ?? 'not defined'}.`;
  const marks = marksOf({ oneCase, finding, caseIndex: 0 }, words).map(({ label, text }) => `${label} ${text}`);
  const beside = marks.length > 0 ? `; ${marks.join(', ')}` : '';
  return `median ${words.text(percentiles['50'])}, 68${nbsp}% within ${words.interval(percentiles['16'], percentiles['84'])}, 95${nbsp}% within ${words.interval(percentiles['2.5'], percentiles['97.5'])}${beside}.${exists}`;
}

function captionOf({ inCases }: SharedFinding, bars: readonly Bars[]): string {
  const hasTextbook = bars.some(({ marks }) => marks.some(({ short }) => short === 'textbook'));
  const beyond = bars.some(({ histogram }) => histogram.beyond > 0);
  const isCircular = inCases.some(({ finding }) => finding.circular);
  const sentences = [
    'Share of the draws in bins of equal width; darkest within the 68 % interval, palest beyond the 95 % interval.',
    `Solid line: the run with every input at its centre.${hasTextbook ? ' Dashed: the textbook equilibrium temperature there.' : ''}`,
    ...(bars.length > 1 ? ['Each case has its own height.'] : []),
    ...(isCircular ? ['Below 0: before periapsis, at the end of the turn before.'] : []),
    ...(beyond ? ['A few draws lie beyond the bins shown.'] : []),
  ];
  return keptPercents(sentences.join(' '));
}
