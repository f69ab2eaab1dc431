/**
 * A scenario file as a plain tree in which every key and value knows its place in the file and its path there,
 * so that an error found after cases were merged still points at what the user typed.
 */

export interface Place {
  readonly line: number;
  readonly column: number;
}

interface Node {
  readonly at: Place;
  /** Keys from the top of the file, e.g. `cases`, `bare rock`, `planet`. */
  readonly path: readonly string[];
}

export interface Leaf extends Node {
  readonly kind: 'leaf';
  readonly value: string | number | boolean | null;
  /** As typed, without quotes. */
  readonly text: string;
  readonly quoted: boolean;
  /** Not in the file: a default. */
  readonly isDefault?: true;
}

export interface List extends Node {
  readonly kind: 'list';
  readonly items: readonly Tree[];
}

export interface Branch extends Node {
  readonly kind: 'branch';
  readonly entries: ReadonlyMap<string, Entry>;
}

export interface Entry {
  readonly keyAt: Place;
  readonly tree: Tree;
}

export type Tree = Leaf | List | Branch;

/** Where what stands in no file is said to be. */
export const nowhere: Place = { line: 1, column: 1 };

/** A branch with nothing but a tree at a path. */
export function branchAt(path: readonly string[], tree: Tree): Branch {
  let made = tree;
  for (let depth = path.length - 1; depth >= 0; depth--) {
    const entries: Map<string, Entry> = new Map([[path[depth]!, { keyAt: nowhere, tree: made }]]);
    made = { kind: 'branch', at: nowhere, path: path.slice(0, depth), entries };
  }
  return made as Branch;
}

export function isNull(tree: Tree | undefined): boolean {
  return tree?.kind === 'leaf' && tree.value === null;
}

/** The subtree at a path of keys and list indices; undefined when there is none. */
export function subtree(tree: Tree | undefined, path: readonly string[]): Tree | undefined {
  let here = tree;
  for (const step of path) {
    if (here?.kind === 'branch') here = here.entries.get(step)?.tree;
    else if (here?.kind === 'list') here = here.items[Number(step)];
    else return undefined;
  }
  return here;
}

/** Where a path stands: the value; with `atKey` its key; for a path that leads nowhere, the last key on the way that exists. */
export function placeOf(tree: Tree, path: readonly string[], atKey = false): { at: Place; path: readonly string[] } {
  let here = tree;
  let keyAt = tree.at;
  for (const [depth, step] of path.entries()) {
    const next = here.kind === 'branch' ? here.entries.get(step) : listEntry(here, step);
    if (!next) return { at: keyAt, path: [...here.path, ...path.slice(depth)] };
    keyAt = next.keyAt;
    here = next.tree;
  }
  return { at: atKey ? keyAt : here.at, path: here.path };
}

function listEntry(tree: Tree, step: string): Entry | undefined {
  const item = tree.kind === 'list' ? tree.items[Number(step)] : undefined;
  return item && { keyAt: item.at, tree: item };
}

/**
 * Plain objects, arrays and scalars, as the schema wants them. A number comes as its text, so that what was typed survives.
 * Objects have no prototype: `__proto__` is a key like others.
 */
export function plain(tree: Tree): unknown {
  if (tree.kind === 'leaf') return typeof tree.value === 'number' ? numberText(tree.value, tree.text) : tree.value;
  if (tree.kind === 'list') return tree.items.map(plain);
  const object: Record<string, unknown> = Object.create(null);
  for (const [key, entry] of tree.entries) object[key] = plain(entry.tree);
  return object;
}

/** As typed where every reader of YAML takes it for the same decimal number, else (`0x1F`, `017`) as its value. */
export function numberText(value: number, text: string): string {
  if (!Number.isFinite(value)) return text;
  return /^[-+]?(0|[1-9]\d*)(\.\d*)?([eE][-+]?\d+)?$/.test(text) ? text : String(value);
}

/** The branch without the entry at `path`. */
export function without(tree: Branch, path: readonly string[]): Branch {
  const [key, ...rest] = path;
  const entries = new Map(tree.entries);
  const entry = key === undefined ? undefined : entries.get(key);
  if (key === undefined || !entry) return tree;
  if (!rest.length) entries.delete(key);
  else if (entry.tree.kind === 'branch') entries.set(key, { ...entry, tree: without(entry.tree, rest) });
  return { ...tree, entries };
}
