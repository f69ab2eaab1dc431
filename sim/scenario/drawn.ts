/** A scenario whose uncertain inputs are drawn: which they are, and the World of each case at any of their values. */
import { SimError } from '../error.ts';
import { formatQuantity, fromUnit } from '../quantity/index.ts';
import type { Distribution } from '../quantity/types.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import { standardDeviation } from './build/given.ts';
import type { Built } from './build/world.ts';
import { withDefaults } from './defaults.ts';
import { redundantNote } from './leftOut.ts';
import { type CaseColumns, columnsOf, type Posterior, rulesNote } from './posterior.ts';
import { type ProbeValues, probe } from './probes.ts';
import { readWithTrees } from './read.ts';
import { withoutRedundant } from './redundant.ts';
import { endsOfSpread, turnOf } from './schema/lookup.ts';
import type { Branch } from './tree.ts';
import type { CaseInput, ScenarioCase } from './types.ts';
import { validateCase } from './validate.ts';
import { varied } from './varied.ts';

/** An input that is drawn. SI but for `unit` and `text`. */
export interface UncertainInput {
  readonly key: string;
  readonly label: string;
  /** As typed; `1` for a pure number. */
  readonly unit: string;
  readonly text: string;
  readonly centre: number;
  readonly distribution: Distribution;
  /** Where the spread is cut, infinite on a side that has no end; null for a key without ends. */
  readonly bounds: { readonly low: number; readonly high: number } | null;
  /** 2π for angles that come round and are never cut, else null. */
  readonly period: number | null;
  /** The column of the posterior that gives it, whatever its distribution; null where the distribution does. */
  readonly column: string | null;
}

/** An input with a spread that is not drawn, and why. */
export interface IdleInput {
  readonly key: string;
  readonly label: string;
  readonly reason: string;
}

export interface CaseDrawn {
  readonly name: string;
  readonly model: string;
  readonly options: SolveOptions;
  /** At the centre. */
  readonly windows: readonly Window[];
  /** The windows change with the draw (habitable limits at an uncertain temperature of the star): `builtAt` has each draw's own. */
  readonly windowsVary: boolean;
  readonly inputs: readonly UncertainInput[];
  readonly idle: readonly IdleInput[];
  readonly warnings: readonly string[];
  /** What is not drawn, and what gives its value. */
  readonly notes: readonly string[];
  /**
   * SI values in the order of `inputs`. Equal to the last bit to what reading them from a file gives.
   * Errors: SimError where a draw is no sound planet (periapsis inside the star, a value out of bounds): a failed draw.
   */
  worldAt(values: ArrayLike<number>): World;
  /** The same with the windows of the draw. */
  builtAt(values: ArrayLike<number>): Built;
}

/**
 * The cases of a scenario (those that `only` names) as they are drawn, in the order of the file.
 * Shape:  the text of a file that `readScenario` takes.
 * Errors: ScenarioError where it does not; SimError at a key where a case is sound only at its centre.
 */
export function casesDrawn(text: string, file: string, only?: readonly string[]): readonly CaseDrawn[] {
  const { scenario, trees } = readWithTrees(text, file);
  return scenario.cases.flatMap((one, i) =>
    (only?.includes(one.name) ?? true) ? [caseDrawn(one, trees[i]!.tree, scenario.posterior)] : [],
  );
}

function caseDrawn(one: ScenarioCase, tree: Branch, posterior: Posterior | null): CaseDrawn {
  const { ruling, notes } = columnsOf(posterior, tree);
  const spread = one.inputs.filter(({ key, distribution }) => distribution.form !== 'exact' || ruling.has(key));
  const dated = spread.filter(({ since }) => since !== undefined);
  const numbers = spread.filter((input) => !dated.includes(input));
  const filled = withDefaults(tree);
  const { redundant, ...rest } = withoutRedundant(
    { tree: filled, keys: validateCase(filled).keys },
    new Set(numbers.map(({ key }) => key)),
  );
  const candidates = numbers
    .filter(({ key }) => redundant.every((gone) => gone.key !== key))
    .map((input) => uncertain(input, ruling.get(input.key)?.column ?? null));
  const probes = probe(varied(rest, candidates.map(toVarying)), probeValues(candidates));
  for (const [i, input] of candidates.entries()) requireRoom(one.name, input, probes.faultBeside(i));
  const inputs = candidates.filter((_, i) => probes.matters(i));
  const idle = [
    ...dated.map((input) => idleInput(input, 'no finding depends on a date')),
    ...candidates.filter((input) => !inputs.includes(input)).map((input) => idleInput(input, reasonOf(one, input.key))),
  ];
  return {
    name: one.name,
    model: one.model,
    options: one.options,
    windows: one.windows,
    windowsVary: probes.windowsMove,
    inputs,
    idle,
    warnings: one.warnings,
    notes: [...notes, ...spread.flatMap((input) => overruled(input, ruling)), ...redundant.map(redundantNote)],
    ...varied(rest, inputs.map(toVarying)),
  };
}

const toVarying = ({ key, unit }: UncertainInput) => ({ key, unit });

function overruled({ key, text, distribution }: CaseInput, ruling: CaseColumns['ruling']): string[] {
  const column = ruling.get(key);
  return column && distribution.form !== 'exact' ? [rulesNote(column, key, text)] : [];
}

function uncertain(
  { key, label, writtenUnit, text, value, distribution }: CaseInput,
  column: string | null,
): UncertainInput {
  const path = key.split('.');
  const period = turnOf(path);
  const bounds = endsOfSpread(path);
  return { key, label, unit: writtenUnit, text, centre: value!, distribution, bounds, period, column };
}

function idleInput({ key, label }: Pick<CaseInput, 'key' | 'label'>, reason: string): IdleInput {
  return { key, label, reason };
}

function reasonOf({ model, inputs }: ScenarioCase, key: string): string {
  const isUsed = inputs.find((input) => input.key === key)?.used ?? false;
  return isUsed ? 'no finding changes with it' : `model ${model} does not use it here`;
}

/** A circle with a spread, of a planet that has seasons: nothing but its centre is complete. */
function requireRoom(name: string, { key, unit, centre }: UncertainInput, fault: SimError | null): void {
  if (!fault) return;
  const found = `case \`${name}\` is sound only where it is ${formatQuantity(centre, unit)}: ${fault.where}: ${fault.what}`;
  throw new SimError(key, found, fault.mend);
}

function probeValues(inputs: readonly UncertainInput[]): ProbeValues {
  return {
    centre: inputs.map(({ centre }) => centre),
    low: inputs.map((input) => aside(input, -1)),
    high: inputs.map((input) => aside(input, 1)),
  };
}

/** A value to one side of the centre that the spread takes. */
function aside({ centre, unit, distribution, bounds }: UncertainInput, side: -1 | 1): number {
  if (distribution.form === 'uniform' || distribution.form === 'logUniform')
    return side < 0 ? distribution.low : distribution.high;
  const width = distribution.form === 'exact' ? aPart(centre, unit) : standardDeviation(distribution) / 2;
  const value = centre + side * width;
  return bounds ? Math.min(Math.max(value, bounds.low), bounds.high) : value;
}

/** A width for samples that nobody has read yet: a part of the centre, or of the unit. */
function aPart(centre: number, unit: string): number {
  return 0.05 * (Math.abs(centre) || fromUnit(1, unit) - fromUnit(0, unit));
}
