/** What a reader may choose or type. */
import { element, userText } from './element.ts';

export interface Option {
  readonly value: string;
  readonly label: string;
}

export interface OptionGroup {
  readonly title: string;
  readonly options: readonly Option[];
}

/** Texts are shortened: the control is as wide as its longest entry. */
const longest = 60;

/** A labelled select by the browser's own control; `changed` is called with the value at every change. One group needs no title. */
export function choice(
  label: string,
  groups: readonly OptionGroup[],
  chosen: string,
  changed: (value: string) => void,
): HTMLElement {
  const filled = groups.filter(({ options }) => options.length > 0);
  const entries = filled.flatMap(({ title, options }) => {
    const own = options.map(({ value, label: text }) => element('option', { value }, shortened(text)));
    return filled.length === 1 ? own : [element('optgroup', { label: title }, ...own)];
  });
  const select = element('select', {}, ...entries);
  select.value = chosen;
  select.addEventListener('change', () => changed(select.value));
  return labelled(label, select);
}

/** Several of them in a row. */
export function controlRow(label: string, ...controls: readonly HTMLElement[]): HTMLElement {
  return element('div', { class: 'controls', role: 'group', 'aria-label': label }, ...controls);
}

export function shortened(text: string): string {
  const characters = [...text];
  return characters.length > longest ? `${characters.slice(0, longest - 1).join('')}…` : text;
}

/** A labelled field for a number; `unit` stands behind it. */
export function numberField(label: string, unit: string, value: string, typed: (text: string) => void): HTMLElement {
  const input = element('input', { type: 'text', inputmode: 'decimal', autocomplete: 'off', size: '8', value });
  input.addEventListener('input', () => typed(input.value));
  return labelled(label, input, unit);
}

export function labelled(label: string, control: HTMLElement, unit = ''): HTMLElement {
  return element(
    'label',
    { class: 'control' },
    userText(label),
    element('span', {}, control, unit === '' ? null : ` ${unit}`),
  );
}
