/** Every input of a case, defaults included, as tables show it. */
import { dimensions, type Instant, parseUnit, type Quantity } from '../quantity/index.ts';
import { labelOf } from './schema/lookup.ts';
import type { CaseKeys } from './schema/scenario.ts';
import type { Branch, Leaf, List, Tree } from './tree.ts';
import type { CaseInput } from './types.ts';

const exact = { form: 'exact' } as const;

/** In the order of the file; what the schema refused is left out. `used` holds keys or their heads. */
export function listInputs(tree: Branch, keys: CaseKeys, used: ReadonlySet<string>): CaseInput[] {
  return [...leaves(tree)].map(({ path, leaf }) => {
    const key = path.join('.');
    const read = reading(path.reduce(step, keys as unknown));
    return {
      key,
      ...read,
      text: leaf.text,
      isDefault: leaf.isDefault ?? false,
      used: key === 'model' || path.some((_, depth) => used.has(path.slice(0, depth + 1).join('.'))),
      label: inputLabel(path),
    };
  });
}

/** Land and frozen sea have stores of the same forms as the sea: said before the form, to tell them apart. */
const storeOwners: Readonly<Record<string, string>> = { landHeatStore: 'Land', frozenHeatStore: 'Frozen sea' };

function inputLabel(path: readonly string[]): string {
  if (path[0] === 'windows') return path.slice(1).join(', ');
  const owner = path[0] === 'planet' ? storeOwners[path[1] ?? ''] : undefined;
  const label = labelOf(path);
  return owner === undefined || path.length < 3 ? label : `${owner}: ${label[0]!.toLowerCase()}${label.slice(1)}`;
}

function* leaves(tree: Tree, path: readonly string[] = []): Generator<{ path: readonly string[]; leaf: Leaf }> {
  if (tree.kind === 'leaf') yield { path, leaf: tree };
  else if (tree.kind === 'branch')
    for (const [key, { tree: value }] of tree.entries) yield* leaves(value, [...path, key]);
  else if (tree.items.every((item) => item.kind === 'leaf')) yield { path, leaf: inOneLine(tree) };
  else for (const [index, item] of tree.items.entries()) yield* leaves(item, [...path, String(index)]);
}

/** A list of words reads best as one input. */
function inOneLine({ at, path, items }: List): Leaf {
  const text = `[${items.map((item) => (item.kind === 'leaf' ? item.text : '')).join(', ')}]`;
  return { kind: 'leaf', at, path, value: text, text, quoted: false };
}

function step(value: unknown, key: string): unknown {
  return typeof value === 'object' && value !== null ? (value as Record<string, unknown>)[key] : undefined;
}

type Reading = Pick<CaseInput, 'value' | 'unit' | 'since' | 'writtenUnit' | 'distribution'>;

function reading(parsed: unknown): Reading {
  if (typeof parsed === 'number') return { value: parsed, unit: '1', writtenUnit: '1', distribution: exact };
  if (isQuantity(parsed)) {
    const { value, unit, distribution } = parsed;
    return { value, unit: siUnit(unit), writtenUnit: unit, distribution };
  }
  if (isPeriod(parsed)) return reading(parsed.period);
  if (isInstant(parsed)) {
    const { tdbSeconds, distribution } = parsed;
    return { value: tdbSeconds, unit: 's', since: 'J2000.0 TDB', writtenUnit: 's', distribution };
  }
  return { value: null, unit: '', writtenUnit: '', distribution: exact };
}

function isQuantity(parsed: unknown): parsed is Quantity {
  return typeof parsed === 'object' && parsed !== null && 'unit' in parsed && 'distribution' in parsed;
}

function isInstant(parsed: unknown): parsed is Instant {
  return typeof parsed === 'object' && parsed !== null && 'tdbSeconds' in parsed;
}

function isPeriod(parsed: unknown): parsed is { period: Quantity } {
  return typeof parsed === 'object' && parsed !== null && 'period' in parsed;
}

/** The SI symbol of what a unit measures. */
export function siUnit(symbol: string): string {
  const { dimension } = parseUnit(symbol);
  const info = Object.values(dimensions).find(({ exponents }) => exponents.every((power, i) => power === dimension[i]));
  return info?.units.find((unit) => isSi(unit)) ?? '1';
}

function isSi(symbol: string): boolean {
  const { factor, divisor, offset } = parseUnit(symbol);
  return factor === 1 && divisor === 1 && offset === 0;
}
