/** The tree of a scenario file → Scenario, or every problem of the file at once. How the tree was written is no matter here. */

import { desk } from './build/given.ts';
import { type Built, buildWorld } from './build/world.ts';
import { type CaseTree, conflicts, takeApart } from './cases.ts';
import { withDefaults, withStartDefault } from './defaults.ts';
import { yamlLines } from './emit.ts';
import { listInputs } from './inputs.ts';
import { merge, patchOf } from './merge.ts';
import { readPosterior } from './posterior.ts';
import { ScenarioError } from './problem.ts';
import { spreadWarnings } from './spreads.ts';
import { shorten } from './syntax.ts';
import { type Branch, isNull, placeOf, subtree } from './tree.ts';
import type { Problem, Scenario, ScenarioCase } from './types.ts';
import { type Fault, validateCase, validateHead } from './validate.ts';

export interface ReadTree {
  readonly scenario: Scenario;
  /** Of each case, its defaults still open, for what varies its numbers. */
  readonly trees: readonly CaseTree[];
}

/**
 * Every case of a tree as a World.
 * Shape:  `syntax` holds what is already known to be wrong with the file.
 * Errors: ScenarioError with all problems of the file, sorted by place.
 */
export function readTree(root: Branch, file: string, syntax: readonly Problem[] = []): ReadTree {
  const { head, base, cases, faults } = takeApart(root);
  const { title, notes, posterior: sampled, faults: headFaults } = validateHead(head);
  const { posterior, faults: posteriorFaults } = sampled ? readPosterior(sampled, base) : noPosterior;
  const read = cases.map(readCase);
  const problems = [
    ...syntax,
    ...[...faults, ...headFaults, ...posteriorFaults].map((fault) => problemAt(root, fault, file)),
    ...baseFaults(base).map((fault) => problemAt(base, fault, file)),
    ...read.flatMap(({ tree, keyFaults }) => keyFaults.map((fault) => problemAt(tree, fault, file))),
    ...namingCases(read, root, file),
  ];
  if (problems.length) throw new ScenarioError(inOrder(problems));
  const understoodWith = (samples: string) => understood(root, withSamples(head, samples), base, read);
  const asUnderstood = understood(root, head, base, read);
  const results = read.map(({ result }) => result!);
  const scenario = { title, notes, file, posterior, cases: results, tree: root, asUnderstood, understoodWith };
  return { scenario, trees: cases };
}

const noPosterior = { posterior: null, faults: [] };

/** The head with another path to the samples. */
function withSamples(head: Branch, samples: string): Branch {
  if (!subtree(head, ['posterior', 'file'])) return head;
  return merge(head, patchOf('posterior.file', samples));
}

/** Faults of the scenario itself, for the keys that every case replaces. What is missing may come with the cases. */
function baseFaults(base: Branch): Fault[] {
  return [...validateCase(base).faults.filter(({ isMissing }) => !isMissing), ...conflicts(base)];
}

export interface ReadCase {
  readonly name: string;
  readonly tree: Branch;
  /** What a key says wrongly, whatever the case. */
  readonly keyFaults: readonly Fault[];
  /** What does not fit together in this case. */
  readonly caseFaults: readonly Fault[];
  readonly result: ScenarioCase | null;
}

/** One case's tree, built; what is wrong with it stands in the faults. */
export function readCase({ name, tree }: CaseTree): ReadCase {
  const filled = withDefaults(tree);
  const { keys, broken, faults } = validateCase(filled);
  const clashes = conflicts(filled);
  const found = desk(filled, keys, broken);
  const built = found.attempt(() => buildWorld(found));
  const isSound = !faults.length && !clashes.length && !found.faults.length;
  return {
    name,
    tree: filled,
    keyFaults: [...faults, ...clashes],
    caseFaults: found.faults,
    result: isSound && built ? assemble(name, filled, found, built) : null,
  };
}

function assemble(name: string, tree: Branch, found: ReturnType<typeof desk>, built: Built): ScenarioCase {
  const inputs = listInputs(tree, found.keys, found.used);
  return {
    name,
    model: found.keys.model!,
    ...built,
    inputs,
    derived: found.derived,
    warnings: [...found.warnings, ...spreadWarnings(inputs)],
    remarks: found.remarks,
  };
}

function problemAt(tree: Branch, { path, atKey, what, mend }: Fault, file: string): Problem {
  const place = placeOf(tree, path, atKey);
  const key = place.path.filter((step) => step.trim() !== '').join('.') || 'scenario';
  return { file, ...place.at, key: printable(shorten(key, 120)), what: printable(what), mend: printable(mend) };
}

/** A user's text may hold characters that steer a terminal; a message must not. */
function printable(text: string): string {
  return text.replace(/[\p{Cc}\p{Cf}\p{Zl}\p{Zp}]/gu, '?');
}

/** A fault of some cases only names them, unless it already points into the case. */
function namingCases(read: readonly ReadCase[], root: Branch, file: string): Problem[] {
  const names = new Map<string, { problem: Problem; isInside: boolean; cases: string[] }>();
  for (const { name, tree, caseFaults } of read) {
    for (const fault of caseFaults) {
      const removal = removalOf(root, name, fault);
      const problem = removal ? problemAt(root, { ...fault, path: removal }, file) : problemAt(tree, fault, file);
      const id = identity(problem);
      const isInside = removal !== null || placeOf(tree, fault.path, fault.atKey).path[0] === 'cases';
      const known = names.get(id) ?? { problem, isInside, cases: [] };
      if (!known.cases.includes(name)) known.cases.push(name);
      names.set(id, known);
    }
  }
  return [...names.values()].map(({ problem, isInside, cases }) => {
    if (isInside || cases.length === read.length) return problem;
    const shown = cases.map((name) => `\`${shorten(printable(name))}\``).join(', ');
    return { ...problem, what: `${problem.what} (${cases.length > 1 ? 'cases' : 'case'} ${shown})` };
  });
}

/** Where the case says null to a key that it then lacks, or to the section of the key; null where it does not. */
function removalOf(root: Branch, name: string, { lacking = [] }: Fault): readonly string[] | null {
  const ways = lacking.flatMap(([section, key]) => [[section!], [section!, key!]]);
  const removals = ways.map((way) => ['cases', name, ...way]);
  return removals.find((path) => isNull(subtree(root, path))) ?? null;
}

function identity({ line, column, key, what }: Problem): string {
  return JSON.stringify([line, column, key, what]);
}

function inOrder(problems: readonly Problem[]): Problem[] {
  const once = new Map(problems.map((problem) => [identity(problem), problem]));
  return [...once.values()].sort((a, b) => a.line - b.line || a.column - b.column);
}

function understood(root: Branch, head: Branch, base: Branch, read: readonly ReadCase[]): string {
  const entries = new Map([...head.entries].filter(([key]) => key !== '$schema'));
  const models = [...new Set(read.map(({ result }) => result!.model))];
  for (const [key, entry] of withDefaults(base, models).entries) entries.set(key, entry);
  const cases = root.entries.get('cases');
  if (cases?.tree.kind === 'branch') {
    const shown = [...cases.tree.entries].map(([name, entry], i) => {
      const tree = entry.tree as Branch;
      return [name, { ...entry, tree: withStartDefault(tree, read[i]!.tree) }] as const;
    });
    entries.set('cases', { ...cases, tree: { ...cases.tree, entries: new Map(shown) } });
  }
  const lines = yamlLines({ ...root, entries });
  return `# The scenario as understood: every default shown. Running it gives the same numbers.\n${lines.join('\n')}\n`;
}
