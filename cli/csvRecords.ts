/** CSV by RFC 4180, record by record, with the line where each starts. */
import { SimError } from '../sim/error.ts';

export interface CsvRecord {
  /** From 1. */
  readonly line: number;
  readonly fields: readonly string[];
}

/**
 * The records of a text.
 * Shape:  commas between fields; `"a, b"` with `""` inside for a quote; LF or CRLF. Lines that start with # and empty lines are
 *         passed over.
 * Errors: SimError at `file:line` where a quote is not closed, or something stands behind one.
 */
export function* csvRecords(text: string, file: string): Generator<CsvRecord> {
  let at = text.charCodeAt(0) === 0xfeff ? 1 : 0;
  let line = 1;
  while (at < text.length) {
    const end = lineEnd(text, at);
    const plain = text.slice(at, text[end - 1] === '\r' ? end - 1 : end);
    if (plain.trim() === '' || plain.startsWith('#')) {
      at = end + 1;
      line++;
      continue;
    }
    if (!plain.includes('"')) {
      yield { line, fields: plain.split(',') };
      at = end + 1;
      line++;
      continue;
    }
    const { fields, next } = quotedRecord(text, at, `${file}:${line}`);
    yield { line, fields };
    line += text.slice(at, next).split('\n').length - 1;
    at = next;
  }
}

function lineEnd(text: string, from: number): number {
  const end = text.indexOf('\n', from);
  return end < 0 ? text.length : end;
}

/** A record with quotes, which may run over several lines; `next` is where the one behind it starts. */
function quotedRecord(text: string, from: number, where: string): { fields: string[]; next: number } {
  const fields: string[] = [];
  let at = from;
  for (;;) {
    const field = text[at] === '"' ? quotedField(text, at, where) : plainField(text, at);
    fields.push(field.value);
    at = field.end;
    if (text[at] === ',') at++;
    else break;
  }
  if (text[at] === '\r') at++;
  if (at < text.length && text[at] !== '\n') {
    throw new SimError(where, 'something stands behind a closing quote', 'Write a quote within quotes twice');
  }
  return { fields, next: at + 1 };
}

function plainField(text: string, from: number): { value: string; end: number } {
  let end = from;
  while (end < text.length && text[end] !== ',' && text[end] !== '\n' && text[end] !== '\r') end++;
  return { value: text.slice(from, end), end };
}

function quotedField(text: string, from: number, where: string): { value: string; end: number } {
  let value = '';
  let at = from + 1;
  for (;;) {
    const quote = text.indexOf('"', at);
    if (quote < 0) throw new SimError(where, 'a quote is opened and never closed', 'Close it');
    value += text.slice(at, quote);
    if (text[quote + 1] !== '"') return { value, end: quote + 1 };
    value += '"';
    at = quote + 2;
  }
}
