/** Comma-separated values: RFC 4180 quoting, numbers in full, a lone empty field where there is nothing. Pure. */

export type CsvValue = number | string | boolean | null | undefined;

/**
 * A line for each row, the names first. A number that is none stays empty. A text that a spreadsheet would take for a formula gets an
 * apostrophe before it, which spreadsheets read as “this is text”.
 */
export function csvText(names: readonly string[], rows: readonly (readonly CsvValue[])[]): string {
  return [names, ...rows].map((row) => `${row.map(field).join(',')}\n`).join('');
}

function field(value: CsvValue): string {
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
  if (typeof value === 'boolean') return String(value);
  return quoted(harmless(value ?? ''));
}

function quoted(text: string): string {
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** Also behind blanks, and in the wide signs that some spreadsheets take for the narrow ones. */
function harmless(text: string): string {
  return /^[\s\p{C}]*[=+\-@＝＋－＠]/u.test(text) ? `'${text}` : text;
}

/** `Time after periapsis`, `d` → `time_after_periapsis_d`; `W m⁻²` and `W/m2` → `W_m2`. */
export function csvName(label: string, unit: string): string {
  const name = words(label).toLowerCase();
  const symbol = unitWord(unit);
  return symbol === '' ? name : `${name}_${symbol}`;
}

const unitWords: Readonly<Record<string, string>> = { '°': 'deg', '%': 'percent', '1': '' };
const raisedDigits = '⁰¹²³⁴⁵⁶⁷⁸⁹';

function unitWord(unit: string): string {
  const flat = unit
    .replaceAll('⁻¹ᐟ²', '^0.5')
    .replaceAll('⁻¹', '')
    .replaceAll(/[⁻−]/g, '')
    .replaceAll(/[⁰¹²³⁴⁵⁶⁷⁸⁹]/g, (digit) => String(raisedDigits.indexOf(digit)))
    .replaceAll('₀', '0');
  if (flat in unitWords) return unitWords[flat]!;
  return flat
    .replaceAll('%', ' percent ')
    .replaceAll('°', ' deg ')
    .split(/[^\p{L}\p{N}.^]+/u)
    .filter((part) => part !== '')
    .join('_');
}

function words(label: string): string {
  return label
    .split(/[^\p{L}\p{N}.]+/u)
    .filter((part) => part !== '')
    .join('_');
}
