/**
 * What stands side by side in table and figures: one column a state, so a case with two periodic states has two.
 * Built once from the run; figures and words read columns and need not know how cases and states nest.
 */
import type { Dataset } from '../../sim/dataset/dataset.ts';
import type { Finding } from '../../sim/findings/finding.ts';
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { CaseInput, Derived } from '../../sim/scenario/types.ts';
import type { Seconds, TdbSeconds } from '../../sim/si.ts';
import type { PlainPlace } from '../../sim/studies/grid/storeNumber.ts';
import type { Window } from '../../sim/world.ts';
import { type TimeUnit, timeUnit } from './number.ts';

export interface Column {
  readonly caseName: string;
  /** Place of the case in the run: gives colour and marker. */
  readonly caseIndex: number;
  /** Place of the state in its case, warm first. */
  readonly stateIndex: number;
  /** Words for the state, e.g. `cold state`; null where the case has one that is not the cold. */
  readonly stateName: string | null;
  readonly isForwardRun: boolean;
  readonly state: State;
  readonly dataset: Dataset;
  readonly windows: readonly Window[];
  readonly inputs: readonly CaseInput[];
  readonly derived: readonly Derived[];
  readonly periapsisTime: TdbSeconds | null;
  /** Where the case stands among all plain lumped worlds. */
  readonly plain: PlainPlace;
}

export function columnsOf(result: RunResult): Column[] {
  return result.cases.flatMap((oneCase, caseIndex) =>
    oneCase.states.map((state, stateIndex) => ({
      caseName: oneCase.name,
      caseIndex,
      stateIndex,
      stateName: oneCase.states.length > 1 || state.label === 'cold' ? stateName(state) : null,
      isForwardRun: state.label === 'forward',
      state,
      dataset: state.dataset,
      windows: oneCase.windows,
      inputs: oneCase.inputs,
      derived: oneCase.derived,
      periapsisTime: periapsisTime(oneCase),
      plain: oneCase.plain,
    })),
  );
}

/** Case and, where it has several, state: `bare rock, cold state`. */
export function columnName({ caseName, stateName: name }: Pick<Column, 'caseName' | 'stateName'>): string {
  return name === null ? caseName : `${caseName}, ${name}`;
}

export function finding(column: { readonly state: State }, name: string): Finding | undefined {
  return column.state.findings.find((candidate) => candidate.name === name);
}

/** The number, or null where the finding is absent or undefined. */
export function findingValue(column: { readonly state: State }, name: string): number | null {
  return finding(column, name)?.value ?? null;
}

function stateName(state: State): string {
  return state.stable !== false ? `${state.label} state` : `${state.label} state (unstable)`;
}

function periapsisTime(oneCase: CaseResult): TdbSeconds | null {
  return oneCase.derived.find(({ key }) => key === 'orbit.periapsisTime')?.value ?? null;
}

/** Length of the column's orbit. Errors: every model gives it; one that does not is our own fault. */
export function periodOf(column: Column): Seconds {
  const period = findingValue(column, 'period');
  if (period === null) throw new Error(`${columnName(column)} has no period`);
  return period;
}

/** One unit of time for all columns, from the middle of their periods. */
export function commonTimeUnit(columns: readonly Column[]): TimeUnit {
  const periods = columns.map(periodOf).toSorted((a, b) => a - b);
  return timeUnit(periods[Math.floor(periods.length / 2)]!);
}
