/** Cases that are one and the same over what varies, which replaces what sets them apart: computed once, under all their names. */
import type { World } from '../world.ts';
import { fingerprint } from './influence.ts';

/** In the order of their firsts; `print` says all that a case's results depend on. */
export function alike<T extends { readonly print: string }>(all: readonly T[]): T[][] {
  const groups = new Map<string, T[]>();
  for (const one of all) groups.set(one.print, [...(groups.get(one.print) ?? []), one]);
  return [...groups.values()];
}

/** The name that the cases bear together: `rock = thick air`. */
export function togetherName(cases: readonly { readonly name: string }[]): string {
  return cases.map(({ name }) => name).join(' = ');
}

/** A case as the scenario has it. */
interface Standing {
  readonly name: string;
  readonly model: string;
  readonly world: World;
}

/** Why the cases are computed once; empty for one alone. `over`: `along this input, which replaces`. `done`: `followed`. */
export function alikeNotes(cases: readonly Standing[], over: string, done: string): string[] {
  if (cases.length < 2) return [];
  const listed = cases.map(({ name }) => `“${name}”`).join(', ');
  const prints = new Set(cases.map(({ model, world }) => model + fingerprint(world)));
  const why = prints.size > 1 ? `${over} what sets them apart` : 'in all that a climate depends on';
  return [`The cases ${listed} are the same ${why}: they were ${done} once.`];
}
