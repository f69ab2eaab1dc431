/** Text for a terminal: how wide it is, how it wraps, and nothing in it that could steer the terminal. */

const wideLetter =
  /[\p{sc=Han}\p{sc=Hiragana}\p{sc=Katakana}\p{sc=Hangul}\p{Emoji_Presentation}\u3000-\u303f\uff01-\uff60]/u;
const asciiOf: Readonly<Record<string, string>> = {
  '—': '-',
  '–': '-',
  '−': '-',
  '±': '+/-',
  '≤': '<=',
  '≥': '>=',
  '×': 'x',
  '·': '.',
  '°': ' deg',
  '’': "'",
  '‘': "'",
  '“': '"',
  '”': '"',
  µ: 'u',
};

/** Control characters and marks of writing direction become `?`: a title must not move the cursor or turn a line round. Line feeds stay. */
export function printable(text: string): string {
  return text.replace(/[^\P{Cc}\n]|\p{Bidi_Control}/gu, '?');
}

/** For terminals without Unicode: accents dropped, the rest spelled or `?`. */
export function toAscii(text: string): string {
  const spelled = text.replace(/[^\0-\x7f]/gu, (letter) => asciiOf[letter] ?? letter);
  return spelled
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\0-\x7f]/gu, '?');
}

/** Columns that the text takes: East Asian wide characters and pictures two, combining marks none. */
export function textWidth(text: string): number {
  let width = 0;
  for (const letter of text) width += letterWidth(letter);
  return width;
}

function letterWidth(letter: string): number {
  if (letter < '\u0300') return 1;
  if (/[\p{M}\p{Cf}]/u.test(letter)) return 0;
  return wideLetter.test(letter) ? 2 : 1;
}

export function padStart(text: string, width: number): string {
  return ' '.repeat(Math.max(0, width - textWidth(text))) + text;
}

export function padEnd(text: string, width: number): string {
  return text + ' '.repeat(Math.max(0, width - textWidth(text)));
}

/** Lines of at most `width` columns, broken between words; a longer word is broken inside. At least one line. */
export function wrap(text: string, width: number): string[] {
  const lines: string[] = [''];
  for (const word of text.split(/\s+/).filter((part) => part !== '')) {
    for (const [index, piece] of pieces(word, width).entries()) {
      const last = lines[lines.length - 1]!;
      const joined = last === '' ? piece : `${last} ${piece}`;
      if (index === 0 && textWidth(joined) <= width) lines[lines.length - 1] = joined;
      else lines.push(piece);
    }
  }
  return lines;
}

/** `head` and then the text, wrapped beneath itself; under the head where that is long. */
export function hanging(head: string, text: string, width: number): string[] {
  const indent = textWidth(head);
  if (indent > width / 2) return [...wrap(head, width), ...wrap(text, width - 2).map((line) => `  ${line}`)];
  return wrap(text, width - indent).map((line, index) => (index === 0 ? head : ' '.repeat(indent)) + line);
}

function pieces(word: string, width: number): string[] {
  const out: string[] = [''];
  for (const letter of word) {
    if (textWidth(out[out.length - 1]! + letter) > width) out.push(letter);
    else out[out.length - 1] += letter;
  }
  return out;
}
