/** Every finding of every case and state side by side, in groups: for reading, and for copying as text or CSV. Pure. */
import { radiansPerDegree } from '../../sim/constants.ts';
import { roundedUp } from './cells.ts';
import { type Column, columnName, commonTimeUnit, finding, periodOf } from './columns.ts';
import { csvText } from './csv.ts';
import { nbsp, timeDecimals, timesPower, unitText } from './number.ts';

export interface NumbersTable {
  readonly columns: readonly Column[];
  readonly groups: readonly NumberGroup[];
}

export interface NumberGroup {
  readonly title: string;
  readonly rows: readonly NumberRow[];
}

export interface NumberRow {
  /** The contract's name. */
  readonly name: string;
  readonly label: string;
  /** SI, as `summary.json` has it. */
  readonly unit: string;
  /** Of the numbers shown; empty for a pure number. */
  readonly symbol: string;
  /** One a column. */
  readonly cells: readonly NumberCell[];
}

export interface NumberCell {
  /** SI; null where there is none, with the reason. */
  readonly value: number | null;
  readonly plusMinus: number | null;
  readonly reason: string | null;
  readonly shown: ShownNumber | null;
}

/** (digits ± error) × 10^power, in the row's symbol; an ASCII minus. */
export interface ShownNumber {
  readonly digits: string;
  /** Null where it does not reach the last digit. */
  readonly error: string | null;
  readonly power: number;
}

const groups: readonly (readonly [title: string, names: RegExp, units?: RegExp])[] = [
  ['Windows', /\./],
  ['Steady values and the textbook', /^(steady|equilibrium|circular|fluxMean)/],
  ['Shares of area and time', /Fraction/],
  ['Latitudes', /Latitude|iceEdge/],
  ['Temperatures', /./, /^K$/],
  ['Rates of change', /^timeOfFastest/],
  ['Rates of change', /./, /^K\/s$/],
  ['Damping and stability', /^(damping|stabilityMargin)$/],
  ['Times', /^lagOfMaxOrbits$/],
  ['Times', /./, /^s$/],
  ['Fluxes', /./, /^W\/m2$/],
];
const order = [
  'Temperatures',
  'Times',
  'Damping and stability',
  'Rates of change',
  'Latitudes',
  'Shares of area and time',
  'Windows',
  'Steady values and the textbook',
  'Fluxes',
  'Others',
];

/** At least one column. */
export function numbersTable(columns: readonly Column[]): NumbersTable {
  const names = [...new Set(columns.flatMap(({ state }) => state.findings.map(({ name }) => name)))];
  const rows = names.map((name) => rowOf(name, columns));
  return {
    columns,
    groups: order
      .map((title) => ({ title, rows: rows.filter((row) => groupOf(row) === title) }))
      .filter((group) => group.rows.length > 0),
  };
}

function groupOf({ name, unit }: NumberRow): string {
  const found = groups.find(([, names, units]) => names.test(name) && (units?.test(unit) ?? true));
  return found?.[0] ?? 'Others';
}

function rowOf(name: string, columns: readonly Column[]): NumberRow {
  const known = columns.flatMap((column) => finding(column, name) ?? [])[0]!;
  const { symbol, per, decimals, leastDigits } = ruleOf(name, known.unit, columns);
  return {
    name,
    label: known.label,
    unit: known.unit,
    symbol,
    cells: columns.map((column): NumberCell => {
      const found = finding(column, name);
      const nothing = { value: null, plusMinus: null, shown: null };
      if (found === undefined) return { ...nothing, reason: 'not a finding of this case' };
      if (found.value === null) return { ...nothing, reason: found.reason ?? 'not defined' };
      const plusMinus = found.plusMinus ?? null;
      const shown = shownNumber(found.value / per, (plusMinus ?? 0) / per, { decimals, leastDigits });
      return { value: found.value, plusMinus, reason: null, shown };
    }),
  };
}

interface Precision {
  /** Places behind the point; null to go by digits alone. */
  readonly decimals: number | null;
  /** Digits that a number keeps however small it is. */
  readonly leastDigits: number;
}

interface Rule extends Precision {
  readonly symbol: string;
  /** One of the shown unit, in SI. */
  readonly per: number;
}

function ruleOf(name: string, unit: string, columns: readonly Column[]): Rule {
  const time = commonTimeUnit(columns);
  if (name.startsWith('orbitMeanInWindow.')) return { symbol: '', per: 1, decimals: 0, leastDigits: 0 };
  if (unit === 's') {
    const decimals = Math.max(...columns.map((column) => timeDecimals(periodOf(column), time)));
    return { symbol: time.symbol, per: time.seconds, decimals, leastDigits: 3 };
  }
  if (unit === 'K') return { symbol: 'K', per: 1, decimals: 2, leastDigits: 0 };
  if (unit === 'K/s')
    return { symbol: unitText(`K/${time.symbol}`), per: 1 / time.seconds, decimals: null, leastDigits: 4 };
  if (unit === 'deg') return { symbol: '°', per: 1, decimals: 2, leastDigits: 0 };
  if (unit === 'rad') return { symbol: '°', per: radiansPerDegree, decimals: 2, leastDigits: 0 };
  if (unit === '1' && /[fF]raction/.test(name)) return { symbol: '%', per: 0.01, decimals: 2, leastDigits: 2 };
  return { symbol: unitText(unit), per: 1, decimals: null, leastDigits: unit === '1' ? 4 : 5 };
}

