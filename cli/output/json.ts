/** JSON that a person can read too: what fits on a line stays on one. */
import { notAResult } from '../../sim/error.ts';

const lineWidth = 120;

/** Indented by two spaces. Errors: one that names a number which is not finite. */
export function jsonText(value: unknown, path = 'summary', indent = ''): string {
  if (typeof value === 'number' && !Number.isFinite(value)) throw notAResult(path, value);
  if (value === null || typeof value !== 'object') return JSON.stringify(value) ?? 'null';
  const entries = Array.isArray(value)
    ? value.map((item, index) => entryText('', item, `${path}.${index}`, indent))
    : Object.entries(value).map(([key, item]) => entryText(`${JSON.stringify(key)}: `, item, `${path}.${key}`, indent));
  const [open, close] = Array.isArray(value) ? '[]' : '{}';
  const line =
    entries.length === 0 || Array.isArray(value) ? `${open}${entries.join(', ')}${close}` : `{ ${entries.join(', ')} }`;
  if (!line.includes('\n') && indent.length + line.length <= lineWidth) return line;
  return `${open}\n${entries.map((entry) => `${indent}  ${entry}`).join(',\n')}\n${indent}${close}`;
}

function entryText(head: string, item: unknown, path: string, indent: string): string {
  return head + jsonText(item, path, `${indent}  `);
}
