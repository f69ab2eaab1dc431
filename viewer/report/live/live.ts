/** The live page: what the reader moves goes to the solver, and its answers to the page. */
import type { RunResult } from '../../../sim/run.ts';
import type { EditedCase } from '../../../sim/scenario/edited.ts';
import { plainReading } from '../../figures/reading.ts';
import { answer } from '../../words/answer.ts';
import { movesText, nameFor } from '../../words/moves.ts';
import { element } from '../element.ts';
import type { RunPage } from '../page.ts';
import { saveText } from '../saveFile.ts';
import { stateLink } from './link.ts';
import { type Panel, type PanelEvents, panel } from './panel.ts';
import type { CaseDials } from './protocol.ts';
import { resultsOf } from './results.ts';
import { type SolverEvents, startSolver } from './solver.ts';
import {
  dropped,
  editsOf,
  fromHash,
  kept,
  type LiveState,
  moved,
  presentCases,
  readingFromHash,
  readingToHash,
  reset,
  toHash,
  unmoved,
} from './state.ts';

export interface Live {
  readonly element: HTMLElement;
  /** To be called when the page is drawn. */
  begin(): void;
}

const wide = matchMedia('(min-width: 76rem)');

export function live(page: RunPage, original: RunResult, tree: unknown): Live {
  const box = element('div', { class: 'instrument-box' }, element('p', { class: 'run-line' }, 'Getting ready …'));
  const summary = element('summary', {}, 'Move an assumption');
  const drawer = element('details', { class: 'instruments' }, summary, box);
  const adjust = () => {
    drawer.open = wide.matches;
    summary.tabIndex = wide.matches ? -1 : 0; // where there is room it is a title
  };
  adjust();
  wide.addEventListener('change', adjust);
  const column = element('aside', { class: 'instrument-column', 'aria-label': 'Move an assumption' }, drawer);
  return {
    element: element('div', { class: 'live' }, column, page.element),
    begin: () => run(page, original, tree, box),
  };
}

/** All that changes stands here; what can be told without it has its own file. */
function run(page: RunPage, original: RunResult, tree: unknown, box: HTMLElement): void {
  const names = original.cases.map(({ name }) => name);
  const results = resultsOf(original);
  /** What the whole page was to show when a request was made. */
  const wholes = new WeakMap<readonly EditedCase[], readonly EditedCase[]>();
  const spoken = speaker();
  let state = unmoved;
  let reading = plainReading;
  let known: readonly CaseDials[] = [];
  let controls: Panel | null = null;
  let shown = original;
  let shownCases: readonly EditedCase[] = presentCases(unmoved, names);

  const solverEvents: SolverEvents = {
    opened(cases) {
      known = cases.filter(({ name }) => names.includes(name));
      controls = panel(known, panelEvents);
      box.replaceChildren(controls.element, spoken.element);
      controls.show(state, siOf);
      link.follow();
      document.body.dataset.live = 'yes';
    },
    ran(found, requested, seconds) {
      for (const [i, result] of found.entries()) results.keep(requested[i]!, result);
      controls?.fail(null);
      controls?.tell(`Computed in ${roughly(1000 * seconds)} ms.`);
      show(wholes.get(requested) ?? []);
    },
    failed: (fault) => controls?.fail(fault),
    unavailable(why) {
      box.replaceChildren(element('p', { class: 'run-line' }, `${why}: the figures stay as the file has them.`));
    },
  };
  const panelEvents: PanelEvents = {
    moved(caseNames, key, text) {
      const isBack = text === null || isOriginal(caseNames, key, text);
      change(isBack ? reset(state, caseNames, key) : moved(state, caseNames, key, text));
    },
    resetAll: () => change(unmoved),
    keep: (caseNames) => change(withKept(caseNames)),
    drop: (name) => change(dropped(state, name)),
    save: () => void save(),
  };
  const link = stateLink(
    () => [toHash(state, names), readingToHash(reading)].filter((part) => part !== '').join('&'),
    (hash) => {
      reading = readingFromHash(hash, names);
      page.figures.read(reading);
      change(fromHash(hash, names, hasDial));
    },
  );
  const solver = startSolver(tree, original.scenario.file, solverEvents);
  page.figures.onRead((chosen) => {
    reading = chosen;
    link.changed();
  });

  function change(next: LiveState): void {
    state = next;
    controls?.show(state, siOf);
    link.changed();
    const whole = presentCases(state, names);
    const missing = whole.filter((one) => results.of(one) === undefined);
    if (missing.length > 0) {
      wholes.set(missing, whole);
      solver.run(missing);
      return;
    }
    solver.forget();
    controls?.fail(null);
    controls?.tell('');
    show(whole);
  }

  function show(whole: readonly EditedCase[]): void {
    const found = results.whole(whole);
    if (found === null) return;
    shown = found;
    shownCases = whole;
    page.show(shown, movesText(whole, known));
    controls?.show(state, siOf);
    spoken.say(answer(shown).lead);
    document.body.dataset.shown = String(Number(document.body.dataset.shown ?? 0) + 1);
  }

  /** Null where what is shown was computed with another number: a slider must not go back to it under the hand. */
  function siOf(caseName: string, key: string): number | null {
    const computed = shownCases.find(({ name }) => name === caseName)?.edits ?? [];
    if (textOf(computed, key) !== textOf(editsOf(state, caseName), key)) return null;
    const inputs = shown.cases.find(({ name }) => name === caseName)?.inputs;
    return inputs?.find((input) => input.key === key)?.value ?? null;
  }

  function hasDial(caseName: string, key: string): boolean {
    return known.some(({ name, dials }) => name === caseName && dials.some((dial) => dial.key === key));
  }

  function isOriginal(caseNames: readonly string[], key: string, text: string): boolean {
    const own = known.filter(({ name }) => caseNames.includes(name));
    return own.every(({ dials }) => dials.find((dial) => dial.key === key)?.text === text);
  }

  function withKept(caseNames: readonly string[]): LiveState {
    const movedNames = caseNames.filter((name) => editsOf(state, name).length > 0);
    return movedNames.reduce((now, name) => kept(now, name, nameFor(name, editsOf(now, name), known), names), state);
  }

  async function save(): Promise<void> {
    const name = original.scenario.file.replace(/^.*[\\/]/, '').replace(/\.(?:ya?ml|json)$/i, '');
    try {
      saveText(`${name}-moved.yaml`, 'text/plain', await solver.write(presentCases(state, names)));
    } catch (error) {
      controls?.fail({ where: null, message: (error as Error).message });
    }
  }
}

function textOf(edits: EditedCase['edits'], key: string): string | undefined {
  return edits.find((one) => one.key === key)?.text;
}

/** Two digits, at least 1. */
function roughly(milliseconds: number): number {
  return Math.max(1, Number(milliseconds.toPrecision(2)));
}

/** Says a sentence to those who do not see it, when the numbers have come to rest. */
function speaker(): { readonly element: HTMLElement; say(sentence: string): void } {
  const line = element('p', { class: 'spoken', role: 'status' });
  let timer = 0;
  return {
    element: line,
    say(sentence) {
      clearTimeout(timer);
      timer = setTimeout(() => {
        line.textContent = sentence;
      }, 700) as unknown as number;
    },
  };
}
