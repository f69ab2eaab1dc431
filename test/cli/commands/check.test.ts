/** `check`: what the scenario says, what follows from it, what a run would do. */
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { check, describeScenario } from '../../../cli/commands/check.ts';
import { newScenario, starterScenario } from '../../../cli/commands/new.ts';
import { schema, schemaText } from '../../../cli/commands/schema.ts';
import type { Io } from '../../../cli/io.ts';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { textWidth } from '../../../cli/output/text.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { edited, sound } from '../../sim/scenario/sound.ts';
import { undisturbed } from '../support.ts';

const folder = mkdtempSync(join(tmpdir(), 'perilag-check-'));
afterAll(() => rmSync(folder, { recursive: true }));

function testIo(): Io & { out: () => string; err: () => string } {
  const written = { out: '', err: '' };
  return {
    stdout: { write: (text) => (written.out += text) },
    stderr: { write: (text) => (written.err += text) },
    isTTY: false,
    ...undisturbed,
    columns: 100,
    env: { LANG: 'C.UTF-8' },
    cwd: folder,
    now: () => 0,
    reportTemplate: '',
    out: () => written.out,
    err: () => written.err,
  };
}

const page = (columns: number, env: Record<string, string> = { LANG: 'C.UTF-8' }) =>
  terminalOf({ columns, env, isTTY: false });
const describeText = (text: string, columns = 100) => describeScenario(readScenario(text, 'p.yaml'), page(columns));

const eventful = `${edited(
  ['  mass', '  temperature: 5100 K\n  radius: 0.924 Rsun\n  mass'],
  ['eccentricity: 0.62', 'eccentricity: 0.62 ± 0.03\n  periapsisTime: 2026-03-04T05:00Z'],
  ['  bondAlbedo', '  obliquity: 23 deg\n  bondAlbedo'],
)}cases:
  sea: {}
  rock: { planet: { heatStore: { ground: { thermalInertia: 2200 tiu, cycle: orbit } } } }
windows:
  liquid water: 273.15 K to 373.15 K
`;

