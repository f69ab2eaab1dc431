/** What a run or a grid makes of uncertain inputs: it uses their centres. Said once for the scenario, with every centre that nobody typed. */
import { formatInstantUtc, formatQuantity, parseUnit } from '../quantity/index.ts';
import type { Posterior } from './posterior.ts';
import type { CaseInput, ScenarioCase } from './types.ts';

const digits = 4;

/** Words for the command that does not propagate them; `run` unless another is named. */
export interface Unpropagated {
  readonly command: 'run' | 'grid';
  /** Whose centres are used. */
  readonly which: string;
}

const byRun: Unpropagated = { command: 'run', which: 'every input' };
/** A grid varies some of the inputs itself; leave them out of the cases. */
export const byGrid: Unpropagated = { command: 'grid', which: 'every input that no range varies' };

/** Empty where every input that is used is exact and no samples are given. */
export function spreadNotes(
  { cases, posterior }: { readonly cases: readonly Noted[]; readonly posterior: Posterior | null },
  by = byRun,
): string[] {
  return [...centreNotes(cases, by), ...(posterior ? [sampleNote(posterior, by)] : [])];
}

type Noted = Pick<ScenarioCase, 'name' | 'inputs'>;

function sampleNote({ file }: Posterior, { command }: Unpropagated): string {
  return `Samples of ${file} are not used by ${command}: the values that stand in the scenario are; perilag spread draws from them.`;
}

function centreNotes(cases: readonly Noted[], { command, which }: Unpropagated): string[] {
  const uncertain = cases.flatMap(({ name, inputs }) =>
    inputs.filter(isSpread).map((input) => ({ name, input, said: saidOf(input) })),
  );
  if (uncertain.length === 0) return [];
  const told = new Map<string, string[]>();
  for (const { name, said } of uncertain) if (said !== null) told.set(said, [...(told.get(said) ?? []), name]);
  return [
    `Spreads of inputs are not propagated by ${command}: ${which} is used at its centre; perilag spread samples them.`,
    ...[...told].map(([said, names]) =>
      names.length === cases.length
        ? `${said}.`
        : `${said} (${names.length > 1 ? 'cases' : 'case'} ${names.join(', ')}).`,
    ),
  ];
}

function isSpread({ used, distribution }: CaseInput): boolean {
  return used && distribution.form !== 'exact';
}

/** `planet.bondAlbedo < 0.4 (95%) is used at 0.1377, its median`; null where the centre stands in what was typed. */
function saidOf(input: CaseInput): string | null {
  const which = centreOf(input);
  return which === null ? null : `${input.key} ${input.text} is used at ${centreText(input, digits)}, its ${which}`;
}

/** What the centre is of a form that does not spell it out. */
function centreOf({ distribution }: CaseInput): string | null {
  switch (distribution.form) {
    case 'exact':
    case 'normal':
    case 'splitNormal':
      return null;
    case 'uniform':
      return 'midpoint';
    case 'logUniform':
      return 'geometric midpoint';
    case 'upperLimit':
    case 'isotropic':
      return 'median';
  }
}

/** The value that a run uses, in the unit that was typed; a date in UTC. */
export function centreText({ value, writtenUnit, since, text }: CaseInput, places?: number): string {
  if (value === null) return text;
  return since === undefined ? formatQuantity(value, writtenUnit, places) : formatInstantUtc(value);
}

/** Keys whose numbers may be negative. */
const signed = /^orbit\.(?:sqrt)?E(?:Cos|Sin)Omega$|\.p2$/i;

/** A downward spread wider than a value that cannot be negative: a slip, or a limit written as a value. */
export function spreadWarnings(inputs: readonly CaseInput[]): string[] {
  return inputs.flatMap(({ key, text, value, writtenUnit, since, distribution }) => {
    const isPositive =
      value !== null && since === undefined && !signed.test(key) && parseUnit(writtenUnit).dimension[4] === 0;
    const down =
      distribution.form === 'normal' ? distribution.sigma : distribution.form === 'splitNormal' ? distribution.down : 0;
    if (!isPositive || down <= value) return [];
    return [
      `${key} ${text}: the spread is larger than the value, which cannot be negative; a limit such as < 0.12 (95%) may say it better.`,
    ];
  });
}
