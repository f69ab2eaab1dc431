/**
 * Findings as numbers: what one run of a model fills in, world after world, without leaving garbage. Labels stand in the
 * columns beside it; `findingsOf` puts the two together.
 */
import type { Finding, FindingColumn } from './finding.ts';

export interface Sheet {
  /** SI, by column; NaN where undefined. */
  readonly value: Float64Array;
  /** ± in the column's unit; NaN where none is known. */
  readonly plusMinus: Float64Array;
  /** Why a value is undefined; null where it is not. */
  readonly reason: (string | null)[];
}

export function emptySheet(columns: number): Sheet {
  return {
    value: new Float64Array(columns).fill(Number.NaN),
    plusMinus: new Float64Array(columns).fill(Number.NaN),
    reason: new Array(columns).fill(null),
  };
}

export function enter(sheet: Sheet, column: number, value: number, plusMinus = Number.NaN): void {
  sheet.value[column] = value;
  sheet.plusMinus[column] = plusMinus;
  sheet.reason[column] = null;
}

export function enterUndefined(sheet: Sheet, column: number, reason: string): void {
  sheet.value[column] = Number.NaN;
  sheet.plusMinus[column] = Number.NaN;
  sheet.reason[column] = reason;
}

export function findingsOf(sheet: Sheet, columns: readonly FindingColumn[]): Finding[] {
  return columns.map((column, i) => {
    const reason = sheet.reason[i];
    if (reason !== null) return { ...column, value: null, reason };
    const plusMinus = sheet.plusMinus[i];
    return Number.isNaN(plusMinus)
      ? { ...column, value: sheet.value[i] }
      : { ...column, value: sheet.value[i], plusMinus };
  });
}
