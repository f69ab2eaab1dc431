/** A file's tree → one tree a case: the base with the case's changes laid over it. */

import { nearest } from '../quantity/index.ts';
import { alternatives, keysOf, merge } from './merge.ts';
import { isKnownKey, keysIn } from './schema/lookup.ts';
import { type Branch, isNull, subtree, type Tree } from './tree.ts';
import type { Fault } from './validate.ts';

export interface CaseTree {
  readonly name: string;
  readonly tree: Branch;
}

export interface Parts {
  /** Title, notes and posterior. */
  readonly head: Branch;
  /** Everything else but cases. */
  readonly base: Branch;
  readonly cases: readonly CaseTree[];
  /** Paths from the top of the file. */
  readonly faults: readonly Fault[];
}

const headKeys = ['title', 'notes', 'posterior', '$schema'];
const mendCases = 'Write `name: {}` for the scenario as it stands, or `name: { changes }`, one a line';
/** C0 and C1 controls: they would garble tables and file names. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: the control characters are the point
const controls = /[\u0000-\u001f\u007f-\u009f]/;

/** Takes a file apart. Without `cases` there is one case, `base`. */
export function takeApart(root: Branch): Parts {
  const faults: Fault[] = [];
  const pick = (wanted: (key: string) => boolean): Branch => ({
    ...root,
    entries: new Map([...root.entries].filter(([key]) => wanted(key))),
  });
  const head = pick((key) => headKeys.includes(key));
  const base = pick((key) => !headKeys.includes(key) && key !== 'cases');
  checkNames(root, 'windows', faults);
  const cases = readCases(root, base, faults);
  return { head, base, cases, faults };
}

function readCases(root: Branch, base: Branch, faults: Fault[]): CaseTree[] {
  const listed = root.entries.get('cases')?.tree;
  if (!listed) return [{ name: 'base', tree: base }];
  const fault = (path: readonly string[], what: string, mend: string) => {
    faults.push({ path, atKey: true, what, mend });
  };
  if (listed.kind !== 'branch' || listed.entries.size === 0) {
    const found = isNull(listed) || listed.kind === 'branch' ? 'no case is given' : `${nameOf(listed)} stands here`;
    fault(['cases'], found, mendCases);
    return [];
  }
  checkNames(root, 'cases', faults);
  const cases: CaseTree[] = [];
  for (const [name, { tree }] of listed.entries) {
    if (tree.kind !== 'branch') {
      const found = isNull(tree) ? 'the case is empty' : `${nameOf(tree)} stands here`;
      fault(['cases', name], found, mendCases);
      continue;
    }
    checkHead(tree, faults);
    checkNames(tree, 'windows', faults);
    checkRemovals(tree, [], faults);
    cases.push({ name, tree: merge(base, withoutHead(tree)) });
  }
  return cases;
}

function nameOf(tree: Tree): string {
  return tree.kind === 'list' ? 'a list' : 'a single value';
}

/** Names of cases and windows head tables and become findings' names. */
function checkNames(tree: Branch, section: 'cases' | 'windows', faults: Fault[]): void {
  const named = tree.entries.get(section)?.tree;
  if (named?.kind !== 'branch') return;
  for (const name of named.entries.keys()) {
    const isEmpty = name.trim() === '';
    if (!isEmpty && !controls.test(name) && name !== '__proto__') continue;
    const what = isEmpty ? 'the name is empty' : 'the name cannot be printed';
    faults.push({ path: [...tree.path, section, name], atKey: true, what, mend: 'Name it with letters and digits' });
  }
}

function checkHead(tree: Branch, faults: Fault[]): void {
  for (const key of [...headKeys, 'cases']) {
    if (!tree.entries.has(key)) continue;
    const what = `\`${key}\` cannot change from case to case`;
    faults.push({ path: [...tree.path, key], atKey: true, what, mend: 'Write it once, at the top of the file' });
  }
}

function withoutHead(tree: Branch): Branch {
  const entries = new Map([...tree.entries].filter(([key]) => !headKeys.includes(key) && key !== 'cases'));
  return { ...tree, entries };
}

/** A null that removes a key no scenario knows is a misspelling. */
function checkRemovals(tree: Branch, path: readonly string[], faults: Fault[]): void {
  for (const [key, { tree: value }] of tree.entries) {
    const here = [...path, key];
    if (isNull(value) && !isKnownKey(here) && !headKeys.includes(key)) {
      const meant = nearest(key, keysIn(path));
      const mend = meant ? `Did you mean \`${meant}\`` : 'Delete the line';
      faults.push({ path: value.path, atKey: true, what: `\`${key}: null\` removes a key that is unknown`, mend });
    }
    if (value.kind === 'branch') checkRemovals(value, here, faults);
  }
}

/** Two ways to say one thing stand side by side in one tree, and may not. */
export function conflicts(tree: Branch): Fault[] {
  return alternatives.flatMap((group) => {
    const section = group.section.split('.');
    const found = subtree(tree, section);
    if (found?.kind !== 'branch' || group.mayAgree || group.section.includes('.')) return [];
    const present = group.ways
      .map((way) => keysOf(group, way).filter((key) => found.entries.has(key) && !isNull(found.entries.get(key)?.tree)))
      .filter((keys) => keys.length > 0);
    const [first, second] = present;
    if (!first || !second) return [];
    const what = `\`${first.join('`, `')}\` and \`${second.join('`, `')}\` say the same thing in two ways`;
    return [{ path: [...section, second[0]!], atKey: true, what, mend: 'Keep one of them' }];
  });
}
