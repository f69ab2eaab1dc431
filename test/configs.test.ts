/** The examples in configs/: each reads, teaches in its first lines, and gives the same numbers when written out. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { runCase } from '../sim/run.ts';
import { readScenario } from '../sim/scenario/read.ts';
import type { Scenario } from '../sim/scenario/types.ts';

const folder = new URL('../configs/', import.meta.url);
const names = readdirSync(folder).filter((name) => name.endsWith('.yaml'));
const textOf = (name: string) => readFileSync(new URL(name, folder), 'utf8');

test('there are at least six, among them the one that npm start runs', () => {
  expect(names.length).toBeGreaterThanOrEqual(6);
  expect(names).toContain('three-inertias.yaml');
});

describe.each(names)('%s', (name) => {
  const text = textOf(name);
  const scenario = readScenario(text, name);

  test('is headed by the schema and by what it teaches', () => {
    const [schema, teaches] = text.split('\n');
    expect(schema).toBe('# yaml-language-server: $schema=./scenario.schema.json');
    expect(teaches).toMatch(/^# Teaches: \S/);
  });

  test('has a title, and uses all that it writes', () => {
    expect(scenario.title).toMatch(/\S/);
    const idle = scenario.cases.flatMap(({ inputs }) =>
      inputs.filter(({ used, isDefault }) => !used && !isDefault).map(({ key }) => key),
    );
    // What a run does not need but a reader of the example wants to see.
    const forReaders = [
      'orbit.argumentOfPeriapsis',
      'orbit.inclination',
      'orbit.scaledSemiMajorAxis', // a second way to the axis, held against the first
      'planet.radius',
      'star.temperature',
    ];
    expect([...new Set(idle)].filter((key) => !forReaders.includes(key))).toEqual([]);
  });

  test('is understood as written: the same cases with the same numbers', () => {
    const numbers = ({ cases }: Scenario) =>
      cases.map(({ name: of, world, options, windows }) => JSON.stringify({ of, world, options, windows }));
    expect(numbers(readScenario(scenario.asUnderstood, name))).toEqual(numbers(scenario));
  });

  test('runs within its tolerance, and both accounts are kept', () => {
    for (const item of scenario.cases) {
      const { passed, checks, states } = runCase(item);
      expect(
        passed,
        `${item.name}: ${JSON.stringify({ checks, errors: states.map((state) => state.errorEstimate) })}`,
      ).toBe(true);
    }
  });

  // Solved at 1e-10 both accounts must close to 1e-9; years by latitude have a test of their own with fewer bands.
  const lumped = scenario.cases.filter(({ model }) => model === 'lumped');
  if (lumped.length > 0) {
    test('solved at 1e-10, the accounts close to 1e-9', () => {
      for (const item of lumped) {
        const { checks } = runCase({ ...item, options: { ...item.options, tolerance: 1e-10 } });
        expect(checks.energyBalance.relativeDifference, item.name).toBeLessThan(1e-9);
        expect(checks.orbitMeanInstellation.relativeDifference, item.name).toBeLessThan(1e-12);
      }
    });
  }

  test('has no window that cannot be had', () => {
    expect(scenario.cases.flatMap(({ windows }) => windows.filter(({ unavailable }) => unavailable))).toEqual([]);
  });
});
