/** A scenario whose numbers are moved: each move is what the file would say, and runs to the same numbers. */
import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { openSession } from '../../../sim/live/session.ts';
import { formatQuantity } from '../../../sim/quantity/index.ts';
import { runCase } from '../../../sim/run.ts';
import type { Dial } from '../../../sim/scenario/dial.ts';
import { dialsOf } from '../../../sim/scenario/dials.ts';
import { editedTree } from '../../../sim/scenario/edited.ts';
import { fromPortableTree, toPortableTree } from '../../../sim/scenario/portableTree.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { readTree } from '../../../sim/scenario/readTree.ts';
import type { CaseInput } from '../../../sim/scenario/types.ts';

const configs = new URL('../../../configs/', import.meta.url);
const files = readdirSync(configs).filter((name) => name.endsWith('.yaml'));
const textOf = (file: string) => readFileSync(new URL(file, configs), 'utf8');
const scenarios = files.map((file) => ({ file, scenario: readScenario(textOf(file), file) }));

/** A third of the way along the dial. */
function movedText({ low, high, log, unit }: Dial): string {
  return formatQuantity(log ? low * (high / low) ** (1 / 3) : low + (high - low) / 3, unit, 4);
}

/** A default that is written out is none any more, and stands at another place. */
function sorted(inputs: readonly CaseInput[]): Omit<CaseInput, 'isDefault'>[] {
  return inputs.map(({ isDefault: _, ...input }) => input).toSorted((a, b) => a.key.localeCompare(b.key));
}

describe.each(scenarios)('$file', ({ file, scenario }) => {
  test('as JSON and back, it is the same scenario', () => {
    const tree = fromPortableTree(JSON.parse(JSON.stringify(toPortableTree(scenario.tree))));
    const again = readTree(tree, file).scenario;
    expect(again.asUnderstood).toBe(scenario.asUnderstood);
    expect(again.cases.map(({ inputs }) => inputs)).toEqual(scenario.cases.map(({ inputs }) => inputs));
  });

  test('each dial holds the value of its case within its range', () => {
    for (const one of scenario.cases) {
      const dials = dialsOf(one);
      expect(dials.length).toBeGreaterThan(4);
      for (const { value, low, high, log, label } of dials) {
        expect(value, label).toBeGreaterThanOrEqual(low);
        expect(value, label).toBeLessThanOrEqual(high);
        if (log) expect(low, label).toBeGreaterThan(0);
      }
    }
  });

  test('a moved number is what the file says that is written, and nothing else has changed', () => {
    const session = openSession(scenario.tree, file);
    let sound = 0;
    for (const { name, inputs } of scenario.cases) {
      const { dials } = session.dials.find((one) => one.name === name)!;
      for (const dial of dials) {
        const cases = [{ name: 'moved', from: name, edits: [{ key: dial.key, text: movedText(dial) }] }];
        let written: string;
        try {
          written = session.write(cases);
        } catch (error) {
          expect(error).toBeInstanceOf(SimError); // three numbers that must agree: not every one can be moved alone
          continue;
        }
        sound++;
        const [again] = readScenario(written, 'written.yaml').cases;
        const [moved] = readTree(editedTree(scenario.tree, cases), file).scenario.cases;
        expect(sorted(again!.inputs)).toEqual(sorted(moved!.inputs));
        for (const { key, text } of again!.inputs) {
          const before = inputs.find((input) => input.key === key);
          expect(text, key).toBe(key === dial.key ? cases[0]!.edits[0]!.text : before?.text);
        }
      }
    }
    expect(sound).toBeGreaterThan(3);
  });
});

const three = scenarios.find(({ file }) => file === 'three-inertias.yaml')!;

describe('run', () => {
  test('gives the numbers of the written file to the last bit', () => {
    const session = openSession(three.scenario.tree, three.file);
    const cases = [
      { name: 'rock', from: 'rock', edits: [{ key: 'orbit.eccentricity', text: '0.31' }] },
      { name: 'shallow', from: 'ocean', edits: [{ key: 'planet.heatStore.mixedLayer', text: '3 m' }] },
    ];
    const run = session.run(cases);
    const again = readScenario(session.write(cases), 'written.yaml').cases.map(runCase);
    expect(run.map(({ name }) => name)).toEqual(['rock', 'shallow']);
    expect(run.map(({ findings, states }) => ({ findings, states }))).toEqual(
      again.map(({ findings, states }) => ({ findings, states })),
    );
    expect(run[0]!.findings).not.toEqual(runCase(three.scenario.cases[0]!).findings);
  });

  test('one store of a list changes, the others stay', () => {
    const text = textOf('three-inertias.yaml').replace(
      'ocean: { planet: { heatStore: { mixedLayer: 60 m } } }',
      'ocean: { planet: { heatStore: [{ mixedLayer: 60 m }, { heatCapacity: 1e7 J/m2/K }] } }',
    );
    const { tree } = readScenario(text, 'x.yaml');
    const session = openSession(tree, 'x.yaml');
    const key = 'planet.heatStore.1.heatCapacity';
    const [shown] = session.run([{ name: 'ocean', from: 'ocean', edits: [{ key, text: '2e7 J/m2/K' }] }]);
    const value = (wanted: string) => shown!.inputs.find((input) => input.key === wanted)?.value;
    expect(value('planet.heatStore.0.mixedLayer')).toBe(60);
    expect(value(key)).toBe(2e7);
  });

  test('what is no planet is refused in the words of the command line, without a place in a file', () => {
    const session = openSession(three.scenario.tree, three.file);
    const attempt = (text: string) => () =>
      session.run([{ name: 'rock', from: 'rock', edits: [{ key: 'orbit.eccentricity', text }] }]);
    expect(attempt('1.2')).toThrow(/^orbit\.eccentricity: /);
    const bad = textOf('three-inertias.yaml').replace('eccentricity: 0.6', 'eccentricity: 1.2');
    const message = (work: () => unknown): string => {
      try {
        work();
      } catch (error) {
        return (error as Error).message.split('\n')[0]!;
      }
      return '';
    };
    expect(message(() => readScenario(bad, 'x.yaml'))).toBe(`x.yaml:16:17: ${message(attempt('1.2'))}`);
  });
});
