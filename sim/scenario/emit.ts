/**
 * A tree as YAML that every reader takes the same way: words that YAML 1.1 turns into something else (yes, 3:2, 1_000, dates)
 * stand in quotes. Reading it again gives the same tree.
 */
import { type Branch, type Leaf, numberText, type Tree } from './tree.ts';

/** Lines of a block mapping; a default is marked as such. */
export function yamlLines(branch: Branch, indent = ''): string[] {
  return [...branch.entries].flatMap(([key, { tree }]) => entryLines(keyText(key), tree, indent));
}

const longestImplicitKey = 1000;

function entryLines(key: string, tree: Tree, indent: string): string[] {
  const isLong = key.length > longestImplicitKey;
  const start = isLong ? [`${indent}? ${key}`] : [];
  const head = isLong ? `${indent}:` : `${indent}${key}:`;
  if (tree.kind === 'branch') {
    if (tree.entries.size === 0) return [...start, `${head} {}`];
    return [...start, head, ...yamlLines(tree, `${indent}  `)];
  }
  if (tree.kind === 'list') return [...start, ...listLines(head, tree.items, indent)];
  const block = blockText(tree);
  if (block)
    return [...start, `${head} ${block.header}`, ...block.lines.map((line) => (line ? `${indent}  ${line}` : ''))];
  return [...start, `${head} ${leafText(tree)}${tree.isDefault ? ' # default' : ''}`];
}

function listLines(head: string, items: readonly Tree[], indent: string): string[] {
  if (items.every((item) => item.kind === 'leaf')) return [`${head} [${items.map(leafText).join(', ')}]`];
  return [head, ...items.flatMap((item) => itemLines(item, `${indent}  `))];
}

function itemLines(item: Tree, indent: string): string[] {
  if (item.kind === 'leaf') return [`${indent}- ${leafText(item)}`];
  if (item.kind === 'list') return [`${indent}-`, ...item.items.flatMap((inner) => itemLines(inner, `${indent}  `))];
  const lines = yamlLines(item, `${indent}  `);
  return lines.length ? [`${indent}- ${lines[0]!.slice(indent.length + 2)}`, ...lines.slice(1)] : [`${indent}- {}`];
}

function leafText(tree: Tree): string {
  const { value, text } = tree as Leaf;
  if (typeof value === 'number') return numberText(value, text);
  return typeof value === 'string' ? scalarText(value) : String(value);
}

function keyText(key: string): string {
  return scalarText(key);
}

const plainText = /^(?:[A-Za-z0-9<.]|[+-](?=[0-9.]))[A-Za-z0-9 ._+/^*()%<>±°·⁰¹²³⁴⁵⁶⁷⁸⁹⁻−-]*$/u;
const traps = [
  /^(?:y|n|yes|no|on|off|true|false|null)$/i,
  /^[-+]?[.\d][\d_.,]*(?:e[-+]?\d+)?$/i, // a number in some reader
  /^[-+]?0[box][\da-f_]+$/i,
  /^[-+]?\.(?:inf|nan)$/i,
  /^\d{4}-\d{1,2}-\d{1,2}/, // a date
  /^<</,
  /\s$/,
];
/** Controls, format characters such as direction marks, and halves of surrogate pairs: better seen than felt. */
const unseen = /[\p{Cc}\p{Cf}\p{Cs}\p{Co}\p{Zl}\p{Zp}\ufeff\ufffe\uffff]/u;

function scalarText(value: string): string {
  if (plainText.test(value) && !traps.some((trap) => trap.test(value))) return value;
  if (!unseen.test(value)) return `'${value.replaceAll("'", "''")}'`;
  return `"${[...value].map(escaped).join('')}"`;
}

function escaped(sign: string): string {
  if (sign === '"' || sign === '\\') return `\\${sign}`;
  if (!unseen.test(sign)) return sign;
  const code = sign.codePointAt(0)!.toString(16);
  return code.length > 4 ? `\\U${code.padStart(8, '0')}` : `\\u${code.padStart(4, '0')}`;
}

/** Several lines of plain text read best as a block; null when the text is not of that kind. */
function blockText({ value }: Leaf): { header: string; lines: string[] } | null {
  if (typeof value !== 'string' || !value.includes('\n')) return null;
  const body = value.endsWith('\n') ? value.slice(0, -1) : value;
  const lines = body.split('\n');
  const isTidy = lines.every((line) => !unseen.test(line) && (line === '' || line.trim() !== ''));
  if (!isTidy || /^\s/.test(body) || body === '' || body.endsWith('\n')) return null;
  return { header: value.endsWith('\n') ? '|' : '|-', lines };
}
