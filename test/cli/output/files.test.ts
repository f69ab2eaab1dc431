import { expect, test } from 'vitest';
import { csvField } from '../../../cli/output/csv.ts';
import { jsonText } from '../../../cli/output/json.ts';
import { embeddedJson } from '../../../cli/output/report.ts';
import { seriesText } from '../../../cli/output/series.ts';
import { summaryText } from '../../../cli/output/summary.ts';
import { fromPortable } from '../../../sim/dataset/portable.ts';
import { fixtureResult } from '../fixture.ts';

/** A plain reader of RFC 4180, apart from the writer. */
function parseCsv(text: string): string[][] {
  const records: string[][] = [[]];
  for (const [, quoted, plain, end] of text.matchAll(/(?:"((?:[^"]|"")*)"|([^",\n]*))(,|\n|$)/g)) {
    records.at(-1)!.push(quoted === undefined ? plain! : quoted.replaceAll('""', '"'));
    if (end === '\n') records.push([]);
    if (end === '') break;
  }
  return records.slice(0, -1);
}

const header =
  'case,state,time_s,weight,mean_anomaly_deg,true_anomaly_deg,distance_au,instellation_W_m2,absorbed_W_m2,emitted_W_m2,temperature_K,steady_temperature_K';
const awkward = 'rock, "bare"\nand dry';

test('series.csv: the columns of the contract, a row for each instant of each state, numbers that read back exactly', () => {
  const states = [
    { label: 'warm', stable: true, offset: 0 },
    { label: 'cold', stable: true, offset: -50 },
  ];
  const result = fixtureResult([
    { name: awkward, samples: 50, lagOrbits: 0.1, states },
    { name: 'sea', samples: 30 },
  ]);
  const [head, ...rows] = parseCsv(seriesText(result));
  expect(head!.join(',')).toBe(header);
  expect(rows).toHaveLength(50 + 50 + 30);
  expect(new Set(rows.map(([name, state]) => `${name}|${state}`))).toEqual(
    new Set([`${awkward}|warm`, `${awkward}|cold`, 'sea|only']),
  );
  const { temperature, distance, trueAnomaly } = result.cases[0]!.states[1]!.dataset.variables;
  const row = rows[50 + 7]!;
  expect(Number(row[10])).toBe(temperature!.data[7]);
  expect(Number(row[6]) * 149_597_870_700).toBeCloseTo(distance!.data[7]!, 1);
  expect((Number(row[5]) * Math.PI) / 180).toBeCloseTo(trueAnomaly!.data[7]!, 14);
  const weights = rows.slice(0, 50).map((fields) => Number(fields[3]));
  expect(weights.reduce((sum, weight) => sum + weight)).toBeCloseTo(1, 12);
});

test('series.csv: a number that is not finite is never written', () => {
  const result = fixtureResult([{ name: 'a' }]);
  result.cases[0]!.states[0]!.dataset.variables.temperature!.data[3] = Number.NaN;
  expect(() => seriesText(result)).toThrow('temperature_K: NaN is not a result');
});

test('CSV fields are quoted where they must be', () => {
  expect(['plain', 'a,b', 'say "so"', 'two\nlines', ''].map(csvField)).toEqual([
    'plain',
    '"a,b"',
    '"say ""so"""',
    '"two\nlines"',
    '',
  ]);
});

test('summary.json: the shape of the contract', () => {
  const result = fixtureResult([{ name: 'bare rock', lagOrbits: null, warnings: ['careful'] }]);
  const summary = JSON.parse(summaryText(result));
  expect(Object.keys(summary)).toEqual(['program', 'scenario', 'cases', 'notes']);
  expect(summary.program).toEqual({ name: 'perilag', version: '9.8.7' });
  expect(summary.scenario).toEqual({
    title: 'Corvane b under three ground assumptions',
    file: 'corvane.yaml',
    sha256: 'ab'.repeat(32),
  });
  const [item] = summary.cases;
  expect(item).toMatchObject({ name: 'bare rock', model: 'lumped', warnings: ['careful'] });
  expect(item.inputs['orbit.eccentricity']).toMatchObject({ value: 0.62, unit: '1' });
  expect(item.inputs['planet.rotationPeriod']).toMatchObject({ value: null, text: 'synchronous', used: false });
  expect(item.inputs['planet.emissivity']).toMatchObject({ value: 1, isDefault: true });
  expect(item.findings.equilibriumTemperature).toEqual({ value: 288.1437, unit: 'K', label: 'equilibriumTemperature' });
  expect(item.findings.lagOfMax).toEqual({
    value: null,
    unit: 's',
    label: 'Lag of maximum',
    reason: 'the lag’s own error exceeds 0.02 orbit',
  });
  expect(item.states).toHaveLength(1);
  expect(item.states[0]).toMatchObject({ label: 'only', stable: true, multiplier: 0.41, stabilityMargin: 0.9 });
  expect(item.states[0].findings).toEqual(item.findings);
  expect(item.checks.orbitMeanInstellation).toEqual({
    computed: 1000,
    closedForm: 1000,
    relativeDifference: 3.1e-14,
    passed: true,
  });
  expect(item.checks.energyBalance).toEqual({ relativeDifference: 2.4e-11, passed: true });
});

test('jsonText reads back as what it was given and refuses what JSON has no word for', () => {
  const value = {
    a: [],
    b: {},
    c: [1, 2.5e-300, -0.1, 'x\ny"<'],
    d: { e: null, f: true },
    long: Array.from({ length: 60 }, (_, index) => index),
  };
  expect(JSON.parse(jsonText(value))).toEqual(value);
  expect(() => jsonText({ a: { b: Number.NaN } })).toThrow('summary.a.b: NaN is not a result');
});

test('the data of the report cannot end its script, and come back whole', () => {
  const result = fixtureResult([{ name: '</script><script>alert(1)</script><!--' }]);
  const text = embeddedJson({ result });
  expect(text).not.toContain('<');
  expect(fromPortable(JSON.parse(text))).toEqual({ result });
});
