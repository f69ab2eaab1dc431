/** What a reader may choose or type. */
import { element, userText } from './element.ts';

export interface Choice {
  readonly value: string;
  readonly label: string;
}

export interface ChoiceGroup {
  /** Null where the choices need no heading. */
  readonly label: string | null;
  readonly choices: readonly Choice[];
}

/** A labelled select; `chosen` is called with the value at every change. */
export function chooser(label: string, groups: readonly ChoiceGroup[], chosen: (value: string) => void): HTMLElement {
  const options = (choices: readonly Choice[]): HTMLElement[] =>
    choices.map(({ value, label: text }) => element('option', { value }, text));
  const select = element(
    'select',
    {},
    ...groups
      .filter(({ choices }) => choices.length > 0)
      .flatMap(({ label: heading, choices }) =>
        heading === null ? options(choices) : [element('optgroup', { label: heading }, ...options(choices))],
      ),
  );
  select.addEventListener('change', () => chosen(select.value));
  return labelled(label, select);
}

/** A labelled field for a number; `unit` stands behind it. */
export function numberField(label: string, unit: string, value: string, typed: (text: string) => void): HTMLElement {
  const input = element('input', { type: 'text', inputmode: 'decimal', autocomplete: 'off', size: '8', value });
  input.addEventListener('input', () => typed(input.value));
  return labelled(label, input, unit);
}

function labelled(label: string, control: HTMLElement, unit = ''): HTMLElement {
  return element(
    'label',
    { class: 'control' },
    userText(label),
    element('span', {}, control, unit === '' ? null : ` ${unit}`),
  );
}
