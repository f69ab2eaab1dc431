/** `--along KEY=RANGE`: one input of a scenario that takes all values of a range, and the World of each case at any of them. */
import { SimError } from '../error.ts';
import { formatQuantity, nearest, parseQuantity, type Quantity } from '../quantity/index.ts';
import type { World } from '../world.ts';
import { type CaseTree, takeApart } from './cases.ts';
import { readDocument } from './document.ts';
import { merge, patchOf } from './merge.ts';
import { ScenarioError } from './problem.ts';
import { readCase } from './read.ts';
import { aboutKey, keysIn, labelOf, quantityAt, sectionOf } from './schema/lookup.ts';
import { shorten } from './syntax.ts';
import { subtree, without } from './tree.ts';
import type { ScenarioCase } from './types.ts';

export interface Along {
  /** Dotted key, `star.luminosity`. */
  readonly key: string;
  /** A few words for axes. */
  readonly label: string;
  /** As typed, `Lsun`; `1` for a pure number. */
  readonly unit: string;
  /** SI. */
  readonly from: number;
  readonly to: number;
  /** Whether the axis is logarithmic. */
  readonly log: boolean;
}

/** A case whose input changes. */
export interface CaseAlong {
  readonly name: string;
  readonly model: string;
  readonly tolerance: number;
  readonly warnings: readonly string[];
  /** SI. Errors: SimError that names the value at which the scenario is not sound. */
  worldAt(value: number): World;
}

const where = '--along';
const sample = 'star.luminosity=0.8 to 1.3 Lsun';
/** The sections that make a World. */
const followed = ['star', 'orbit', 'planet'];

/**
 * `star.luminosity=0.8 to 1.3 Lsun`, or with ` log` behind it.
 * Units:  the range's own, to SI; bounds are those of the key.
 * Errors: SimError at `--along`: no `=`, an unknown key or one that is no number, no range, no unit, out of bounds.
 */
export function readAlong(text: string): Along {
  const equals = text.indexOf('=');
  const key = (equals < 0 ? text : text.slice(0, equals)).trim();
  if (key === '') throw new SimError(where, 'no key is given', `Write e.g. \`${sample}\``);
  const path = key.split('.');
  checkKey(path);
  const spec = followed.includes(path[0]!) ? quantityAt(path) : null;
  if (spec === null) throw cannotFollow(path);
  const example = exampleFor(path);
  const written = equals < 0 ? '' : text.slice(equals + 1).trim();
  if (written === '') {
    const what = equals < 0 ? `\`${key}\` has no range behind it` : `the range of ${key} is empty`;
    throw new SimError(where, what, example);
  }
  const { distribution, unit } = atAlong(key, () => parseQuantity(written, { ...spec, spread: true }));
  if (distribution.form !== 'uniform' && distribution.form !== 'logUniform') {
    throw new SimError(where, `\`${shorten(written)}\` is not a range`, example);
  }
  const { low: from, high: to } = distribution;
  return { key, label: labelOf(path), unit, from, to, log: distribution.form === 'logUniform' };
}

function checkKey(path: readonly string[]): void {
  const key = path.join('.');
  for (const [depth, step] of path.entries()) {
    const above = path.slice(0, depth);
    const known = keysIn(above);
    if (depth === 1 && !followed.includes(path[0]!)) break; // told as what cannot be followed
    if (known.includes(step)) continue;
    const section = depth === 0 ? sectionOf(step) : null;
    const near = section === null ? nearest(step, known) : `${section}.${step}`;
    const meant = near && (section === null ? [...above, near, ...path.slice(depth + 1)].join('.') : near);
    const what =
      depth === 0 ? `there is no key \`${shorten(key)}\`` : `\`${shorten(step)}\` is not a key of ${above.join('.')}`;
    const listed = known.map((name) => `\`${name}\``).join(', ');
    const mend = meant
      ? `Did you mean \`${meant}\``
      : known.length
        ? `Keys here are ${listed}`
        : `End it at \`${above.join('.')}\``;
    throw new SimError(where, what, mend);
  }
}

function cannotFollow(path: readonly string[]): SimError {
  const key = path.join('.');
  const below = followed.includes(path[0]!)
    ? keysIn(path).find((name) => quantityAt([...path, name]) !== null)
    : undefined;
  if (below) return new SimError(where, `\`${key}\` is a section`, `Name one of its keys, e.g. \`${key}.${below}\``);
  const what = `\`${key}\` is a setting, a word, a date or a table, along which no climate can be followed`;
  return new SimError(where, what, `Name a number of the star, the orbit or the planet, e.g. \`${sample}\``);
}

/** With the key's own unit, from its example. */
function exampleFor(path: readonly string[]): string {
  const key = path.join('.');
  if (key === 'star.luminosity') return `Write e.g. \`${sample}\``;
  const [number = '', ...unit] = String(aboutKey(path)?.examples[0] ?? '').split(' ');
  const low = Number(number);
  if (!Number.isFinite(low) || low <= 0) return `Write e.g. \`${sample}\``;
  const high = Number((1.25 * low).toPrecision(3));
  return `Write e.g. \`${[`${key}=${low} to ${high}`, ...unit].join(' ')}\``;
}

