/** The instruments in the margin: every number that may be moved, which cases it moves, what was kept, the ways back and out. */
import { type Dial, dialGroups } from '../../../sim/scenario/dial.ts';
import { choice } from '../controls.ts';
import { element, userText } from '../element.ts';
import { type DialView, dialView } from './dialView.ts';
import type { CaseDials } from './protocol.ts';
import type { Fault } from './solver.ts';
import { editsOf, type LiveState } from './state.ts';

export interface PanelEvents {
  /** Null is the way back. */
  moved(caseNames: readonly string[], key: string, text: string | null): void;
  resetAll(): void;
  keep(caseNames: readonly string[]): void;
  drop(name: string): void;
  save(): void;
}

export interface Panel {
  readonly element: HTMLElement;
  /** `siOf` gives the SI value of a case's key as it was last computed. */
  show(state: LiveState, siOf: (caseName: string, key: string) => number | null): void;
  fail(fault: Fault | null): void;
  /** A line on how the last run went. */
  tell(text: string): void;
}

export function panel(cases: readonly CaseDials[], events: PanelEvents): Panel {
  const names = cases.map(({ name }) => name);
  let scope: readonly string[] = names;
  let views: readonly { readonly key: string; readonly dial: Dial; readonly view: DialView }[] = [];
  let last: Parameters<Panel['show']> | null = null;

  const dials = element('div', { class: 'dials' });
  const fault = element('p', { class: 'fault', role: 'alert' });
  const line = element('p', { class: 'run-line', role: 'status' });
  const keep = action('Keep as a case', () => events.keep(scope));
  const all = action('Reset all', events.resetAll);
  const save = action('Save as scenario', events.save);
  const keptList = keptCases(events.drop, keep);

  function lay(): void {
    views = dialsIn(cases, scope).map((dial) => ({
      key: dial.key,
      dial,
      view: dialView(dial, (text) => events.moved(scope, dial.key, text)),
    }));
    const groups = dialGroups.flatMap((group) => {
      const own = views.filter(({ dial }) => dial.group === group);
      if (own.length === 0) return [];
      return [element('fieldset', {}, element('legend', {}, group), ...own.map(({ view }) => view.element))];
    });
    dials.replaceChildren(...groups);
    if (last !== null) show(...last);
  }

  function show(...[state, siOf]: Parameters<Panel['show']>): void {
    last = [state, siOf];
    const [first] = scope;
    const edits = new Map(editsOf(state, first!).map(({ key, text }) => [key, text]));
    for (const { key, dial, view } of views) {
      const text = edits.get(key);
      view.show(text ?? dial.text, text === undefined ? dial.value : siOf(first!, key), text !== undefined);
    }
    const isMoved = scope.some((name) => editsOf(state, name).length > 0);
    allow(keep, isMoved);
    allow(all, state.changes.length > 0 || state.kept.length > 0);
    keptList.show(state.kept.map(({ name }) => name));
  }

  lay();
  const chooser =
    names.length > 1
      ? scopeChooser(names, (chosen) => {
          scope = chosen;
          lay();
        })
      : null;
  return {
    element: element(
      'div',
      { class: 'panel' },
      element('p', { class: 'actions' }, keep, all, save),
      line,
      fault,
      chooser,
      keptList.element,
      dials,
    ),
    show,
    fail(found) {
      const own = views.find(({ key }) => key === found?.where);
      for (const { view } of views) view.complain(null);
      own?.view.complain(found!.message);
      fault.textContent = found === null || own ? '' : found.message;
    },
    tell(text) {
      line.textContent = text;
    },
  };
}

/** When one is removed the focus goes to its neighbour's button, after the last one to `before`. */
function keptCases(
  drop: (name: string) => void,
  before: HTMLElement,
): { readonly element: HTMLElement; show(names: readonly string[]): void } {
  const list = element('ul', { class: 'kept-cases' });
  let shown: readonly string[] = [];
  const removing = (name: string, place: number) => () => {
    drop(name);
    const left = list.querySelectorAll('button');
    (left[Math.min(place, left.length - 1)] ?? before).focus();
  };
  return {
    element: list,
    show(names) {
      if (names.length === shown.length && names.every((name, i) => name === shown[i])) return;
      shown = names;
      const entries = names.map((name, i) =>
        element('li', {}, userText(name), action('Remove', removing(name, i), `Remove ${name}`)),
      );
      list.replaceChildren(...entries);
    },
  };
}

function scopeChooser(names: readonly string[], chosen: (scope: readonly string[]) => void): HTMLElement {
  const options = [{ value: '', label: 'all cases' }, ...names.map((name, i) => ({ value: String(i), label: name }))];
  return choice('Move in', [{ title: 'Cases', options }], '', (value) =>
    chosen(value === '' ? names : [names[Number(value)]!]),
  );
}

/** Of one case all; of several those that all have at the same value. */
function dialsIn(cases: readonly CaseDials[], scope: readonly string[]): readonly Dial[] {
  const [first, ...others] = cases.filter(({ name }) => scope.includes(name));
  return first!.dials.filter((dial) =>
    others.every(({ dials }) =>
      dials.some(({ key, value, unit }) => key === dial.key && value === dial.value && unit === dial.unit),
    ),
  );
}

function action(label: string, pressed: () => void, longLabel = label): HTMLButtonElement {
  const made = element(
    'button',
    { type: 'button', ...(longLabel === label ? {} : { 'aria-label': longLabel }) },
    label,
  );
  made.addEventListener('click', () => {
    if (made.ariaDisabled !== 'true') pressed();
  });
  return made;
}

/** A button that is not at hand now keeps the focus that it has: `disabled` would lose it. */
function allow(button: HTMLButtonElement, isAllowed: boolean): void {
  button.ariaDisabled = isAllowed ? null : 'true';
}
