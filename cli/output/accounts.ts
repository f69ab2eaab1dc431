/** Under the table: the two accounts of each case, the warnings, the notes on the run, and what the numbers are not. */
import type { State } from '../../sim/models/model.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import { findingOf, hasLatitudes } from './columns.ts';
import { magnitude } from './numbers.ts';
import type { Terminal } from './terminal.ts';
import { hanging, padEnd } from './text.ts';

const caution =
  'No clouds, weather or chemistry. Planning figures: no basis for qualifying hardware or for the safety of anyone.';
const latitudeCaution =
  'By latitude: means over longitude and day; heat moves by diffusion, whose coefficients are tuned to the Earth.';
const labelWidth = 10;

export function accountLines(result: RunResult, terminal: Terminal): string[] {
  return [
    ...labelled('accounts', result.cases.map(accountText), 'dim', terminal),
    ...labelled('warning', mergedWarnings(result), 'yellow', terminal),
    ...labelled('note', [...result.notes, ...latitudeCautions(result), caution], 'dim', terminal),
  ];
}

function accountText({ name, checks, passed, accountLimit, tolerance, states }: CaseResult): string {
  const { orbitMeanInstellation: light, energyBalance: energy } = checks;
  const differences = [light, energy].map(({ relativeDifference }) => magnitude(relativeDifference));
  const error = magnitude(Math.max(...states.map((state) => state.errorEstimate))) + bandErrorText(states);
  const limits = passed ? '' : ` (limits ${magnitude(accountLimit)}, error ${magnitude(tolerance)})`;
  const verdict = passed ? 'pass' : 'FAIL';
  return `${name}: instellation ${differences[0]}, energy ${differences[1]}, error < ${error}: ${verdict}${limits}`;
}

function latitudeCautions({ cases }: RunResult): readonly string[] {
  return cases.some(({ states }) => states.some(hasLatitudes)) ? [latitudeCaution] : [];
}

/** Bands have an error of their own beside that in time, both in what is known of the mean. */
function bandErrorText(states: readonly State[]): string {
  const errors = states.filter(hasLatitudes).map((state) => findingOf(state, 'temperatureMean')?.plusMinus ?? 0);
  return errors.length === 0 ? '' : ` in time, mean with bands ± ${magnitude(Math.max(...errors))} K`;
}

/** Texts under one label, each with a hanging indent. */
function labelled(label: string, texts: readonly string[], format: 'dim' | 'yellow', terminal: Terminal): string[] {
  const lines = texts.flatMap((text, index) =>
    hanging(padEnd(index === 0 ? label : '', labelWidth), terminal.say(text), terminal.width),
  );
  return lines.map((line) => terminal.paint(format, line));
}

/** The same warning of several cases once, with their names. */
function mergedWarnings({ cases }: RunResult): string[] {
  const names = new Map<string, string[]>();
  for (const { name, warnings } of cases) {
    for (const warning of warnings) names.set(warning, [...(names.get(warning) ?? []), name]);
  }
  return [...names].map(([warning, whose]) =>
    whose.length === cases.length ? warning : `${whose.join(', ')}: ${warning}`,
  );
}
