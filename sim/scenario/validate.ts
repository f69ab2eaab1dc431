/** A tree of one case → its typed keys, every key that does not fit told in plain words. */
import type * as z from 'zod';
import { nearest } from '../quantity/index.ts';
import { aboutKey, keyOfSymbol, keysIn, sectionOf } from './schema/lookup.ts';
import type { PosteriorKeys } from './schema/posterior.ts';
import { type CaseKeys, caseSchema, headSchema, modelNames } from './schema/scenario.ts';
import { shorten } from './syntax.ts';
import { type Branch, isNull, plain, subtree, type Tree, without } from './tree.ts';

/** Something wrong at a path of the tree. */
export interface Fault {
  readonly path: readonly string[];
  /** Point at the key rather than at the value. */
  readonly atKey: boolean;
  readonly what: string;
  readonly mend: string;
  /** The key that a misspelt or misplaced one most likely stands for. */
  readonly meant?: readonly string[];
  /** A key that its section needs is not there. */
  readonly isMissing?: true;
  /** Keys of which one would do, had a case not removed it. */
  readonly lacking?: readonly (readonly string[])[];
}

export interface ValidCase {
  /** What is sound; what is not has been left out. */
  readonly keys: CaseKeys;
  /** `planet` or `planet.albedo`: left out because something in it is wrong, so nothing else is to be said about it. */
  readonly broken: ReadonlySet<string>;
  readonly faults: readonly Fault[];
}

/** Never throws: drops what is wrong and reads the rest, so that all errors of a file come at once. */
export function validateCase(tree: Branch): ValidCase {
  const broken = new Set<string>();
  const faults: Fault[] = [];
  let rest = tree;
  for (let before: Branch | null = null; rest !== before; ) {
    before = rest;
    const result = caseSchema.safeParse(plain(rest));
    if (result.success) return { keys: result.data, broken, faults };
    const found = result.error.issues.flatMap((issue) => faultsOf(issue, rest));
    faults.push(...found.filter((fault) => !isExplained(fault, found)));
    for (const { path, meant } of found) {
      broken.add(path.slice(0, 2).join('.'));
      if (meant) broken.add(meant.slice(0, 2).join('.'));
      rest = without(rest, path.slice(0, 2));
    }
  }
  throw new Error('a fault that points to nothing'); // would never end: each round leaves something out
}

/** A key is missing only because it is misspelt. */
function isExplained({ path, isMissing }: Fault, found: readonly Fault[]): boolean {
  return isMissing === true && found.some(({ meant }) => meant?.join('.') === path.join('.'));
}

export interface ValidHead {
  readonly title: string | null;
  readonly notes: string | null;
  readonly posterior: PosteriorKeys | null;
  readonly faults: readonly Fault[];
}

/** The head of a file: title, notes and posterior. */
export function validateHead(tree: Branch): ValidHead {
  const result = headSchema.safeParse(plain(tree));
  const faults = result.success ? [] : result.error.issues.flatMap((issue) => faultsOf(issue, tree));
  const { title = null, notes = null, posterior = null } = result.data ?? {};
  return { title, notes, posterior, faults };
}

type Issue = z.core.$ZodIssue;

function faultsOf(issue: Issue, tree: Tree, above: readonly string[] = []): Fault[] {
  const path = [...above, ...issue.path.map(String)];
  const found = subtree(tree, path);
  const fault = (what: string, mend: string): Fault[] => [{ path, atKey: false, what, mend }];
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({ path: [...path, key], atKey: true, ...unknownKey(key, path, tree) }));
  }
  if (!found) return [{ path, atKey: false, what: 'nothing is given', mend: adviceFor(path), isMissing: true }];
  if (isNull(found)) return fault('no value is given', `${adviceFor(path)}, or delete the line`);
  if (issue.code === 'custom') return fault(issue.message, String(issue.params?.mend ?? adviceFor(path)));
  if (issue.code === 'invalid_union') {
    const branch = issue.errors.find(isNearMiss);
    if (branch) return branch.flatMap((inner) => faultsOf(inner, tree, path));
    return fault(...wrongKind(found, path, issue.errors.flat()));
  }
  if (issue.code === 'too_small' || issue.code === 'too_big') return fault(...wrongLength(found, path));
  return fault(...wrongKind(found, path, [issue]));
}

