/** Elements from plain calls. Text only ever becomes a text node: nothing from a scenario is read as markup. */

export type Child = Node | string | null;
export type Attributes = Readonly<Record<string, string>>;

export function element<Name extends keyof HTMLElementTagNameMap>(
  name: Name,
  attributes: Attributes,
  ...children: readonly Child[]
): HTMLElementTagNameMap[Name] {
  return filled(document.createElement(name), attributes, children);
}

const svgNamespace = 'http://www.w3.org/2000/svg';

export function svgElement<Name extends keyof SVGElementTagNameMap>(
  name: Name,
  attributes: Attributes,
  ...children: readonly Child[]
): SVGElementTagNameMap[Name] {
  return filled(document.createElementNS(svgNamespace, name), attributes, children);
}

/** Text that a user wrote: kept in its own writing direction, so that it cannot reorder what stands around it. */
export function userText(text: string): HTMLElement {
  return element('bdi', {}, text);
}

function filled<Made extends Element>(made: Made, attributes: Attributes, children: readonly Child[]): Made {
  for (const [key, value] of Object.entries(attributes)) made.setAttribute(key, value);
  made.append(...children.filter((child) => child !== null));
  return made;
}
