/** One declaration feeds validation, labels and the JSON Schema that editors use. */
import { readdirSync, readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { parse } from 'yaml';
import * as z from 'zod';
import { schemaText } from '../../../cli/commands/schema.ts';
import { parseQuantity } from '../../../sim/quantity/index.ts';
import { readDocument } from '../../../sim/scenario/document.ts';
import { scenarioJsonSchema } from '../../../sim/scenario/schema/json.ts';
import { quantity } from '../../../sim/scenario/schema/leaf.ts';
import { aboutKey, isKnownKey, keysIn, labelOf } from '../../../sim/scenario/schema/lookup.ts';
import { validateCase, validateHead } from '../../../sim/scenario/validate.ts';
import { rich } from './mutate.ts';
import { sound } from './sound.ts';

const configs = new URL('../../../configs/', import.meta.url);
const editorSchema = z.fromJSONSchema(scenarioJsonSchema() as Parameters<typeof z.fromJSONSchema>[0]);
const accepts = (text: string) => editorSchema.safeParse(parse(text)).success;

test('the committed schema is what the command prints', () => {
  expect(readFileSync(new URL('scenario.schema.json', configs), 'utf8')).toBe(schemaText());
});

test('every example and the contract in small pass the JSON Schema', () => {
  const examples = readdirSync(configs).filter((name) => name.endsWith('.yaml'));
  expect(examples.length).toBeGreaterThanOrEqual(6);
  for (const name of examples) expect(accepts(readFileSync(new URL(name, configs), 'utf8')), name).toBe(true);
  expect(accepts(sound)).toBe(true);
  expect(accepts(rich)).toBe(true);
});

test.each([
  ['an unknown key', 'plannet: {}'],
  ['a key in the wrong section', 'star: { bondAlbedo: 0.3 }'],
  ['a section where a value belongs', 'orbit: { eccentricity: { mean: 0.1 } }'],
  ['a model that is not built', 'model: column'],
  ['a limit that is not published', 'windows: { hz: { habitable: [venus, mars] } }'],
  ['an unknown key in a case', 'cases: { wet: { planet: { bondAlbdo: 0.1 } } }'],
  ['a null outside cases', 'planet: { mass: null }'],
  ['no case', 'cases: {}'],
  ['a length without its unit', 'orbit: { semiMajorAxis: 0.48 }'],
  ['a length without its unit, as text', "orbit: { semiMajorAxis: '0.48' }"],
  ['a range without a unit', 'planet: { heatStore: { mixedLayer: 20 to 30 } }'],
  ['a date as a bare number', 'orbit: { periapsisTime: 2461103.71 }'],
  ['two forms in one heat store', 'planet: { heatStore: { mixedLayer: 20 m, heatCapacity: 4e7 J/m2/K } }'],
  ['an empty heat store', 'planet: { heatStore: {} }'],
  ['two emission laws', 'planet: { emission: { opticalDepth: 1, linear: { a: 203.3 W/m2, b: 2.09 W/m2/K } } }'],
])('the JSON Schema refuses %s', (_, text) => {
  expect(accepts(text)).toBe(false);
});

test('a pure number may be a number or text; a quantity says its units', () => {
  expect(accepts('orbit: { eccentricity: 0.62 }')).toBe(true);
  expect(accepts('orbit: { eccentricity: 0.62 ± 0.03 }')).toBe(true);
  expect(
    accepts('planet: { absorbingFraction: 1/4, heatStore: [{ mixedLayer: 20 m }, { heatCapacity: 4e7 J/m2/K }] }'),
  ).toBe(true);
  const { properties } = scenarioJsonSchema() as { properties: Record<string, { properties: Record<string, object> }> };
  expect(properties.star!.properties.mass).toMatchObject({
    type: 'string',
    description: expect.stringMatching(/Units: Mearth, Msun, kg/),
  });
});

test('in a case, one form of heat store may remove another', () => {
  expect(accepts('cases: { wet: { planet: { heatStore: { mixedLayer: 20 m, heatCapacity: null } } } }')).toBe(true);
});

test('in cases, parts of a section and nulls are welcome', () => {
  expect(
    accepts(
      'cases: { wet: { planet: { mass: null, albedo: { ice: 0.5 }, heatStore: { ground: { cycle: orbit } } } } }',
    ),
  ).toBe(true);
});

/** Every key that a scenario may hold, down to the leaves. */
function everyKey(path: readonly string[] = []): (readonly string[])[] {
  return keysIn(path).flatMap((key) => [[...path, key], ...everyKey([...path, key])]);
}

test('every key has a label, a description and an example', () => {
  const keys = everyKey().filter((path) => path.length > 1 || ['model', 'title', 'notes'].includes(path[0]!));
  expect(keys.length).toBeGreaterThan(50);
  for (const path of keys) {
    const about = aboutKey(path);
    expect(about?.title, path.join('.')).toMatch(/^\S.*\S$/);
    expect(about?.description, path.join('.')).toMatch(/\S/);
    expect(about?.examples.length, path.join('.')).toBeGreaterThan(0);
  }
});

test('labels of keys, of items of lists, and of keys that none declares', () => {
  expect(labelOf(['orbit', 'semiMajorAxis'])).toBe('Semi-major axis');
  expect(labelOf(['planet', 'heatStore', '0', 'mixedLayer'])).toBe('Mixed layer depth');
  expect(labelOf(['planet', 'heatStore', 'ground', 'thermalInertia'])).toBe('Thermal inertia');
  expect(labelOf(['planet', 'nothing'])).toBe('nothing');
  expect(isKnownKey(['planet', 'constructor'])).toBe(false);
});

test('a quantity goes in as text or number, and comes out as typed', () => {
  const about = { title: 'Depth', description: 'Of the sea', examples: ['20 m'] };
  const depth = quantity({ dimension: 'length', positive: true }, about);
  const read = z.decode(depth, '20 ± 3 m');
  expect(read).toEqual(parseQuantity('20 ± 3 m', { dimension: 'length' }));
  expect(z.encode(depth, read)).toBe('20 ± 3 m');
  const refused = depth.safeParse('20');
  expect(refused.error?.issues[0]).toMatchObject({
    message: '`20` has no unit',
    params: { mend: 'Write e.g. `20 m`' },
  });
});

test('every example that the schema gives is read at its key', () => {
  for (const path of everyKey().filter(([section]) => !['title', 'notes', '$schema'].includes(section!))) {
    for (const example of aboutKey(path)?.examples ?? []) {
      const text = path.reduceRight((inner, key) => `{ ${key}: ${inner} }`, String(example));
      const { root, problems } = readDocument(text, 'p.yaml');
      const validate = path[0] === 'posterior' ? validateHead : validateCase;
      const faults = root ? validate(root).faults.filter(({ isMissing }) => !isMissing) : [];
      expect([...problems, ...faults], text).toEqual([]);
    }
  }
});
