/** The whole page of a run, top to bottom; and the same page again when its numbers have moved. */
import type { RunResult } from '../../sim/run.ts';
import { columnsOf } from '../words/columns.ts';
import { element } from './element.ts';
import { type FigureList, figureList } from './figureList.ts';
import type { FigureView } from './figureView.ts';
import { accountsSection } from './sections/accounts.ts';
import { answering } from './sections/answering.ts';
import { casesSection } from './sections/cases.ts';
import { figureBuilders, figureChoices } from './sections/figures.ts';
import { heading } from './sections/heading.ts';
import { inputsSection } from './sections/inputs.ts';
import { cautionsSection, footer, methodSection } from './sections/method.ts';
import { numbersSection } from './sections/numbers.ts';

export interface Page {
  readonly element: HTMLElement;
  /** To be drawn once the element is in the document. */
  readonly figures: readonly FigureView[];
}

export interface RunPage {
  readonly element: HTMLElement;
  readonly figures: FigureList;
  /** The page of another result: words at once, figures as they come into view. Differences are told from the first one. */
  show(result: RunResult, moves: string | null): void;
}

/** What follows the result, in the order of the page; the figures stand after the cases. */
const sections = {
  heading: (result: RunResult) => heading(result, columnsOf(result)),
  answer: (result: RunResult, _: RunResult, moves: string | null) => answering(result, moves),
  cases: (result: RunResult, original: RunResult) => casesSection(result.cases, columnsOf(result), columnsOf(original)),
  accounts: (result: RunResult) => accountsSection(result, columnsOf(result)),
  numbers: (result: RunResult) => numbersSection(result, columnsOf(result)),
  inputs: (result: RunResult) => inputsSection(result.cases),
  method: methodSection,
  cautions: cautionsSection,
} as const;

type SectionName = keyof typeof sections;

/** What is renewed with the figures in view; the others right after, when the screen shows these. */
const atOnce: readonly SectionName[] = ['heading', 'answer'];

/** A frame or two, ms. */
const soon = 30;

export function page(original: RunResult): RunPage {
  const made = (name: SectionName, result: RunResult, moves: string | null = null) =>
    sections[name](result, original, moves);
  const shown = Object.fromEntries(
    Object.keys(sections).map((name) => [name, made(name as SectionName, original)]),
  ) as Record<SectionName, HTMLElement>;
  const builders = (result: RunResult) => figureBuilders(columnsOf(result), movedFrom(original, result));
  const figures = figureList(builders(original), figureChoices(columnsOf(original)));
  let waiting = 0;
  return {
    element: element(
      'main',
      {},
      shown.heading,
      shown.answer,
      shown.cases,
      figures.element,
      shown.accounts,
      shown.numbers,
      shown.inputs,
      shown.method,
      shown.cautions,
      footer(original),
    ),
    figures,
    show(result, moves) {
      const renewAll = (names: readonly SectionName[]) => {
        for (const name of names) renew(shown[name], made(name, result, moves));
      };
      renewAll(atOnce);
      figures.show(builders(result), figureChoices(columnsOf(result)));
      clearTimeout(waiting);
      const others = (Object.keys(sections) as SectionName[]).filter((name) => !atOnce.includes(name));
      waiting = setTimeout(() => renewAll(others), soon) as unknown as number;
    },
  };
}

/** The element stays, so that a reader's place in it does, too, and what is said aloud is its new text. */
function renew(old: HTMLElement, next: HTMLElement): void {
  const isOpen = [...old.querySelectorAll('details')].map(({ open }) => open);
  old.replaceChildren(...next.childNodes);
  for (const [i, details] of old.querySelectorAll('details').entries()) details.open = isOpen[i] ?? details.open;
}

/** The columns of the first result whose cases have moved since: to be shown beside what they became. */
function movedFrom(original: RunResult, result: RunResult): ReturnType<typeof columnsOf> {
  const moved = new Set(original.cases.filter((one) => !result.cases.includes(one)).map(({ name }) => name));
  return columnsOf(original).filter(({ caseName }) => moved.has(caseName));
}
