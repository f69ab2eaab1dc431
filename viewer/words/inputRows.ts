/** The inputs as the page lists them: what all cases share, and what sets them apart. Pure. */
import type { CaseResult } from '../../sim/run.ts';
import type { CaseInput, Derived } from '../../sim/scenario/types.ts';
import { dateText } from './date.ts';
import { friendly } from './friendly.ts';
import { exact, list, withUnit } from './number.ts';

/** What a page of inputs needs of a case. */
export type InputCase = Pick<CaseResult, 'name' | 'inputs' | 'derived'>;

const periapsisKey = 'orbit.periapsisTime';

export interface InputCell {
  /** As the user wrote it, or as the default reads. */
  readonly text: string;
  /** In SI, a date in UTC; null for words. */
  readonly si: string | null;
  readonly isDefault: boolean;
  readonly used: boolean;
}

export interface InputRow {
  readonly key: string;
  readonly label: string;
  /** One a case; null where the case has no such input. */
  readonly cells: readonly (InputCell | null)[];
}

export interface InputLists {
  readonly shared: readonly InputRow[];
  readonly different: readonly InputRow[];
}

export function inputLists(cases: readonly InputCase[]): InputLists {
  const keys = [...new Set(cases.flatMap(({ inputs }) => inputs.map(({ key }) => key)))];
  const rows = keys.map((key) => inputRow(cases, key));
  return { shared: rows.filter(isShared), different: rows.filter((row) => !isShared(row)) };
}

export interface DerivedRow {
  readonly key: string;
  readonly label: string;
  /** One a case; null where the case has no such value. */
  readonly cells: readonly (string | null)[];
}

/** Values that follow from the inputs, in the units of the trade; those that every case shares have one cell. */
export function derivedRows(cases: readonly InputCase[]): DerivedRow[] {
  const keys = [...new Set(cases.flatMap(({ derived }) => derived.map(({ key }) => key)))];
  return keys.map((key) => {
    const found = cases.map(({ derived }) => derived.find((candidate) => candidate.key === key));
    const cells = found.map((derived) => (derived === undefined ? null : derivedText(derived)));
    const isShared = cells.every((cell) => cell !== null && cell === cells[0]);
    return { key, label: derivedLabel(key, found), cells: isShared ? cells.slice(0, 1) : cells };
  });
}

/** A date is shown as one, whatever the clock it is kept on. */
function derivedLabel(key: string, found: readonly (Derived | undefined)[]): string {
  return key === periapsisKey ? 'Periapsis' : found.find((one) => one !== undefined)!.label;
}

function derivedText({ key, value, unit }: Derived): string {
  return key === periapsisKey ? dateText(value) : friendly(value, unit);
}

function inputRow(cases: readonly InputCase[], key: string): InputRow {
  const found = cases.map(({ inputs }) => inputs.find((input) => input.key === key));
  return { key, label: found.find((input) => input !== undefined)!.label, cells: found.map(inputCell) };
}

function inputCell(input: CaseInput | undefined): InputCell | null {
  if (input === undefined) return null;
  const { text, value, unit, since, isDefault, used } = input;
  const si = value === null ? null : since === undefined ? withUnit(exact(value), unit) : dateText(value);
  return { text, si, isDefault, used };
}

/** Written alike everywhere; which cases use it is said beside it. */
function isShared({ cells }: InputRow): boolean {
  const first = cells[0];
  return first !== null && cells.every((cell) => cell?.text === first?.text && cell?.isDefault === first?.isDefault);
}

/** Why a shared input matters less than it seems; null where every case uses it. */
export function useNote({ cells }: InputRow, caseNames: readonly string[]): string | null {
  const users = caseNames.filter((_, index) => cells[index]?.used);
  if (users.length === caseNames.length) return null;
  return users.length === 0 ? 'not used' : `used only by ${list(users.map((name) => `“${name}”`))}`;
}
