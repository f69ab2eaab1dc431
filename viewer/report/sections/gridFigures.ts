/** The finding that the reader chooses: a map of one case over two inputs, or the curves of all cases along one. */
import type { GridReport } from '../../../sim/studies/grid/gridReport.ts';
import { findingCurves } from '../../figures/findingCurves.ts';
import { findingMap } from '../../figures/findingMap.ts';
import { offeredFindings } from '../../words/shownFinding.ts';
import { choice, controlRow } from '../controls.ts';
import { element } from '../element.ts';
import { type FigureView, figureView } from '../figureView.ts';

export interface Chosen {
  readonly element: HTMLElement;
  readonly figure: FigureView;
}

export function findingSection(report: GridReport, number: number): Chosen {
  const { chief, others } = offeredFindings(report);
  const options = (all: typeof chief) => all.map(({ name: value, label }) => ({ value, label }));
  let name = (chief[0] ?? others[0])?.name ?? '';
  let caseIndex = 0;
  const isMap = report.axes.length === 2;
  const figure = figureView(number, (style) =>
    isMap ? findingMap(report, caseIndex, name, style) : findingCurves(report, name, style),
  );
  const groups = [
    { title: 'Chief findings', options: options(chief) },
    { title: 'All others', options: options(others) },
  ];
  const findingChoice = choice('Finding', groups, name, (value) => {
    name = value;
    void figure.refresh();
  });
  const cases = report.cases.map(({ name: label }, at) => ({ value: String(at), label }));
  const caseChoice = choice('Case', [{ title: 'Cases', options: cases }], String(caseIndex), (value) => {
    caseIndex = Number(value);
    void figure.refresh();
  });
  const controls = [findingChoice, ...(isMap && cases.length > 1 ? [caseChoice] : [])];
  return {
    element: element(
      'section',
      {},
      element('h2', {}, report.axes.length === 2 ? 'A finding over both inputs' : 'A finding along the input'),
      controlRow('What the figure shows', ...controls),
      figure.element,
    ),
    figure,
  };
}
