/** Figure: the draws of any finding against those of any input, a panel for each case. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import { unwrapTurn } from '../../sim/studies/spread/circular.ts';
import type { SpreadCase, SpreadFinding, SpreadInput, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { inText, ledBy } from '../words/importance.ts';
import { fixed, nbsp, unitText } from '../words/number.ts';
import { rankCorrelation } from '../words/rankCorrelation.ts';
import type { FindingInCase, SharedFinding } from '../words/spreadFindings.ts';
import { findingOf, labelWithSymbol, scaleOf, turnOf } from '../words/spreadNumber.ts';
import { axisStyle, plainLayout } from './chartLayout.ts';
import type { Figure, FigureStyle } from './figure.ts';
import { type FigureTable, words } from './figureTable.ts';
import { type PanelGrid, panelAxes, panelGrid, panelName } from './panels.ts';
import { plainLabel } from './plainLabel.ts';
import { caseColour } from './theme.ts';
import { translucent } from './translucent.ts';
import type { View } from './view.ts';

interface Cloud {
  readonly member: FindingInCase;
  readonly input: SpreadInput;
  readonly x: readonly number[];
  /** As shown on the axis. */
  readonly y: readonly number[];
  readonly centre: { readonly x: number; readonly y: number } | null;
}

/** More are drawn no clearer, and slow the page. */
export const mostPoints = 1500;
const panelHeights = { alone: 400, beside: 320, narrow: 260 };
/** Inputs that span more than this are shown by their logarithm. */
const widestLinear = 10;

export function spreadScatter(
  shared: SharedFinding,
  inputKey: string,
  report: SpreadReport,
  style: FigureStyle,
): Figure {
  const clouds = shared.inCases.flatMap((member) => cloudOf(member, inputKey, report) ?? []);
  const count = Math.max(1, clouds.length);
  const height = style.narrow ? panelHeights.narrow : count > 1 ? panelHeights.beside : panelHeights.alone;
  const grid = panelGrid(count, count === 4 ? 2 : 3, height, style);
  const label = clouds[0]?.input.label ?? inputKey;
  const shown = clouds.map(({ x }) => x.length);
  return {
    name: `scatter-${shared.name}-${inputKey}`.replaceAll(/[^A-Za-z0-9.-]+/g, '-'),
    title: `${shared.label} against ${inText(label)}`,
    textAlternative:
      clouds.map((cloud) => ledBy(cloud.member.oneCase.name, sentence(cloud), report.cases)).join(' ') ||
      'No case has draws of both.',
    caption: `A point for each draw, the first ${Math.max(0, ...shown)} that have the number. The open sign: every input at its centre. A narrow cloud along a line: this input alone sets the finding; a round one: others do.`,
    lines: [],
    data: clouds.flatMap((cloud, at) => tracesOf(cloud, grid, at, style)),
    layout: layoutOf(clouds, shared, report, grid, style),
    table: () => tableOf(clouds, shared, report),
  };
}

function tableOf(clouds: readonly Cloud[], shared: SharedFinding, { cases }: SpreadReport): FigureTable {
  const input = clouds[0]?.input;
  return {
    columns: [
      words('case'),
      words('point'),
      { name: input?.label ?? 'input', unit: input?.unit ?? '' },
      { name: shared.label, unit: scaleOf(shared, cases).symbol },
    ],
    rows: clouds.flatMap(({ member: { oneCase }, x, y, centre }) => [
      ...(centre === null ? [] : [[oneCase.name, 'every input at its centre', centre.x, centre.y]]),
      ...x.map((value, at) => [oneCase.name, 'draw', value, y[at]]),
    ]),
  };
}

function cloudOf(member: FindingInCase, inputKey: string, { cases }: SpreadReport): Cloud | null {
  const { oneCase, finding } = member;
  const at = oneCase.inputs.findIndex(({ key }) => key === inputKey);
  if (at < 0) return null;
  const input = oneCase.inputs[at]!;
  const scale = scaleOf(finding, cases).one;
  const inputs = oneCase.sample.inputs[at]!;
  const findings = sampleOf(oneCase, finding);
  const rows = findings.flatMap((value, row) => (value === null ? [] : [row])).slice(0, mostPoints);
  return {
    member,
    input,
    x: rows.map((row) => inputs[row]!),
    y: rows.map((row) => findings[row]! / scale),
    centre: finding.atCentre === null ? null : { x: input.centre, y: finding.atCentre / scale },
  };
}

/** What runs in a circle by each draw's own period, as an orbit of the median one, around the mean as everywhere here. */
function sampleOf(oneCase: SpreadCase, finding: SpreadFinding): readonly (number | null)[] {
  const values = oneCase.sample.findings[oneCase.findings.indexOf(finding)]!;
  const turn = turnOf(finding, oneCase);
  const middle = finding.summary.mean;
  if (turn === null || middle === null) return values;
  const period = findingOf(oneCase, 'period');
  const own = finding.unit === 's' && period ? oneCase.sample.findings[oneCase.findings.indexOf(period)] : undefined;
  return values.map((value, row) =>
    value === null ? null : turn * unwrapTurn(value / (own?.[row] ?? turn), middle / turn),
  );
}

