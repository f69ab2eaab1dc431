/** Comma-separated values: RFC 4180 quoting, numbers in the shortest text that reads back as the same number. */
import { SimError } from '../../sim/error.ts';

/** A field of text, quoted where it must be. */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Errors: SimError when the number is not finite; `where` names its column. */
export function csvNumber(value: number, where: string): string {
  if (!Number.isFinite(value)) throw new SimError(where, `${value} is not a result`, 'Only finite numbers are written');
  return String(value);
}
