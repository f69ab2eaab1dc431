/** The whole page from a trace, top to bottom. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { climateLoop } from '../figures/climateLoop.ts';
import { traceCautions, traceSteps } from '../words/traceMethod.ts';
import { element } from './element.ts';
import { figureView } from './figureView.ts';
import type { Page } from './page.ts';
import { foldsSection } from './sections/folds.ts';
import { paragraphs } from './sections/heading.ts';
import { cautionsList, footer, stepsSection } from './sections/method.ts';
import { traceAnswering } from './sections/traceAnswering.ts';

export function tracePage(trace: TraceReport): Page {
  const { title, notes, file } = trace.scenario;
  const figure = figureView(1, (style) => climateLoop(trace, style));
  const made = element(
    'main',
    {},
    element('header', {}, element('h1', { dir: 'auto' }, title ?? file), ...(notes === null ? [] : paragraphs(notes))),
    traceAnswering(trace),
    figure.element,
    foldsSection(trace),
    stepsSection(traceSteps(trace)),
    cautionsList(traceCautions(trace)),
    footer(trace),
  );
  return { element: made, figures: [figure] };
}
