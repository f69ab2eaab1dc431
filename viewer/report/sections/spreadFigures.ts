/** The figures of a spread: the bands, then three that follow a choice. */
import type { SpreadReport } from '../../../sim/studies/spread/spreadReport.ts';
import { importanceBars } from '../../figures/importanceBars.ts';
import { bandGroups, spreadBands } from '../../figures/spreadBands.ts';
import { spreadHistogram } from '../../figures/spreadHistogram.ts';
import { spreadScatter } from '../../figures/spreadScatter.ts';
import { importancesOf } from '../../words/importance.ts';
import { chiefFindings, findingSections, type SharedFinding, sharedFindings } from '../../words/spreadFindings.ts';
import { choice, controlRow, type OptionGroup } from '../controls.ts';
import { type FigureView, figureView } from '../figureView.ts';

const rowName = 'What the figure shows';

export function spreadFigureViews(report: SpreadReport): FigureView[] {
  const groups = bandGroups(report);
  const bands = groups.map((group, at) => figureView(at + 1, (style) => spreadBands(group, report, style)));
  const all = sharedFindings(report.cases);
  if (all.length === 0) return bands;
  const next = bands.length + 1;
  return [
    ...bands,
    histogramView(next, all, report),
    importanceView(next + 1, all, report),
    ...scatterViews(next + 2, all, report),
  ];
}

function histogramView(number: number, all: readonly SharedFinding[], report: SpreadReport): FigureView {
  let shown = chiefFindings(all)[0]!;
  const controls = findingChoice(all, shown, (chosen) => {
    shown = chosen;
    void view.refresh();
  });
  const view = figureView(number, (style) => spreadHistogram(shown, report, style), controlRow(rowName, controls));
  return view;
}

function importanceView(number: number, all: readonly SharedFinding[], report: SpreadReport): FigureView {
  let shown = chiefFindings(all)[0]!;
  const controls = findingChoice(all, shown, (chosen) => {
    shown = chosen;
    void view.refresh();
  });
  const view = figureView(number, (style) => importanceBars(shown, report, style), controlRow(rowName, controls));
  return view;
}

/** None where nothing was drawn. */
function scatterViews(number: number, all: readonly SharedFinding[], report: SpreadReport): FigureView[] {
  const inputs = inputOptions(report);
  let finding = chiefFindings(all)[0]!;
  let input = firstInput(finding) ?? inputs[0]?.value;
  if (input === undefined) return [];
  const view: FigureView = figureView(
    number,
    (style) => spreadScatter(finding, input!, report, style),
    controlRow(
      rowName,
      findingChoice(all, finding, (chosen) => {
        finding = chosen;
        void view.refresh();
      }),
      choice('Against', [{ title: 'Inputs', options: inputs }], input, (chosen) => {
        input = chosen;
        void view.refresh();
      }),
    ),
  );
  return [view];
}

function findingChoice(
  all: readonly SharedFinding[],
  shown: SharedFinding,
  changed: (chosen: SharedFinding) => void,
): HTMLElement {
  const groups = findingSections(all).map(
    ({ title, findings }): OptionGroup => ({
      title,
      options: findings.map(({ name, label }) => ({ value: name, label })),
    }),
  );
  return choice('Finding', groups, shown.name, (name) => changed(all.find((one) => one.name === name)!));
}

/** Each input once, in the order of the cases. */
function inputOptions({ cases }: SpreadReport): { value: string; label: string }[] {
  const labels = new Map(cases.flatMap(({ inputs }) => inputs.map(({ key, label }) => [key, label])));
  return [...labels].map(([value, label]) => ({ value, label }));
}

/** What matters most in the first case: the first thing to look at. */
function firstInput({ inCases }: SharedFinding): string | undefined {
  const [first] = inCases;
  if (first === undefined) return undefined;
  const found = importancesOf(first.oneCase, first.finding);
  return found.kind === 'none' ? first.oneCase.inputs[0]?.key : found.inputs[0]?.input.key;
}