function atAlong(key: string, read: () => Quantity): Quantity {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    throw new SimError(where, `${key}: ${error.what}`, error.mend, error);
  }
}

/** A value of the input as a scenario would give it; 17 digits bring back the same number to a rounding or two. */
export function alongText({ unit }: Pick<Along, 'unit'>, value: number, digits = 6): string {
  return formatQuantity(value, unit, digits);
}

/**
 * The cases of a scenario (those that `only` names) along one input, in the order of the file; those that coincide as one.
 * Shape:  the text of a file that `readScenario` takes.
 * Errors: ScenarioError where it does not; SimError at `--along` where a case is not sound at an end of the range, or does not
 *         depend on the input.
 */
export function casesAlong(text: string, file: string, along: Along, only?: readonly string[]): readonly CaseAlong[] {
  const { root, problems } = readDocument(text, file);
  if (!root) throw new ScenarioError(problems);
  const { cases } = takeApart(root);
  const chosen = cases.filter(({ name }) => only?.includes(name) ?? true);
  return coinciding(chosen.map((item) => caseAlong(item, along))).map(together);
}

/** Cases in groups that are one and the same along the input: they differed in what it replaces. */
function coinciding(all: readonly PrintedCase[]): PrintedCase[][] {
  const groups: PrintedCase[][] = [];
  for (const one of all) {
    const group = groups.find(([first]) => first!.print === one.print);
    if (group) group.push(one);
    else groups.push([one]);
  }
  return groups;
}

/** One case that bears the names of all. */
function together(group: readonly PrintedCase[]): CaseAlong {
  const { print: _, ...one } = group[0]!;
  if (group.length === 1) return one;
  const names = group.map(({ name }) => name);
  const listed = names.map((name) => `“${name}”`).join(', ');
  const warning = `The cases ${listed} are the same along this input, which replaces what sets them apart: they were followed once.`;
  return { ...one, name: names.join(' = '), warnings: [...one.warnings, warning] };
}

/** With all that its climates depend on at both ends of the input. */
interface PrintedCase extends CaseAlong {
  readonly print: string;
}

function caseAlong({ name, tree }: CaseTree, along: Along): PrintedCase {
  const path = along.key.split('.');
  const listAt = path.findIndex((_, depth) => subtree(tree, path.slice(0, depth))?.kind === 'list');
  if (listAt >= 0) {
    const what = `${path.slice(0, listAt).join('.')} of case \`${name}\` is a list, and ${along.key} would replace all of it`;
    throw new SimError(where, what, 'Write a single form in the scenario, or follow another key');
  }
  const base = without(tree, ['windows']); // they measure a climate and do not change it
  const built = new Map<number, ScenarioCase>();
  const caseAt = (value: number): ScenarioCase => {
    const known = built.get(value);
    if (known) return known;
    const made = build({ name, tree: base }, along, value);
    built.set(value, made);
    return made;
  };
  const [first, last] = [caseAt(along.from), caseAt(along.to)];
  const prints = [fingerprint(first.world), fingerprint(last.world)];
  if (prints[0] === prints[1]) {
    const what = `the climate of case \`${name}\` does not depend on ${along.key}`;
    throw new SimError(where, what, 'Follow another key, or leave the case out with --only');
  }
  return {
    name,
    model: first.model,
    tolerance: first.options.tolerance,
    warnings: warningsOf(along, first.world, last.world),
    worldAt: (value) => caseAt(value).world,
    print: JSON.stringify([first.model, first.options.tolerance, ...prints]),
  };
}

function build({ name, tree }: CaseTree, along: Along, value: number): ScenarioCase {
  const patch = patchOf(along.key, alongText(along, value, 17));
  const { keyFaults, caseFaults, result } = readCase({ name, tree: merge(tree, patch) });
  if (result) return result;
  const { path, what, mend } = [...keyFaults, ...caseFaults][0]!;
  const found = `case \`${name}\` is not sound at ${along.key} = ${alongText(along, value)}: ${path.join('.')}: ${what}`;
  throw new SimError(where, found, mend);
}

/** Temperatures at which two laws are compared, K. */
const probes = [60, 150, 240, 260, 280, 330, 600, 1500];

/** All of a World that its climates depend on. */
function fingerprint({ star, orbit, surface, globe }: World): string {
  const { albedo, emission, absorbingFraction, internalHeat, heatCapacity } = surface;
  return JSON.stringify([
    [star.luminosity, orbit.semiMajorAxis, orbit.eccentricity, orbit.period],
    [albedo.warm, albedo.ice, albedo.ramp, probes.map((temperature) => emission.at(temperature))],
    [absorbingFraction, internalHeat, heatCapacity],
    globe ? { ...globe, solarDay: null } : null,
  ]);
}

/** A star that brightens while the flux at the planet is given moves the planet. */
function warningsOf({ key }: Along, first: World, last: World): string[] {
  const flux = ({ star, orbit }: World) => star.luminosity / orbit.semiMajorAxis ** 2;
  const isKept = Math.abs(flux(first) / flux(last) - 1) < 1e-9;
  if (!isKept || first.star.luminosity === last.star.luminosity) return [];
  return [
    `orbit.instellation is given: ${key} then moves the planet and leaves its light as it is. Follow orbit.instellation.`,
  ];
}
