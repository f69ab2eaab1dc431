/** The whole page from a run, top to bottom. */
import type { RunResult } from '../../sim/run.ts';
import { columnsOf } from '../words/columns.ts';
import { element } from './element.ts';
import type { FigureView } from './figureView.ts';
import { accountsSection } from './sections/accounts.ts';
import { answering } from './sections/answering.ts';
import { casesSection } from './sections/cases.ts';
import { figureViews } from './sections/figures.ts';
import { heading } from './sections/heading.ts';
import { inputsSection } from './sections/inputs.ts';
import { cautionsSection, footer, methodSection } from './sections/method.ts';
import { numbersSection } from './sections/numbers.ts';

export interface Page {
  readonly element: HTMLElement;
  /** To be drawn once the element is in the document. */
  readonly figures: readonly FigureView[];
}

export function page(result: RunResult): Page {
  const columns = columnsOf(result);
  const figures = figureViews(columns);
  const made = element(
    'main',
    {},
    heading(result, columns),
    answering(result),
    casesSection(result.cases, columns),
    ...figures.map((view) => view.element),
    accountsSection(result, columns),
    numbersSection(result, columns),
    inputsSection(result.cases),
    methodSection(result),
    cautionsSection(result),
    footer(result),
  );
  return { element: made, figures };
}
