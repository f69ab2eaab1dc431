/** A choice among named things, by the browser's own control. */
import { element } from './element.ts';

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

/** One group needs no title. */
export function choice(
  label: string,
  groups: readonly OptionGroup[],
  chosen: string,
  changed: (value: string) => void,
): HTMLElement {
  const options = ({ options: own }: OptionGroup): HTMLElement[] =>
    own.map(({ value, label: text }) => element('option', { value }, shortened(text)));
  const entries =
    groups.length === 1
      ? options(groups[0]!)
      : groups.map((group) => element('optgroup', { label: group.title }, ...options(group)));
  const select = element('select', {}, ...entries);
  select.value = chosen;
  select.addEventListener('change', () => changed(select.value));
  return element('label', { class: 'choice' }, `${label} `, select);
}

function shortened(text: string): string {
  const characters = [...text];
  return characters.length > longest ? `${characters.slice(0, longest - 1).join('')}…` : text;
}
