/**
 * User text as a figure label. Plotly reads a small HTML in labels (`<b>`, `<a href>`, `&lt;`), so markup is written as
 * entities; control and direction characters, which could reorder the words around them, are dropped; long text is cut.
 */
export function plainLabel(text: string, longest = 32): string {
  const words = text
    .replace(/\p{C}/gu, (character) => (/\s/.test(character) ? ' ' : ''))
    .replace(/\s+/g, ' ')
    .trim();
  const characters = [...words];
  const cut = characters.length > longest ? `${characters.slice(0, longest - 1).join('')}…` : words;
  return cut.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
}
