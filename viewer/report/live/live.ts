/** The live page: what the reader moves goes to the solver, and its answers to the page. */
import type { CaseResult, RunResult } from '../../../sim/run.ts';
import type { EditedCase } from '../../../sim/scenario/edited.ts';
import { plainReading } from '../../figures/reading.ts';
import { movesText, nameFor } from '../../words/moves.ts';
import { element } from '../element.ts';
import type { RunPage } from '../page.ts';
import { saveText } from '../saveFile.ts';
import { type Panel, panel } from './panel.ts';
import type { CaseDials } from './protocol.ts';
import { type Fault, type Solver, startSolver } from './solver.ts';
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

/** Results that are kept for the way back: the last ones. */
const mostRemembered = 64;
const wide = matchMedia('(min-width: 76rem)');

export function live(page: RunPage, original: RunResult, tree: unknown): Live {
  const box = element('div', { class: 'instrument-box' });
  const summary = element('summary', {}, 'Move an assumption');
  const drawer = element('details', { class: 'instruments' }, summary, box);
  const adjust = () => {
    drawer.open = wide.matches;
    summary.tabIndex = wide.matches ? -1 : 0; // where there is room it is a title
  };
  adjust();
  wide.addEventListener('change', adjust);
  box.append(element('p', { class: 'run-line' }, 'Getting ready …'));
  return {
    element: element(
      'div',
      { class: 'live' },
      element('aside', { class: 'instrument-column', 'aria-label': 'Move an assumption' }, drawer),
      page.element,
    ),
    begin: () => run(page, original, tree, box),
  };
}

function run(page: RunPage, original: RunResult, tree: unknown, box: HTMLElement): void {
  const names = original.cases.map(({ name }) => name);
  const remembered = new Map<string, CaseResult>();
  const wholes = new WeakMap<readonly EditedCase[], readonly EditedCase[]>();
  let state = unmoved;
  let known: readonly CaseDials[] = [];
  let controls: Panel | null = null;
  let shown = original;
  let shownCases: readonly EditedCase[] = presentCases(unmoved, names);
  let writing = 0;
  let reading = plainReading;
  const linkOf = () => [toHash(state, names), readingToHash(reading)].filter((part) => part !== '').join('&');
  page.figures.onRead((chosen) => {
    reading = chosen;
    linkSoon();
  });

  const solver: Solver = startSolver(tree, original.scenario.file, {
    opened(cases) {
      known = cases.filter(({ name }) => names.includes(name));
      controls = panel(known, {
        moved: (caseNames, key, text) =>
          change(
            text === null || isOriginal(caseNames, key, text)
              ? reset(state, caseNames, key)
              : moved(state, caseNames, key, text),
          ),
        resetAll: () => change(unmoved),
        keep: (caseNames) => change(withKept(caseNames)),
        drop: (name) => change(dropped(state, name)),
        save: () => void save(),
      });
      box.replaceChildren(controls.element);
      controls.show(state, siOf);
      takeLink();
      addEventListener('hashchange', takeLink);
      document.body.dataset.live = 'yes';
    },
    ran(results, requested, seconds) {
      for (const [i, result] of results.entries()) remember(requested[i]!, result);
      controls?.fail(null);
      controls?.tell(
        `Computed in ${seconds < 0.0995 ? Math.max(1, Math.round(1000 * seconds)) : Math.round(100 * seconds) * 10} ms.`,
      );
      show(wholes.get(requested) ?? []);
    },
    failed: (fault: Fault) => controls?.fail(fault),
    unavailable() {
      box.replaceChildren(
        element(
          'p',
          { class: 'run-line' },
          'This browser lets no page from disk compute: the figures stay as the file has them.',
        ),
      );
    },
  });

  function change(next: LiveState): void {
    state = next;
    controls?.show(state, siOf);
    linkSoon();
    request();
  }

  function linkSoon(): void {
    clearTimeout(writing);
    writing = setTimeout(writeLink, 200) as unknown as number;
  }

  function request(): void {
    const whole = presentCases(state, names);
    const missing = whole.filter((one) => resultOf(one) === undefined);
    if (missing.length === 0) {
      solver.forget();
      controls?.fail(null);
      controls?.tell('');
      show(whole);
      return;
    }
    wholes.set(missing, whole);
    solver.run(missing);
  }

  function resultOf(one: EditedCase): CaseResult | undefined {
    const isOwn = one.edits.length === 0 && one.name === one.from;
    return isOwn ? original.cases.find(({ name }) => name === one.name) : remembered.get(JSON.stringify(one));
  }

  function remember(one: EditedCase, result: CaseResult): void {
    remembered.set(JSON.stringify(one), result);
    const [oldest] = remembered.keys();
    if (remembered.size > mostRemembered && oldest !== undefined) remembered.delete(oldest);
  }

  function show(whole: readonly EditedCase[]): void {
    const cases = whole.map(resultOf);
    if (!cases.every((one) => one !== undefined)) return;
    const isOriginal = whole.every(({ edits, name }, i) => edits.length === 0 && name === names[i]);
    shown = isOriginal ? original : { ...original, cases };
    shownCases = whole;
    page.show(shown, movesText(whole, known));
    controls?.show(state, siOf);
    document.body.dataset.shown = String(Number(document.body.dataset.shown ?? 0) + 1);
  }

  /** Null where what is shown was computed with another number: a slider must not go back to it under the hand. */
  function siOf(caseName: string, key: string): number | null {
    const computed = shownCases.find(({ name }) => name === caseName)?.edits ?? [];
    if (textOf(computed, key) !== textOf(editsOf(state, caseName), key)) return null;
    const inputs = shown.cases.find(({ name }) => name === caseName)?.inputs;
    return inputs?.find((input) => input.key === key)?.value ?? null;
  }

  function isOriginal(caseNames: readonly string[], key: string, text: string): boolean {
    const own = known.filter(({ name }) => caseNames.includes(name));
    return own.every(({ dials }) => dials.find((dial) => dial.key === key)?.text === text);
  }

  function withKept(caseNames: readonly string[]): LiveState {
    const movedNames = caseNames.filter((name) => editsOf(state, name).length > 0);
    return movedNames.reduce((now, name) => kept(now, name, nameFor(name, editsOf(now, name), known), names), state);
  }

  function takeLink(): void {
    const hash = location.hash.replace(/^#/, '');
    if (hash === linkOf()) return;
    reading = readingFromHash(hash, names);
    page.figures.read(reading);
    const isKnown = (caseName: string, key: string) =>
      known.some(({ name, dials }) => name === caseName && dials.some((dial) => dial.key === key));
    change(fromHash(hash, names, isKnown));
  }

  function writeLink(): void {
    const hash = linkOf();
    if (hash !== location.hash.replace(/^#/, ''))
      history.replaceState(null, '', hash === '' ? location.pathname : `#${hash}`);
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
