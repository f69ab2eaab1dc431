/** The tree of a scenario file as JSON and back: for a page that changes its numbers and has no reader of YAML. Places are left behind. */
import { SimError } from '../error.ts';
import { type Branch, type Entry, type Leaf, nowhere, type Tree } from './tree.ts';

/** A list is an array; a leaf has its value and, where that differs from it, what was typed. */
export type PortableTree =
  | { readonly branch: readonly (readonly [key: string, PortableTree])[] }
  | { readonly value: Leaf['value']; readonly text?: string; readonly quoted?: true }
  | readonly PortableTree[];

export function toPortableTree(tree: Tree): PortableTree {
  if (tree.kind === 'list') return tree.items.map(toPortableTree);
  if (tree.kind === 'branch')
    return { branch: [...tree.entries].map(([key, entry]) => [key, toPortableTree(entry.tree)]) };
  const { value, text, quoted } = tree;
  return { value, ...(String(value) === text ? {} : { text }), ...(quoted ? { quoted } : {}) };
}

/** Errors: SimError for anything but what `toPortableTree` gave for the whole of a file. */
export function fromPortableTree(portable: unknown): Branch {
  const tree = restored(portable, []);
  if (tree?.kind !== 'branch') throw new SimError('scenario', 'no scenario is stored here', 'Make the file anew');
  return tree;
}

function restored(portable: unknown, path: readonly string[]): Tree | null {
  if (typeof portable !== 'object' || portable === null) return null;
  if (Array.isArray(portable)) {
    const items = portable.map((item, i) => restored(item, [...path, String(i)])).filter((item) => item !== null);
    return { kind: 'list', at: nowhere, path, items };
  }
  if ('branch' in portable && Array.isArray(portable.branch)) {
    const entries = new Map<string, Entry>();
    for (const [key, below] of portable.branch as [string, unknown][]) {
      const tree = restored(below, [...path, key]);
      if (tree !== null) entries.set(key, { keyAt: nowhere, tree });
    }
    return { kind: 'branch', at: nowhere, path, entries };
  }
  const { value = null, text = String(value ?? ''), quoted = false } = portable as Partial<Leaf>;
  return { kind: 'leaf', at: nowhere, path, value, text, quoted };
}
