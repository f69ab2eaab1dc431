/** `scenario.yaml`: every default shown, the user's own text kept, the same numbers when it is read again. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { parse } from 'yaml';
import { readDocument } from '../../../sim/scenario/document.ts';
import { yamlLines } from '../../../sim/scenario/emit.ts';
import { readScenario } from '../../../sim/scenario/read.ts';
import { type Branch, plain } from '../../../sim/scenario/tree.ts';
import { rich } from './mutate.ts';
import { edited, sound } from './sound.ts';

const understood = (text: string) => readScenario(text, 'p.yaml').asUnderstood;

test('the sound scenario, with its defaults', () => {
  expect(understood(sound)).toBe(`# The scenario as understood: every default shown. Running it gives the same numbers.
title: Test
star:
  luminosity: 0.52 Lsun
  mass: 0.85 Msun
orbit:
  semiMajorAxis: 0.48 au
  eccentricity: 0.62
planet:
  bondAlbedo: 0.3
  heatStore:
    mixedLayer: 20 m
  emissivity: 1 # default
  absorbingFraction: 0.25 # default
  internalHeat: 0 W/m2 # default
model: lumped # default
solve:
  tolerance: 1e-6 # default
  start: periodic # default
  samples: 720 # default
  spacing: balancedAnomaly # default
`);
});

test('the same inputs, worlds, options and windows when read again; nothing is a default any more', () => {
  const first = readScenario(rich, 'p.yaml');
  const again = readScenario(first.asUnderstood, 'p.yaml');
  const numbers = first.cases.map(({ name, model, world, options, windows, derived, warnings }) => {
    return JSON.stringify({ name, model, world, options, windows, derived, warnings });
  });
  expect(
    again.cases.map(({ name, model, world, options, windows, derived, warnings }) => {
      return JSON.stringify({ name, model, world, options, windows, derived, warnings });
    }),
  ).toEqual(numbers);
  for (const [index, { inputs }] of again.cases.entries()) {
    const byKey = (list: typeof inputs) =>
      list.map(({ isDefault: _, ...input }) => input).toSorted((a, b) => (a.key < b.key ? -1 : 1));
    expect(byKey(inputs)).toEqual(byKey(first.cases[index]!.inputs));
  }
  // A case that drops its emission law falls back on the default of emissivity: nothing else is open.
  const open = again.cases.flatMap(({ name, inputs }) =>
    inputs.filter(({ isDefault }) => isDefault).map(({ key }) => `${name}: ${key}`),
  );
  expect(open).toEqual(['thick air: planet.emissivity']);
});

test('a start in a case shows where it starts', () => {
  const text = understood(`${sound}cases:\n  pushed: { solve: { start: { temperature: 250 K, orbits: 2 } } }\n`);
  expect(text).toContain('        orbits: 2\n        at: 0 deg # default\n');
});

test("the user's number text is kept; what only YAML 1.2 reads as this number is written plainly", () => {
  const text = understood(
    edited(['0.3', '0.30'], ['eccentricity: 0.62', 'eccentricity: 0.620e0'], ['20 m', "'020 m'"]),
  );
  expect(text).toContain('bondAlbedo: 0.30\n');
  expect(text).toContain('eccentricity: 0.620e0\n');
  expect(text).toContain('mixedLayer: 020 m\n');
  expect(understood(`${sound}solve: { samples: 0x1F }\n`)).toContain('samples: 31\n');
  expect(understood(`${sound}solve: { samples: 0720 }\n`)).toContain('samples: 720\n');
});

const traps = [
  'yes',
  'No',
  'on',
  'off',
  'y',
  '3:2',
  '12:30:45',
  '1_000',
  '0o17',
  '017',
  '1e3',
  '.5',
  '-',
  '~',
  'null',
  '<<',
  '=',
  '2026-03-04',
  '2026-03-04T05:00:00Z',
  '0.1',
  '+1',
  '0x1f',
  '0b1',
  '.inf',
  '.NaN',
  '# no comment',
  'a: b',
  'a #b',
  ' lead',
  'trail ',
  "it's",
  '"quoted"',
  '',
  '&a',
  '*a',
  '!t',
  '%d',
  '@x',
  '`x',
  '[a]',
  '{a}',
  '- a',
  '? a',
  '| a',
  '> a',
  '\t',
  'tab\there',
  'line\nbreak',
  'line\n\nbreak\n',
  '\nlead',
  'two\n\n',
  'a\r\nb',
  '\u001b[31m',
  '\u202eevil',
  '\ud800',
  '😀',
  '\ufeff',
  '\u2028',
  'é',
  '-0.5 ± 0.1',
  '…',
];

test.each(traps.map((text) => [JSON.stringify(text), text]))('%s is the same text for every reader', (_, text) => {
  const at = { line: 1, column: 1 };
  const leaf = { kind: 'leaf', at, path: [], value: text, text, quoted: true } as const;
  const tree: Branch = {
    kind: 'branch',
    at,
    path: [],
    entries: new Map([
      ['notes', { keyAt: at, tree: leaf }],
      [text || 'empty', { keyAt: at, tree: leaf }],
    ]),
  };
  const yaml = `${yamlLines(tree).join('\n')}\n`;
  for (const version of ['1.1', '1.2'] as const) {
    expect(parse(yaml, { version, merge: false })).toEqual({ notes: text, [text || 'empty']: text });
  }
});

describe('any texts survive', () => {
  const text = fc.oneof(
    fc.string({ unit: 'grapheme', maxLength: 60 }),
    fc.string({ unit: 'binary', maxLength: 20 }),
    fc.string({ unit: fc.constantFrom('a', ' ', '\n', ':', '#', "'", '"', '-', '\\', '\t'), maxLength: 12 }),
  );

  test('title and notes', () => {
    fc.assert(
      fc.property(text, text, (title, notes) => {
        const given = JSON.stringify({ ...JSON.parse(json), title, notes });
        const first = readScenario(given, 'p.json');
        const again = readScenario(first.asUnderstood, 'p.yaml');
        expect([again.title, again.notes]).toEqual([title, notes]);
      }),
      { seed: 7, numRuns: 300 },
    );
  });

  const json = JSON.stringify(plain(readDocument(sound, 'p.yaml').root!));
});
