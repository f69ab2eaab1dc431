/** A scenario whose uncertain inputs are drawn: which they are, and the World of each case at any of their values. */
import { SimError } from '../error.ts';
import { formatQuantity } from '../quantity/index.ts';
import type { Distribution } from '../quantity/types.ts';
import type { SolveOptions, Window, World } from '../world.ts';
import { standardDeviation } from './build/given.ts';
import type { Built } from './build/world.ts';
import { fingerprintWithWindows } from './influence.ts';
import { readWithTrees } from './read.ts';
import { type Redundant, withoutRedundant } from './redundant.ts';
import { endsOfSpread, turnOf } from './schema/lookup.ts';
import type { Branch } from './tree.ts';
import type { CaseInput, ScenarioCase } from './types.ts';
import { validateCase } from './validate.ts';
import { type Varied, varied } from './varied.ts';

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
    (only?.includes(one.name) ?? true) ? [caseDrawn(one, trees[i]!.tree)] : [],
  );
}

function caseDrawn(one: ScenarioCase, tree: Branch): CaseDrawn {
  const spread = one.inputs.filter(({ distribution }) => distribution.form !== 'exact');
  const dated = spread.filter(({ since }) => since !== undefined);
  const numbers = spread.filter((input) => !dated.includes(input));
  const { redundant, ...rest } = withoutRedundant(
    { tree, keys: validateCase(tree).keys },
    new Set(numbers.map(({ key }) => key)),
  );
  const candidates = numbers.filter(({ key }) => redundant.every((gone) => gone.key !== key)).map(uncertain);
  const probed = new Probes(varied(rest, candidates.map(toVarying)), candidates, one.name);
  const inputs = candidates.filter((_, i) => probed.matters(i));
  const idle = [
    ...dated.map((input) => idleInput(input, 'no finding depends on a date')),
    ...candidates.filter((input) => !inputs.includes(input)).map((input) => idleInput(input, reasonOf(one, input.key))),
  ];
  return {
    name: one.name,
    model: one.model,
    options: one.options,
    windows: one.windows,
    windowsVary: probed.moveWindows(),
    inputs,
    idle,
    warnings: one.warnings,
    notes: redundant.map(redundantNote),
    ...varied(rest, inputs.map(toVarying)),
  };
}

const toVarying = ({ key, unit }: UncertainInput) => ({ key, unit });

function uncertain({ key, label, writtenUnit, text, value, distribution }: CaseInput): UncertainInput {
  const path = key.split('.');
  const period = turnOf(path);
  const bounds = endsOfSpread(path);
  return { key, label, unit: writtenUnit, text, centre: value!, distribution, bounds, period };
}

function idleInput({ key, label }: Pick<CaseInput, 'key' | 'label'>, reason: string): IdleInput {
  return { key, label, reason };
}

function reasonOf({ model, inputs }: ScenarioCase, key: string): string {
  const isUsed = inputs.find((input) => input.key === key)?.used ?? false;
  return isUsed ? 'no finding changes with it' : `model ${model} does not use it here`;
}

/** `orbit.semiMajorAxis is left out: it follows from orbit.period and star.mass.` */
export function redundantNote({ key, instead }: Redundant): string {
  const words = instead.length > 1 ? `${instead.slice(0, -1).join(', ')} and ${instead.at(-1)}` : instead[0];
  return `${key} is left out: it follows from ${words}.`;
}

/** Worlds at a few values of each input, to see which of them change anything. */
class Probes {
  private readonly low: readonly number[];
  private readonly high: readonly number[];
  private readonly centre: readonly number[];
  private readonly seen = new Map<string, Built | SimError>();

  private readonly made: Varied;
  private readonly inputs: readonly UncertainInput[];
  private readonly name: string;

  constructor(made: Varied, inputs: readonly UncertainInput[], name: string) {
    this.made = made;
    this.inputs = inputs;
    this.name = name;
    this.centre = inputs.map(({ centre }) => centre);
    this.low = inputs.map((input) => aside(input, -1));
    this.high = inputs.map((input) => aside(input, 1));
  }

  /** Whether input `i` changes a World or a window, whatever the others are; where no two values can be compared, it may. */
  matters(i: number): boolean {
    this.requireRoom(i);
    const pairs = this.pairs(i);
    return pairs.length === 0 || pairs.some(([a, b]) => fingerprintWithWindows(a) !== fingerprintWithWindows(b));
  }

  moveWindows(): boolean {
    const print = ({ windows }: Built) => JSON.stringify(windows);
    return this.inputs.some((_, i) => this.pairs(i).some(([a, b]) => print(a) !== print(b)));
  }

  private pairs(i: number): [Built, Built][] {
    return [this.centre, this.low, this.high].flatMap((others) => {
      const [a, b] = [this.low, this.high].map((side) => this.at(others.with(i, side[i]!)));
      return isBuilt(a!) && isBuilt(b!) ? [[a, b] as [Built, Built]] : [];
    });
  }

  private at(values: readonly number[]): Built | SimError {
    const id = values.join();
    const known = this.seen.get(id);
    if (known) return known;
    const found = attempt(() => this.made.builtAt(values));
    this.seen.set(id, found);
    return found;
  }

  /** A circle with a spread, of a planet that has seasons: nothing but its centre is complete. */
  private requireRoom(i: number): void {
    const { centre, key, unit } = this.inputs[i]!;
    const sides = [this.low[i]!, this.high[i]!].filter((value) => value !== centre);
    const faults = sides.map((value) => this.at(this.centre.with(i, value))).filter((found) => !isBuilt(found));
    if (faults.length < sides.length || sides.length === 0) return;
    const { where, what, mend } = faults[0] as SimError;
    const found = `case \`${this.name}\` is sound only where ${key} is ${formatQuantity(centre, unit)}: ${where}: ${what}`;
    throw new SimError(key, found, mend);
  }
}

function isBuilt(found: Built | SimError): found is Built {
  return !(found instanceof SimError);
}

function attempt(make: () => Built): Built | SimError {
  try {
    return make();
  } catch (error) {
    if (error instanceof SimError) return error;
    throw error;
  }
}

/** A value to one side of the centre that the spread takes. */
function aside({ centre, distribution, bounds }: UncertainInput, side: -1 | 1): number {
  if (distribution.form === 'uniform' || distribution.form === 'logUniform')
    return side < 0 ? distribution.low : distribution.high;
  const value = centre + (side * standardDeviation(distribution)) / 2;
  return bounds ? Math.min(Math.max(value, bounds.low), bounds.high) : value;
}