/** The input was of the kind that this member of a union takes, and failed inside. */
function isNearMiss(issues: readonly Issue[]): boolean {
  return issues.some(
    ({ code, path }) => path.length > 0 || ['custom', 'unrecognized_keys', 'too_small', 'too_big'].includes(code),
  );
}

function unknownKey(key: string, path: readonly string[], tree: Tree): Pick<Fault, 'what' | 'mend' | 'meant'> {
  const section = path.join('.') || 'a scenario';
  const colon = key.indexOf(':');
  if (colon > 0 && isNull(subtree(tree, [...path, key]))) {
    const name = key.slice(0, colon);
    return {
      what: `a space is missing after \`${name}:\``,
      mend: `Write \`${name}: ${shorten(key.slice(colon + 1))}\``,
    };
  }
  if (key === '<<') return { what: '`<<` belongs to YAML 1.1', mend: 'Write the keys out, or use cases' };
  const what = `\`${shorten(key)}\` is not a key of ${section}`;
  const known = keysIn(path);
  const meant = keyOfSymbol(path, key) ?? nearest(key, known);
  if (meant) return { what, mend: `Did you mean \`${meant}\``, meant: [...path, meant] };
  const elsewhere = sectionOf(key);
  if (elsewhere) return { what, mend: `It belongs in ${elsewhere}`, meant: [elsewhere, key] };
  const isTop = path.length > 0 && keysIn([]).includes(key);
  return { what, mend: isTop ? 'It belongs at the top of the file' : `Keys here are ${listed(known)}` };
}

function wrongKind(found: Tree, path: readonly string[], issues: readonly Issue[]): [what: string, mend: string] {
  const words = issues.flatMap((issue) => (issue.code === 'invalid_value' ? issue.values.map(String) : []));
  if (found.kind === 'leaf') {
    const text = shorten(found.text);
    if (path.join('.') === 'model') {
      return [`no model \`${text}\` is built`, `Write ${modelNames.map((name) => `\`${name}\``).join(' or ')}`];
    }
    const meant = words.length ? nearest(text, words) : null;
    if (meant) return [`\`${text}\` is not known here`, `Did you mean \`${meant}\``];
    if (path.join('.') === 'planet.albedo') {
      return [`\`${text}\` is not a ramp`, `Write bondAlbedo: ${text}, or albedo: ${aboutKey(path)?.examples[0]}`];
    }
    if (keysIn(path).length && !words.length) return [`\`${text}\` is not a section`, adviceFor(path)];
    return [`\`${text}\` is not understood`, words.length > 2 ? `Write one of ${listed(words)}` : adviceFor(path)];
  }
  return [found.kind === 'list' ? 'a list stands here' : 'a section stands here', adviceFor(path)];
}

function wrongLength(found: Tree, path: readonly string[]): [what: string, mend: string] {
  const count = found.kind === 'list' ? found.items.length : 0;
  return [count ? `the list has ${count} ${count === 1 ? 'entry' : 'entries'}` : 'the list is empty', adviceFor(path)];
}

function adviceFor(path: readonly string[]): string {
  const examples = aboutKey(path)?.examples;
  if (examples?.length) return `Write e.g. ${examples[0]}`;
  const keys = keysIn(path);
  return keys.length ? `Write ${path.at(-1)}: and below it, indented, keys such as ${keys[0]}:` : 'Write a value';
}

function listed(words: readonly string[]): string {
  return words.map((word) => `\`${word}\``).join(', ');
}
