/** Keys of a case that a spread, a grid or a trace leaves out, in words. */
import type { Replaced } from './merge.ts';
import type { Redundant } from './redundant.ts';

/** `orbit.semiMajorAxis is left out: it follows from orbit.period and star.mass.` */
export function redundantNote({ key, instead }: Redundant): string {
  return `${key} is left out: it follows from ${listed(instead)}.`;
}

/** `planet.heatStore.mixedLayer is left out: planet.heatStore.heatCapacity takes its place.` A sentence for all that give way to the same. */
export function replacedNotes(replaced: readonly Replaced[]): string[] {
  const groups = new Map<string, { keys: Set<string>; by: readonly string[] }>();
  for (const { key, by } of replaced) {
    const group = groups.get(by.join()) ?? { keys: new Set<string>(), by };
    groups.set(by.join(), { by, keys: group.keys.add(key) });
  }
  return [...groups.values()].map(({ keys, by }) => {
    const [verb, place] = keys.size > 1 ? ['are', 'their place'] : ['is', 'its place'];
    return `${listed([...keys])} ${verb} left out: ${listed(by)} ${by.length > 1 ? 'take' : 'takes'} ${place}.`;
  });
}

/** `a, b and c`. */
export function listed(words: readonly string[]): string {
  return words.length > 1 ? `${words.slice(0, -1).join(', ')} and ${words.at(-1)}` : (words[0] ?? '');
}
