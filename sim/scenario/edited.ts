/**
 * A scenario with numbers changed by hand: each case with its own edits, and further cases beside them. What comes out is the
 * tree of a file that says all this, so that it reads, runs and is written like any other.
 */
import { SimError } from '../error.ts';
import { takeApart } from './cases.ts';
import { merge } from './merge.ts';
import { type Branch, branchAt, type Entry, type Leaf, nowhere, subtree, type Tree } from './tree.ts';

/** A key of a case and what shall stand there, as it would be typed: `0.5`, `12 m`. */
export interface Edit {
  /** Dotted, list items by index: `planet.heatStore.0.mixedLayer`. */
  readonly key: string;
  readonly text: string;
}

export interface EditedCase {
  readonly name: string;
  /** The case of the file that it starts from. */
  readonly from: string;
  readonly edits: readonly Edit[];
}

/**
 * The tree of a file with exactly these cases, in this order. An edit lies over its case as a case lies over the scenario:
 * alternatives replace one another whole; a list is replaced by itself with the one number changed.
 * Errors: SimError for a case or a list item that is not there. Whether the numbers are sound is found on reading.
 */
export function editedTree(root: Branch, cases: readonly EditedCase[]): Branch {
  const { base, cases: own } = takeApart(root);
  const patches = subtree(root, ['cases']);
  const entries = new Map<string, Entry>();
  for (const { name, from, edits } of cases) {
    if (!own.some((one) => one.name === from))
      throw new SimError('cases', `there is no case \`${from}\``, 'Name one of the file');
    const patch = subtree(patches, [from]) ?? { ...root, entries: new Map() };
    const tree = edits.reduce((edited, edit) => laidOver(edited, base, edit), patch as Branch);
    entries.set(name, { keyAt: root.at, tree });
  }
  const all = new Map([...root.entries].filter(([key]) => key !== 'cases'));
  all.set('cases', { keyAt: root.at, tree: { kind: 'branch', at: root.at, path: ['cases'], entries } });
  return { ...root, entries: all };
}

function laidOver(patch: Branch, base: Branch, { key, text }: Edit): Branch {
  const path = key.split('.');
  const whole = merge(base, patch);
  const listAt = path.findIndex((_, depth) => subtree(whole, path.slice(0, depth))?.kind === 'list');
  if (listAt < 0) return merge(patch, branchAt(path, leafOf(text, path)));
  const list = path.slice(0, listAt);
  return merge(patch, branchAt(list, withLeaf(subtree(whole, list)!, path.slice(listAt), leafOf(text, path), key)));
}

function withLeaf(tree: Tree, path: readonly string[], leaf: Leaf, key: string): Tree {
  const [step, ...rest] = path;
  if (step === undefined) return leaf;
  const below = subtree(tree, [step]);
  if (!below || tree.kind === 'leaf')
    throw new SimError(key, 'there is no such number in this case', 'Name one that it has');
  if (tree.kind === 'list') {
    return {
      ...tree,
      items: tree.items.map((item, i) => (String(i) === step ? withLeaf(item, rest, leaf, key) : item)),
    };
  }
  const entry = tree.entries.get(step)!;
  return { ...tree, entries: new Map([...tree.entries, [step, { ...entry, tree: withLeaf(below, rest, leaf, key) }]]) };
}

const bareNumber = /^[-+]?(0|[1-9]\d*)(\.\d*)?([eE][-+]?\d+)?$/;

/** A bare number is one in the file, too. */
function leafOf(text: string, path: readonly string[]): Leaf {
  const value = bareNumber.test(text) ? Number(text) : text;
  return { kind: 'leaf', at: nowhere, path, value, text, quoted: false };
}
