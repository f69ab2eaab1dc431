/** Comma-separated values: RFC 4180 quoting, numbers in the shortest text that reads back as the same number. */
import { notAResult } from '../../sim/error.ts';

/** A field of text, quoted where it must be. */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Errors: throws when the number is not finite; `where` names its column. */
export function csvNumber(value: number, where: string): string {
  if (!Number.isFinite(value)) throw notAResult(where, value);
  return String(value);
}
