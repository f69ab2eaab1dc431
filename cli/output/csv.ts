/** Comma-separated values: RFC 4180 quoting, numbers in the shortest text that reads back as the same number. */
import { notAResult } from '../../sim/error.ts';

/** A field of text, quoted where it must be. */
export function csvField(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** `star.luminosity_Lsun`; a pure number has no unit behind it. */
export function csvHeader(name: string, unit: string): string {
  return unit === '1' ? name : `${name}_${unit.replace(/[^A-Za-z0-9.^]+/g, '_')}`;
}

/** Errors: throws when the number is not finite; `where` names its column. */
export function csvNumber(value: number, where: string): string {
  if (!Number.isFinite(value)) throw notAResult(where, value);
  return String(value);
}
