/** Columns for tests of the orbit's figures: a Kepler orbit with the inputs and findings that these figures read. */
import { trueFromMean } from '../../../sim/orbit/anomaly.ts';
import type { CaseInput } from '../../../sim/scenario/types.ts';
import type { Figure } from '../../../viewer/figures/figure.ts';
import { type Column, columnsOf } from '../../../viewer/words/columns.ts';
import { type PlainCase, plainRun, type RunChoices } from '../fixture.ts';

export const period = 120 * 86_400;
export const semiMajorAxis = 0.48 * 1.495978707e11;
export const degrees = 180 / Math.PI;

/** With `timeOfMin` at the coldest row, and further inputs. */
export function orbitColumns(
  cases: readonly PlainCase[],
  given: Readonly<Record<string, number>> = {},
  choices: Omit<RunChoices, 'cases'> = {},
): Column[] {
  return columnsOf(plainRun({ ...choices, cases })).map((column) => withInputs(withColdest(column), given));
}

function withColdest(column: Column): Column {
  const { time, temperature } = column.dataset.variables;
  const coldest = temperature!.data.indexOf(Math.min(...temperature!.data));
  const isStill = column.state.findings.some(({ name, value }) => name === 'timeOfMax' && value === null);
  const found = {
    name: 'timeOfMin',
    unit: 's',
    label: 'Time of minimum',
    ...(isStill ? { value: null, reason: 'the temperature is constant' } : { value: time!.data[coldest]! }),
  };
  return { ...column, state: { ...column.state, findings: [...column.state.findings, found] } };
}

function withInputs(column: Column, given: Readonly<Record<string, number>>): Column {
  const inputs = Object.entries(given).map(
    ([key, value]): CaseInput => ({
      key,
      value,
      unit: 'SI',
      writtenUnit: 'SI',
      text: String(value),
      label: key,
      distribution: { form: 'exact' },
      isDefault: false,
      used: true,
    }),
  );
  return { ...column, inputs: [...column.inputs, ...inputs] };
}

/** Where the planet stands at a time after periapsis. */
export function trueAnomalyAt(time: number, eccentricity: number): number {
  return trueFromMean((2 * Math.PI * time) / period, eccentricity);
}

/** Names of everything in a figure that is a number and not finite. */
export function notFinite(figure: Figure): string[] {
  const odd: string[] = [];
  JSON.stringify(figure, (key, value) => {
    if (typeof value === 'number' && !Number.isFinite(value)) odd.push(key);
    return value;
  });
  return odd;
}