function tracesOf(
  { member, input, x, y, centre }: Cloud,
  { panels }: PanelGrid,
  at: number,
  { theme }: FigureStyle,
): Data[] {
  const panel = panels[at]!;
  const colour = caseColour(theme, member.caseIndex);
  const common = { type: 'scatter', mode: 'markers', xaxis: panel.x, yaxis: panel.y } as const;
  const hover = `%{y:.4~g}<br>${plainLabel(input.label, 40)} %{x:.4~g} ${unitText(input.unit)}<extra></extra>`;
  return [
    {
      ...common,
      name: plainLabel(member.oneCase.name, 60),
      x: [...x],
      y: [...y],
      marker: { color: translucent(colour, 0.55), size: 5 },
      hovertemplate: hover,
    },
    ...(centre === null
      ? []
      : [
          {
            ...common,
            name: `${plainLabel(member.oneCase.name, 60)}, at the centre`,
            x: [centre.x],
            y: [centre.y],
            marker: { symbol: 'circle' as const, color: theme.paper, size: 11, line: { color: theme.ink, width: 2 } },
            hovertemplate: `every input at its centre<br>${hover}`,
          },
        ]),
  ];
}

function layoutOf(
  clouds: readonly Cloud[],
  shared: SharedFinding,
  { cases }: SpreadReport,
  grid: PanelGrid,
  style: FigureStyle,
): Partial<Layout> {
  const { theme, narrow } = style;
  const isNamed = cases.length > 1;
  const margin = narrow ? { l: 56, r: 14, t: isNamed ? 30 : 12, b: 48 } : { l: 72, r: 24, t: isNamed ? 30 : 14, b: 52 };
  const input = clouds[0]?.input;
  const isLog = spansDecades(clouds);
  const symbol = unitText(input?.unit ?? '1');
  const xTitle = input === undefined ? '' : symbol === '' ? input.label : `${input.label} (${symbol})`;
  const yTitle = labelWithSymbol(shared.label, scaleOf(shared, cases));
  const view = style.view ?? viewOf(clouds, isLog);
  return {
    ...plainLayout(style),
    height: grid.height + margin.t + margin.b,
    margin,
    hovermode: 'closest',
    ...panelAxes(grid, (panel) => ({
      x: {
        ...axisStyle(style),
        type: isLog ? 'log' : 'linear',
        exponentformat: 'power',
        range: [...view.x],
        ...(panel.x === 'x' ? {} : { matches: 'x' as const }),
        nticks: narrow || grid.columns > 1 ? 5 : 10,
        gridcolor: theme.hairline,
        title: { text: panel.isBottom ? plainLabel(xTitle, 44) : '', standoff: 8 },
      },
      y: {
        ...axisStyle(style),
        range: [...view.y],
        ...(panel.y === 'y' ? {} : { matches: 'y' as const }),
        nticks: narrow ? 5 : 8,
        gridcolor: theme.hairline,
        title: { text: panel.isLeft ? plainLabel(yTitle, narrow ? 32 : 46) : '', standoff: 10 },
      },
    })),
    annotations: isNamed
      ? clouds.map(({ member }, at) => panelName(grid.panels[at]!, member.oneCase.name, member.caseIndex, style))
      : [],
  };
}

function spansDecades(clouds: readonly Cloud[]): boolean {
  const all = clouds.flatMap(({ x, input }) => [...x, input.centre]);
  const [low, high] = [all.reduce((a, b) => Math.min(a, b), Infinity), all.reduce((a, b) => Math.max(a, b), -Infinity)];
  return low > 0 && high > widestLinear * low;
}

function viewOf(clouds: readonly Cloud[], isLog: boolean): View {
  const place = (value: number): number => (isLog ? Math.log10(value) : value);
  return {
    x: withAir(clouds.flatMap(({ x, centre }) => [...x, ...(centre ? [centre.x] : [])]).map(place)),
    y: withAir(clouds.flatMap(({ y, centre }) => [...y, ...(centre ? [centre.y] : [])])),
  };
}

function withAir(values: readonly number[]): [number, number] {
  if (values.length === 0) return [0, 1];
  const [low, high] = [values.reduce((a, b) => Math.min(a, b)), values.reduce((a, b) => Math.max(a, b))];
  const air = 0.04 * (high - low) || 0.01 * Math.abs(high) || 1;
  return [low - air, high + air];
}

/** How closely the two go together, by ranks: no unit and no logarithm matters. */
function sentence({ member, input, x, y }: Cloud): string {
  const correlation = rankCorrelation(x, y);
  if (correlation === null) return 'one of the two does not vary.';
  const size = Math.abs(correlation);
  const way = correlation < 0 ? 'falls' : 'rises';
  const words =
    size < 0.1 ? 'hardly goes with' : `${way} ${size > 0.8 ? 'closely ' : size > 0.4 ? '' : 'a little '}with`;
  return `${inText(member.finding.label)} ${words} ${inText(input.label)} (rank correlation ${fixed(correlation, 2)} in ${x.length}${nbsp}draws).`;
}
