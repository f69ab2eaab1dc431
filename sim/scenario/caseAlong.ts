/** A case along one input, for what follows its climates: the World at any value, and a word on where it is not sound. */
import { SimError } from '../error.ts';
import type { World } from '../world.ts';
import { alike, alikeNotes, togetherName } from './alike.ts';
import { type Along, alongText } from './along.ts';
import { fingerprint } from './influence.ts';
import { replacedNotes } from './leftOut.ts';
import { type CaseOver, casesOver } from './over.ts';

/** A case whose input changes. */
export interface CaseAlong {
  readonly name: string;
  readonly model: string;
  readonly tolerance: number;
  readonly warnings: readonly string[];
  /** SI. Errors: SimError that names the value at which the scenario is not sound. */
  worldAt(value: number): World;
}

/**
 * The cases of a scenario (those that `only` names) along one input, in the order of the file; those that coincide as one.
 * Shape:  the text of a file that `readScenario` takes.
 * Errors: ScenarioError where it does not; SimError at `--along` where a case is not sound at an end of the range, or does not
 *         depend on the input.
 */
export function casesAlong(text: string, file: string, along: Along, only?: readonly string[]): readonly CaseAlong[] {
  const options = { withoutWindows: true, ...(only ? { only } : {}) };
  return alike(casesOver(text, file, [along], options).map((one) => caseAlong(one, along))).map(together);
}

interface PrintedCase extends CaseAlong {
  readonly over: CaseOver;
  /** All that its climates depend on at both ends of the input. */
  readonly print: string;
}

function caseAlong(one: CaseOver, along: Along): PrintedCase {
  const { name, model, options, warnings, notes } = one;
  const known = new Map<number, World>(); // what follows a branch comes back to the same values
  const worldAt = (value: number): World => {
    const world = known.get(value) ?? soundAt(one, along, value);
    known.set(value, world);
    return world;
  };
  const ends = [along.from, along.to].map((end) => fingerprint(worldAt(end)));
  const print = JSON.stringify([model, options.tolerance, ...ends]);
  return { name, model, tolerance: options.tolerance, warnings: [...warnings, ...notes], worldAt, over: one, print };
}

/** One case that bears the names of all. */
function together(group: readonly PrintedCase[]): CaseAlong {
  const { name: _, print: __, over, ...one } = group[0]!;
  const overs = group.map((each) => each.over);
  const warnings = [
    ...replacedNotes(overs.flatMap(({ replaced }) => replaced)),
    ...one.warnings,
    ...alikeNotes(overs, 'along this input, which replaces', 'followed'),
  ];
  return { ...one, name: togetherName(overs), warnings };
}

function soundAt(one: CaseOver, along: Along, value: number): World {
  try {
    return one.worldAt([value]);
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    const place = `${along.key} = ${alongText(along, value)}`;
    throw new SimError(
      '--along',
      `case \`${one.name}\` is not sound at ${place}: ${error.where}: ${error.what}`,
      error.mend,
      error,
    );
  }
}
