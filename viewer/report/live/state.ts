/** What a reader has moved: which number of which case, and what was kept beside the cases of the file. Pure. */
import type { EditedCase } from '../../../sim/scenario/edited.ts';
import { axisNames, plainReading, type Reading } from '../../figures/reading.ts';

export interface Change {
  readonly caseName: string;
  /** Dotted key. */
  readonly key: string;
  /** As it would stand in a scenario: `0.5`, `12 m`. */
  readonly text: string;
}

export interface LiveState {
  readonly changes: readonly Change[];
  readonly kept: readonly EditedCase[];
}

export const unmoved: LiveState = { changes: [], kept: [] };

/** A number of some cases at a new value. */
export function moved(state: LiveState, caseNames: readonly string[], key: string, text: string): LiveState {
  const others = state.changes.filter((one) => one.key !== key || !caseNames.includes(one.caseName));
  return { ...state, changes: [...others, ...caseNames.map((caseName) => ({ caseName, key, text }))] };
}

/** Some cases as the file has them: in one key, or in all. */
export function reset(state: LiveState, caseNames: readonly string[], key: string | null = null): LiveState {
  const changes = state.changes.filter((one) => !caseNames.includes(one.caseName) || (key !== null && one.key !== key));
  return { ...state, changes };
}

export function editsOf(state: LiveState, caseName: string): EditedCase['edits'] {
  return state.changes.filter((one) => one.caseName === caseName).map(({ key, text }) => ({ key, text }));
}

/** The case as it now stands, kept beside the others under a name that is not yet taken; the case itself goes back. */
export function kept(state: LiveState, caseName: string, name: string, taken: readonly string[]): LiveState {
  const names = new Set([...taken, ...state.kept.map((one) => one.name)]);
  let free = name;
  for (let count = 2; names.has(free); count++) free = `${name} (${count})`;
  const one = { name: free, from: caseName, edits: editsOf(state, caseName) };
  return { ...reset(state, [caseName]), kept: [...state.kept, one] };
}

export function dropped(state: LiveState, name: string): LiveState {
  return { ...state, kept: state.kept.filter((one) => one.name !== name) };
}

/** Every case as it now stands, those of the file first. */
export function presentCases(state: LiveState, names: readonly string[]): EditedCase[] {
  return [...names.map((name) => ({ name, from: name, edits: editsOf(state, name) })), ...state.kept];
}

/**
 * The state as the part of a link behind `#`, and back: `0.orbit.eccentricity=0.5` for the first case of the file,
 * `kept0=2.name` for a kept case that starts from the third, `kept0.orbit.eccentricity=0.5` for what it changes.
 */
export function toHash(state: LiveState, names: readonly string[]): string {
  const entries = new URLSearchParams();
  for (const { caseName, key, text } of state.changes) entries.append(`${names.indexOf(caseName)}.${key}`, text);
  for (const [i, { name, from, edits }] of state.kept.entries()) {
    entries.append(`kept${i}`, `${names.indexOf(from)}.${name}`);
    for (const { key, text } of edits) entries.append(`kept${i}.${key}`, text);
  }
  return entries.toString();
}

/** How figures are read, as more of the same link: only what is not plain. */
export function readingToHash({ axis, unit, against }: Reading): string {
  const entries = new URLSearchParams();
  if (axis !== plainReading.axis) entries.append('by', axis);
  if (unit !== plainReading.unit) entries.append('in', unit);
  if (against !== null) entries.append('from', against);
  return entries.toString();
}

export function readingFromHash(hash: string, names: readonly string[]): Reading {
  const entries = new URLSearchParams(hash.replace(/^#/, ''));
  const against = entries.get('from');
  return {
    axis: axisNames.find((name) => name === entries.get('by')) ?? plainReading.axis,
    unit: entries.get('in') === 'degC' ? 'degC' : 'K',
    against: against !== null && names.includes(against) ? against : null,
  };
}

/** What of a link can be understood; `isKnown` tells keys of a case. */
export function fromHash(
  hash: string,
  names: readonly string[],
  isKnown: (caseName: string, key: string) => boolean,
): LiveState {
  const entries = [...new URLSearchParams(hash.replace(/^#/, ''))];
  const changes = entries.flatMap(([name, text]): Change[] => {
    const [, index, key] = /^(\d+)\.(.+)$/.exec(name) ?? [];
    const caseName = names[Number(index)];
    return caseName !== undefined && isKnown(caseName, key!) ? [{ caseName, key: key!, text }] : [];
  });
  const keptCases = entries.flatMap(([id, value]): EditedCase[] => {
    const [, index, name] = (/^kept\d+$/.test(id) && /^(\d+)\.(.+)$/su.exec(value)) || [];
    const from = names[Number(index)];
    if (from === undefined || name === undefined || names.includes(name)) return [];
    const edits = entries
      .filter(([other]) => other.startsWith(`${id}.`))
      .map(([other, text]) => ({ key: other.slice(id.length + 1), text }))
      .filter(({ key }) => isKnown(from, key));
    return [{ name, from, edits }];
  });
  const byPlace = new Map(changes.map((one) => [JSON.stringify([one.caseName, one.key]), one]));
  const byName = new Map(keptCases.map((one) => [one.name, one]));
  return { changes: [...byPlace.values()], kept: [...byName.values()] };
}
