/** `posterior` of a scenario: which columns of a file of samples stand for which of its keys. The file itself is read elsewhere. */
import { SimError } from '../error.ts';
import { checkBounds, dimensions, formatQuantity, parseUnit, sameDimension } from '../quantity/index.ts';
import { numberKeyFault } from './numberKey.ts';
import { aboutKey, numbersAt } from './schema/lookup.ts';
import type { PosteriorKeys } from './schema/posterior.ts';
import { shorten } from './syntax.ts';
import { type Branch, subtree, type Tree } from './tree.ts';
import type { Fault } from './validate.ts';

export interface Posterior {
  /** As it was typed: a path that counts from the folder of the scenario. */
  readonly file: string;
  /** In the order of the scenario. */
  readonly columns: readonly PosteriorColumn[];
  /** A column; null where all samples count the same. */
  readonly weights: string | null;
}

export interface PosteriorColumn {
  readonly column: string;
  /** Dotted key. */
  readonly key: string;
  /** In which the column stands; `1` for a pure number. */
  readonly unit: string;
}

const section = 'posterior';
const refusal = 'is a setting, a word, a date or a table, and no finding depends on samples of it';

/**
 * What the keys of a posterior say.
 * Shape:  sound keys and the tree of the scenario without its cases. Throws nothing: what is wrong stands in the faults.
 */
export function readPosterior(
  written: PosteriorKeys,
  base: Branch,
): { posterior: Posterior; faults: readonly Fault[] } {
  const faults: Fault[] = [];
  const fault = (path: readonly string[], what: string, mend: string, atKey = false) => {
    faults.push({ path: [section, ...path], atKey, what, mend });
  };
  const columns = Object.entries(written.columns).map(([column, value]): PosteriorColumn => {
    const [key, unit] = typeof value === 'string' ? [value, undefined] : [value.key, value.unit];
    return { column, key: key.trim(), unit: unit?.trim() ?? '1' };
  });
  if (written.file.trim() === '') fault(['file'], 'no file is named', 'Write e.g. chain.csv');
  if (columns.length === 0) fault(['columns'], 'no column is named', 'Write e.g. { ecc: orbit.eccentricity }', true);
  if (written.weights !== undefined) {
    const isTaken = columns.some(({ column }) => column === written.weights);
    if (written.weights.trim() === '')
      fault(['weights'], 'no column is named', 'Write e.g. weight, or delete the line');
    if (isTaken)
      fault(['weights'], `\`${shorten(written.weights)}\` stands among the columns, too`, 'Keep one of the two');
  }
  for (const [i, one] of columns.entries()) {
    const path = ['columns', one.column];
    const isShort = typeof written.columns[one.column] === 'string';
    const first = columns.findIndex(({ key }) => key === one.key);
    const found =
      keyFault(one, base) ??
      (first < i
        ? { what: `${one.key} is column \`${shorten(columns[first]!.column)}\` already`, mend: 'Keep one of them' }
        : null);
    if (found) fault(isShort ? path : [...path, 'key'], found.what, found.mend);
    else {
      const wrong = unitFault(one, isShort || (written.columns[one.column] as { unit?: string }).unit === undefined);
      if (wrong) fault(isShort ? path : [...path, ...(wrong.isMissing ? [] : ['unit'])], wrong.what, wrong.mend);
    }
  }
  return { posterior: { file: written.file.trim(), columns, weights: written.weights ?? null }, faults };
}

interface Words {
  readonly what: string;
  readonly mend: string;
}

function keyFault({ key }: PosteriorColumn, base: Branch): Words | null {
  const path = key.split('.');
  const isItem = path.some((step) => /^\d+$/.test(step)); // `planet.heatStore.0.mixedLayer`: a form of a list
  const wanted = { isNumber: (at: readonly string[]) => numbersAt(at) !== null, refusal, sample: 'orbit.eccentricity' };
  const fault = isItem && wanted.isNumber(path) ? null : numberKeyFault(path, wanted);
  if (fault) return fault;
  if (isCentre(subtree(base, path))) return null;
  const what = `the scenario gives no ${key} of its own`;
  const example = aboutKey(path)?.examples[0];
  return {
    what,
    mend: `Write one beside the samples, such as their median${example === undefined ? '' : `, e.g. ${example}`}: run uses it`,
  };
}

/** A number, certain or not, rather than a word for something else (`synchronous`). */
function isCentre(tree: Tree | undefined): boolean {
  return (
    tree?.kind === 'leaf' &&
    tree.value !== null &&
    (tree.text.trim() === 'isotropic' || !/^[A-Za-z]/.test(tree.text.trim()))
  );
}

function unitFault(
  { column, key, unit }: PosteriorColumn,
  isMissing: boolean,
): (Words & { isMissing: boolean }) | null {
  const { dimension } = numbersAt(key.split('.'))!;
  const { phrase, units, exponents } = dimensions[dimension];
  const example = `{ key: ${key}, unit: ${units[0]} }`;
  if (isMissing) {
    if (dimension === 'number') return null;
    return {
      what: `${key} is ${phrase}, and nothing says in which unit the column stands`,
      mend: `Write ${shorten(column)}: ${example}`,
      isMissing,
    };
  }
  try {
    if (sameDimension(parseUnit(unit, dimension).dimension, exponents)) return null;
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    return { what: error.what, mend: error.mend, isMissing };
  }
  const mend = dimension === 'number' ? 'Leave the unit out' : `Write e.g. ${units[0]}`;
  return { what: `\`${shorten(unit)}\` is no unit of ${phrase}`, mend, isMissing };
}

/** What is wrong with a sample (SI), and how its key would have it; null where it is taken. */
export function sampleFault({ key, unit }: PosteriorColumn, si: number): Words | null {
  const path = key.split('.');
  const { cut } = aboutKey(path) ?? {};
  const { below: _, ...openAbove } = numbersAt(path)!;
  const taken = cut?.high === undefined ? numbersAt(path)! : { ...openAbove, max: cut.high };
  try {
    checkBounds(si, parseUnit(unit), `\`${formatQuantity(si, unit, 15)}\``, taken);
    return null;
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    return { what: `${error.what} of ${key}`, mend: `${error.mend}, or leave the row out` };
  }
}

/** How the columns of a posterior stand in one case. */
export interface CaseColumns {
  /** Key → column. */
  readonly ruling: ReadonlyMap<string, PosteriorColumn>;
  readonly notes: readonly string[];
}

/** A case that gives a key itself, or replaces it by another way to say it, keeps its own. */
export function columnsOf(posterior: Posterior | null, tree: Branch): CaseColumns {
  const ruling = new Map<string, PosteriorColumn>();
  const notes: string[] = [];
  for (const one of posterior?.columns ?? []) {
    const found = subtree(tree, one.key.split('.'));
    const isOwn = found === undefined || found.path[0] === 'cases' || !isCentre(found);
    if (isOwn) notes.push(`Column ${one.column} is not used here: the case gives ${one.key} in its own way.`);
    else ruling.set(one.key, one);
  }
  return { ruling, notes };
}

/** Said where samples and a spread stand for the same key. */
export function rulesNote({ column }: PosteriorColumn, key: string, text: string): string {
  return `${key} is drawn from column ${column} of the posterior, not from ${text}.`;
}
