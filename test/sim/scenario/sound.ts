/** A scenario without fault, small enough to see through, and ways to spoil it. */
import { ScenarioError } from '../../../sim/scenario/problem.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import type { ScenarioCase } from '../../../sim/scenario/types.ts';

export const sound = `title: Test
star:
  luminosity: 0.52 Lsun
  mass: 0.85 Msun
orbit:
  semiMajorAxis: 0.48 au
  eccentricity: 0.62
planet:
  bondAlbedo: 0.3
  heatStore: { mixedLayer: 20 m }
`;

/** The sound scenario with pieces of its text replaced; a piece that is not there is a mistake of the test. */
export function edited(...edits: readonly (readonly [old: string, replacement: string])[]): string {
  return edits.reduce((text, [old, replacement]) => {
    if (!text.includes(old)) throw new Error(`not in the sound scenario: ${old}`);
    return text.replace(old, () => replacement);
  }, sound);
}

/** What reading says, one message a line; empty when it reads. */
export function complaints(text: string): string[] {
  try {
    readScenario(text, 'p.yaml');
    return [];
  } catch (error) {
    if (!(error instanceof ScenarioError)) throw error;
    return error.message.split('\n');
  }
}

/** The only case of a scenario. */
export function onlyCase(text: string): ScenarioCase {
  const { cases } = readScenario(text, 'p.yaml');
  if (cases.length !== 1) throw new Error(`${cases.length} cases`);
  return cases[0]!;
}
