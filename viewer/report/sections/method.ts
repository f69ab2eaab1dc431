/** How it was computed, and what the numbers are not. */
import type { Origin } from '../../../sim/origin.ts';
import type { RunResult } from '../../../sim/run.ts';
import { cautions, methodSteps } from '../../words/method.ts';
import type { Step } from '../../words/rule.ts';
import { type Child, element } from '../element.ts';

export function methodSection(result: RunResult): HTMLElement {
  return stepsSection(methodSteps(result));
}

export function stepsSection(steps: readonly Step[]): HTMLElement {
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'How it was computed'),
    element('ol', { class: 'steps' }, ...steps.map(step)),
  );
}

function step({ words, equation, source }: Step): HTMLElement {
  return element(
    'li',
    {},
    element('p', {}, words),
    equation === undefined ? null : element('p', { class: 'equation' }, ...mathematics(equation)),
    source === undefined ? null : element('p', { class: 'source' }, source),
  );
}

/** `x_{name}` and `x^{name}` as they are set in print. */
function mathematics(equation: string): Child[] {
  return equation.split(/([_^]\{[^}]*\})/).map((part) => {
    const inner = part.slice(2, -1);
    if (part.startsWith('_{')) return element('sub', {}, inner);
    return part.startsWith('^{') ? element('sup', {}, inner) : part;
  });
}

export function cautionsSection(result: RunResult): HTMLElement {
  return cautionsList(cautions(result));
}

export function cautionsList(texts: readonly string[]): HTMLElement {
  return element(
    'section',
    { class: 'grid' },
    element('h2', {}, 'What the numbers are not'),
    element('ul', { class: 'cautions' }, ...texts.map((text) => element('li', {}, text))),
  );
}

export function footer({ program, scenario }: Origin): HTMLElement {
  return element(
    'footer',
    {},
    element('p', {}, `Made by ${program.name} ${program.version} from `, element('code', {}, scenario.file), '.'),
    element('p', {}, 'SHA-256 of the scenario: ', element('code', {}, scenario.sha256)),
  );
}
