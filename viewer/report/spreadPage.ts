/** The whole page from a spread, top to bottom. */
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { spreadCautions, spreadSteps } from '../words/spreadMethod.ts';
import { element } from './element.ts';
import type { Page } from './page.ts';
import { paragraphs } from './sections/heading.ts';
import { cautionsList, footer, stepsSection } from './sections/method.ts';
import { spreadAnswering } from './sections/spreadAnswering.ts';
import { spreadFigureViews } from './sections/spreadFigures.ts';
import { spreadFindingsSection } from './sections/spreadFindings.ts';
import { drawsSection, spreadInputsSection } from './sections/spreadInputs.ts';

export function spreadPage(report: SpreadReport): Page {
  const { title, notes, file } = report.scenario;
  const figures = spreadFigureViews(report);
  const made = element(
    'main',
    {},
    element('header', {}, element('h1', { dir: 'auto' }, title ?? file), ...(notes === null ? [] : paragraphs(notes))),
    spreadAnswering(report),
    spreadFindingsSection(report),
    ...figures.map((view) => view.element),
    spreadInputsSection(report),
    drawsSection(report),
    stepsSection(spreadSteps(report)),
    cautionsList(spreadCautions(report)),
    footer(report),
  );
  return { element: made, figures };
}