/** Where the error reaches the last digit there are fewer of them, and the error stands beside. */
function shownNumber(value: number, error: number, { decimals, leastDigits }: Precision): ShownNumber {
  const size = value === 0 ? 0 : Math.floor(Math.log10(Math.abs(value)));
  const bySize = leastDigits - 1 - size;
  const power = decimals === null && (size < -3 || size > 5) ? size : 0;
  const wanted = decimals === null ? bySize : value === 0 ? decimals : Math.max(decimals, bySize);
  const places = Math.max(0, Math.min(12, wanted + power));
  const [mantissa, own] = [value / 10 ** power, error / 10 ** power];
  if (!(own >= 0.5 * 10 ** -places)) return { digits: fixedText(mantissa, places), error: null, power };
  const kept = Math.max(0, Math.min(places, 1 - Math.floor(Math.log10(own))));
  return { digits: fixedText(mantissa, kept), error: roundedUp(own, kept).toFixed(kept), power };
}

/** No minus before nothing. */
function fixedText(value: number, places: number): string {
  const text = value.toFixed(places);
  return Number(text) === 0 ? text.replace('-', '') : text;
}

/** `438.66`, `1.10 ± 0.02`, `1.2 × 10⁻⁹`; a dash where there is none. */
export function numberText({ shown }: NumberCell): string {
  if (shown === null) return '—';
  const digits = shown.digits.replace('-', '−');
  const number = shown.error === null ? digits : `${digits} ± ${shown.error}`;
  if (shown.power === 0) return number;
  return timesPower(shown.error === null ? number : `(${number})`, shown.power);
}

/** `Maximum temperature, K`. */
export function rowText({ label, symbol }: NumberRow): string {
  return symbol === '' ? label : `${label},${nbsp}${symbol}`;
}

/** Why numbers are missing, said once for each row and reason: `Lag of the maximum (rock, ocean): it does not vary.` */
export function absences({ columns, groups: all }: NumbersTable): string[] {
  return all.flatMap(({ rows }) =>
    rows.flatMap(({ label, cells }) => {
      const reasons = [...new Set(cells.map(({ reason }) => reason))].filter((reason) => reason !== null);
      return reasons.map((reason) => {
        const whose = columns.filter((_, at) => cells[at]!.reason === reason).map(columnName);
        return `${label} (${whose.join(', ')}): ${reason}.`;
      });
    }),
  );
}

/** Set in columns by spaces, as it stays in a mail. */
export function numbersText(table: NumbersTable): string {
  const { columns, groups: all } = table;
  const body = all.flatMap(({ title, rows }) => [
    [title],
    ...rows.map((row) => [`  ${rowText(row)}`, ...row.cells.map(numberText)]),
  ]);
  const lines = [['', ...columns.map(columnName)], ...body].map((cells) => cells.map(oneLine));
  const widths = [0, ...columns.keys()].map((_, at) =>
    Math.max(...lines.filter((cells) => cells.length > 1).map((cells) => lengthOf(cells[at]!))),
  );
  const set = (cells: readonly string[]): string =>
    cells
      .map((cell, at) => {
        const blanks = ' '.repeat(Math.max(0, widths[at]! - lengthOf(cell)));
        return at === 0 ? `${cell}${blanks}` : `${blanks}${cell}`;
      })
      .join('  ')
      .trimEnd();
  const missing = absences(table).map(oneLine);
  return [...lines.map(set), ...(missing.length > 0 ? ['', ...missing] : [])].map((line) => `${line}\n`).join('');
}

function lengthOf(text: string): number {
  return [...text].length;
}

/** Names may hold line ends and signs that turn the writing direction. */
function oneLine(text: string): string {
  return text.replace(/\p{Zs}|\p{Cc}/gu, ' ').replace(/\p{C}/gu, '');
}

/** Tidy and in full, in SI as `summary.json` has it: a row for each number. */
export function numbersCsv({ columns, groups: all }: NumbersTable): string {
  const rows = all.flatMap((group) =>
    group.rows.flatMap(({ name, label, unit, cells }) =>
      cells.map(({ value, plusMinus, reason }, at) => {
        const { caseName, state } = columns[at]!;
        return [caseName, state.label, name, value, unit, plusMinus, reason, label];
      }),
    ),
  );
  return csvText(['case', 'state', 'finding', 'value', 'unit', 'numerical_error', 'reason', 'label'], rows);
}
