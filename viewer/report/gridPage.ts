/** The whole page from a grid, top to bottom. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { membersOf } from '../words/gridMembers.ts';
import { gridCautions, gridSteps } from '../words/gridMethod.ts';
import { element } from './element.ts';
import type { Page } from './page.ts';
import { extremesSection } from './sections/extremes.ts';
import { gridAnswering } from './sections/gridAnswering.ts';
import { findingSection } from './sections/gridFigures.ts';
import { paragraphs } from './sections/heading.ts';
import { inputsSection } from './sections/inputs.ts';
import { cautionsList, footer, stepsSection } from './sections/method.ts';
import { plainWorldsSection } from './sections/plainWorlds.ts';

export function gridPage(report: GridReport): Page {
  const { title, notes, file } = report.scenario;
  const finding = findingSection(report, 1);
  const plain = plainWorldsSection(report, 2);
  const made = element(
    'main',
    {},
    element('header', {}, element('h1', { dir: 'auto' }, title ?? file), ...(notes === null ? [] : paragraphs(notes))),
    gridAnswering(report),
    finding.element,
    extremesSection(report),
    plain?.element ?? null,
    inputsSection(membersOf(report).map(({ name, inputs }) => ({ name, inputs, derived: [] }))),
    stepsSection(gridSteps(report)),
    cautionsList(gridCautions(report)),
    footer(report),
  );
  return { element: made, figures: plain === null ? [finding.figure] : [finding.figure, plain.figure] };
}