describe('describeScenario', () => {
  test('says all of it', () => {
    expect(describeText(eventful)).toBe(`Test
p.yaml: 2 cases: sea, rock

What run would do
  model lumped: find the periodic states to a relative tolerance of 1e-6, 720 rows an orbit in equal
  steps of the balanced anomaly
  share of time in liquid water

Inputs
  star.luminosity                           0.52 Lsun
  star.temperature                          5100 K
  star.radius                               0.924 Rsun
  star.mass                                 0.85 Msun
  orbit.semiMajorAxis                       0.48 au
  orbit.eccentricity                        0.62 ± 0.03      run uses 0.62
  orbit.periapsisTime                       2026-03-04T05:00Z
  planet.obliquity                          23 deg
  planet.bondAlbedo                         0.3
  planet.emissivity                         1                default
  planet.absorbingFraction                  0.25             default
  planet.internalHeat                       0 W/m2           default
  windows.liquid water                      273.15 K to 373.15 K
  model                                     lumped           default
  solve.tolerance                           1e-6             default
  solve.start                               periodic         default
  solve.samples                             720              default
  solve.spacing                             balancedAnomaly  default
  sea
    planet.heatStore.mixedLayer             20 m
  rock
    planet.heatStore.ground.thermalInertia  2200 tiu
    planet.heatStore.ground.cycle           orbit

What follows from them
  Orbital period                             131.75 d
  Distance at periapsis                      0.1824 au
  Distance at apoapsis                       0.7776 au
  Instellation at distance a                 3072.1 W/m2 = 2.2572 S0
  Orbit-mean instellation                    3915.5 W/m2 = 2.8769 S0
  Instellation at periapsis                  21275 W/m2 = 15.632 S0
  Instellation at apoapsis                   1170.6 W/m2 = 0.86009 S0
  Periapsis                                  2026-03-04T05:00:00Z = 2461103.70913 TDB
  Textbook equilibrium temperature           312.04 K
  sea
    Heat capacity                            8.1795e7 J/m2/K
  rock
    Linear damping of the half-space itself  0.87081
    Linear damping of the lumped ground      0.99037
    Linear lag of the half-space itself      2.5592 d
    Linear lag of the lumped ground          2.9127 d
    Heat capacity                            2.0939e6 J/m2/K

Unused
  star.temperature, star.radius, planet.obliquity

Remarks
  Luminosity: luminosity 0.52 Lsun is used; 0.52038 Lsun (from temperature 5100 K and radius 0.924
  Rsun) is 0.073 % off.

Notes
  Spreads of inputs are not propagated by run: every input is used at its centre; perilag spread
  samples them.`);
  });

  test.each([40, 60, 80, 120])('fits %i columns', (columns) => {
    for (const line of describeText(eventful, columns).split('\n'))
      expect(textWidth(line)).toBeLessThanOrEqual(columns);
  });

  test('in a narrow page long texts and their remarks keep their column', () => {
    const said = describeText(
      edited(
        ['0.85 Msun', '0.85 +0.02 -0.03 Msun'],
        ['{ mixedLayer: 20 m }', '{ heatCapacity: 1e5 to 1e9 J/m2/K log }'],
      ),
      72,
    ).split('\n');
    const at = said.findIndex((line) => line.includes('0.85 +0.02 -0.03 Msun'));
    expect(said[at + 1]!.trim()).toBe('run uses 0.85 Msun');
    expect(said[at + 1]!.indexOf('run')).toBe(said[at]!.indexOf('0.85'));
    const defaults = said.filter((line) => line.endsWith('  default')).map((line) => line.indexOf('  default'));
    expect(defaults.length).toBeGreaterThan(5);
    expect(new Set(defaults).size).toBe(1);
    expect(said.filter((line) => line.includes('run uses 1e7 J/m2/K'))).toHaveLength(1);
  });

  test('plain letters for terminals without Unicode, and nothing that steers a terminal', () => {
    const text = edited(['title: Test', 'title: "Zoë\\e[31m ±"']);
    const said = describeScenario(readScenario(text, 'p.yaml'), page(80, { LANG: 'C' }));
    expect(said).toMatch(/^Zoe\?\[31m \+\/-\n/);
    expect(said).toMatch(/^[\n -~]*$/);
  });

  test('a forward run, windows that cannot be had, spacing in time', () => {
    const said = describeText(
      `${sound}windows: { hz: { habitable: [runawayGreenhouse, maximumGreenhouse] } }
solve: { start: { temperature: 250 K, orbits: 20 }, spacing: time }
`,
      200,
    );
    expect(said).toContain(
      'run 20 orbits forward from 250 K to a relative tolerance of 1e-6, 720 rows an orbit in equal steps of time',
    );
    expect(said).toContain(
      'hz (not available: the habitable limits depend on the temperature of the star, which is not given)',
    );
  });
});

test('check reads files and explains each', async () => {
  writeFileSync(join(folder, 'a.yaml'), sound);
  writeFileSync(join(folder, 'b.yaml'), edited(['Test', 'Other']));
  const io = testIo();
  expect(await check(['a.yaml', 'b.yaml'], io)).toBe(0);
  expect(io.out()).toMatch(/^Test\na\.yaml: 1 case: base\n[\s\S]*\nOther\nb\.yaml: 1 case: base\n/);
  await expect(check(['none.yaml'], testIo())).rejects.toThrow(/none\.yaml: there is no such file/);
});

describe('new', () => {
  test('writes a starter that reads without warning, and leaves an existing file alone', async () => {
    const io = testIo();
    expect(await newScenario(undefined, io)).toBe(0);
    const written = readFileSync(join(folder, 'scenario.yaml'), 'utf8');
    expect(written).toBe(starterScenario());
    expect(io.err()).toBe('wrote scenario.yaml; now: perilag run scenario.yaml\n');
    await expect(newScenario('scenario.yaml', testIo())).rejects.toThrow(
      'scenario.yaml: the file is there already. Name another file, or remove it first.',
    );
    expect(readFileSync(join(folder, 'scenario.yaml'), 'utf8')).toBe(written);
  });

  test('a JSON file is refused: it could not hold the comments', async () => {
    await expect(newScenario('mine.json', testIo())).rejects.toThrow(
      'mine.json: the starter explains itself in comments, which JSON has not. Name it mine.yaml: run reads both.',
    );
    expect(existsSync(join(folder, 'mine.json'))).toBe(false);
  });

  test('the starter writes nothing that stays unused', () => {
    expect(describeText(starterScenario())).not.toContain('Unused');
  });

  test('a folder that is not there', async () => {
    await expect(newScenario('deep/er/x.yaml', testIo())).rejects.toThrow(/there is no such folder/);
  });

  test('the starter has two cases and no warning', () => {
    const { cases } = readScenario(starterScenario(), 'scenario.yaml');
    expect(cases.map(({ name }) => name)).toEqual(['ocean', 'rock']);
    expect(cases.flatMap(({ warnings }) => warnings)).toEqual([]);
  });
});

test('schema prints one JSON document', () => {
  const io = testIo();
  expect(schema(io)).toBe(0);
  expect(io.out()).toBe(schemaText());
  expect(JSON.parse(io.out())).toMatchObject({ $schema: 'http://json-schema.org/draft-07/schema#', type: 'object' });
});
