/** Files of samples: CSV and Parquet read to the last bit, and what is wrong with one told by file, row and column. */
import { mkdirSync, readFileSync } from 'node:fs';
import { gzipSync } from 'node:zlib';
import { parquetWriteBuffer } from 'hyparquet-writer';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { csvRecords } from '../../cli/csvRecords.ts';
import { readSamples, samplesFrom } from '../../cli/posteriorFile.ts';
import { readScenarioFile } from '../../cli/scenarioFile.ts';
import { secondsPerDay } from '../../sim/constants.ts';
import type { Posterior } from '../../sim/scenario/posterior.ts';
import { type Workplace, workplace, zonalText } from './support.ts';

let here: Workplace;
beforeAll(() => {
  here = workplace();
});
afterAll(() => here.remove());

const posterior: Posterior = {
  file: 'chain.csv',
  columns: [
    { column: 'ecc', key: 'orbit.eccentricity', unit: '1' },
    { column: 'P [d]', key: 'orbit.period', unit: 'd' },
  ],
  weights: null,
};
const read = (given: Posterior = posterior) => readSamples(given, 'p.yaml', here.folder);
const csv = (text: string, weights: string | null = null) => {
  here.write('chain.csv', text);
  return read({ ...posterior, weights });
};
async function messageOf(work: () => Promise<unknown>): Promise<string> {
  try {
    await work();
  } catch (error) {
    return (error as Error).message;
  }
  return 'nothing was refused';
}

describe('csvRecords', () => {
  // RFC 4180, section 2, rules 1 to 7.
  test.each([
    [
      'aaa,bbb,ccc\r\nzzz,yyy,xxx\r\n',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      'aaa,bbb,ccc\r\nzzz,yyy,xxx',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      '"aaa","bbb","ccc"\r\nzzz,yyy,xxx',
      [
        ['aaa', 'bbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    [
      '"aaa","b\r\nbb","ccc"\r\nzzz,yyy,xxx',
      [
        ['aaa', 'b\r\nbb', 'ccc'],
        ['zzz', 'yyy', 'xxx'],
      ],
    ],
    ['"aaa","b""bb","ccc"', [['aaa', 'b"bb', 'ccc']]],
    ['"a,b",\n', [['a,b', '']]],
  ])('%j', (text, records) => {
    expect([...csvRecords(text, 'x.csv')].map(({ fields }) => fields)).toEqual(records);
  });

  test('lines count comments, empty lines and lines within quotes', () => {
    const text = '\ufeff# made by hand\nx\n\n"a\nb"\n#c\ny\n';
    expect([...csvRecords(text, 'x.csv')].map(({ line }) => line)).toEqual([2, 4, 7]);
  });

  test('quotes that go wrong', () => {
    expect(() => [...csvRecords('a\n"b', 'x.csv')]).toThrow('x.csv:2: a quote is opened and never closed. Close it.');
    expect(() => [...csvRecords('"a"b', 'x.csv')]).toThrow('x.csv:1: something stands behind a closing quote');
  });
});

describe('CSV', () => {
  test('columns by name, in SI, whatever stands beside them', async () => {
    const samples = await csv('# chain\nlnL,"P [d]", ecc\n-3,130.25,0.61\n-4, 129.5 ,6.3e-1\r\n');
    expect(samples.count).toBe(2);
    expect(samples.values.get('orbit.eccentricity')).toEqual(Float64Array.of(0.61, 0.63));
    expect(samples.values.get('orbit.period')).toEqual(Float64Array.of(130.25 * secondsPerDay, 129.5 * secondsPerDay));
    expect(samples.weights).toBeNull();
    expect(samples.sha256).toMatch(/^[0-9a-f]{64}$/);
  });

  test('weights', async () => {
    expect((await csv('ecc,P [d],w\n0.1,1,0\n0.2,1,2.5\n', 'w')).weights).toEqual(Float64Array.of(0, 2.5));
  });

  test('a hundred thousand samples come back to the last bit', async () => {
    const made = Array.from({ length: 100_000 }, (_, i) => [Math.abs(Math.sin(i)) * 0.99, 100 + Math.cos(i)]);
    const samples = await csv(`ecc,P [d]\n${made.map((row) => row.join()).join('\n')}\n`);
    expect(samples.values.get('orbit.eccentricity')).toEqual(Float64Array.from(made, ([e]) => e!));
  });

  test.each([
    ['', null, 'chain.csv: the file is empty. Write a header and one sample a row.'],
    ['ecc,P [d]\n', null, 'chain.csv: there are no samples in it. Write one sample a row.'],
    ['ecc,P\n0.1,2\n', null, 'chain.csv: there is no column `P [d]`. Its columns are ecc, P.'],
    ['eccc,P [d]\n0.1,2\n', null, 'chain.csv: there is no column `ecc`. Did you mean `eccc`?'],
    [
      '0.1,2\n0.2,3\n',
      null,
      'chain.csv:1: the first row holds numbers. Write the names of the columns above them, without #.',
    ],
    ['ecc\tP [d]\n0.1\t2\n', null, 'chain.csv:1: the columns are separated by tabs. Separate them by commas.'],
    ['ecc;P [d]\n0.1;2\n', null, 'chain.csv:1: the columns are separated by semicolons. Separate them by commas.'],
    [
      'ecc,P [d],ecc\n0.1,2,0.1\n',
      null,
      'chain.csv:1: two columns are called `ecc`. Give each column a name of its own.',
    ],
    [
      'ecc,P [d]\n0.1,2\n# c\n0.2\n',
      null,
      'chain.csv:4: the row has 1 field and the header 2 fields. Give each column its value.',
    ],
    [
      'ecc,P [d]\n0.1,2\n0.2,two\n',
      null,
      'chain.csv:3: P [d]: `two` is not a number. Write a number such as 0.62 or 1.3e7, or leave the row out.',
    ],
    [
      'ecc,P [d]\n,2\n',
      null,
      'chain.csv:2: ecc: nothing is given. Write a number such as 0.62 or 1.3e7, or leave the row out.',
    ],
    [
      'ecc,P [d]\n0.1,2\nnan,2\n',
      null,
      'chain.csv:3: ecc: NaN is no finite number. Leave the row out, or correct the number.',
    ],
    [
      'ecc,P [d]\n0.1,-inf\n',
      null,
      'chain.csv:2: P [d]: -Infinity is no finite number. Leave the row out, or correct the number.',
    ],
    [
      'ecc,P [d]\n0.1,2\n# c\n1.2,2\n',
      null,
      'chain.csv:4: ecc: `1.2` is out of bounds of orbit.eccentricity. Keep it at least 0 and at most 0.9999, or leave the row out.',
    ],
    [
      'ecc,P [d]\n0.1,2\n0.1,-3.5\n0.2,0\n',
      null,
      'chain.csv:3: P [d]: `-3.5 d` is out of bounds of orbit.period (as are 2 of 3 samples). Keep it above 0 d, or leave the row out.',
    ],
    [
      'ecc,P [d],w\n0.1,1,1\n0.2,1,-1\n',
      'w',
      'chain.csv:3: w: the weight -1 is negative. A weight is zero or more, and not its logarithm.',
    ],
    [
      'ecc,P [d],w\n0.1,1,0\n0.2,1,0\n',
      'w',
      'chain.csv: w: all weights are zero. Name another column, or delete `weights`.',
    ],
  ])('refuses %j', async (text, weights, message) => {
    expect(await messageOf(() => csv(text, weights))).toBe(message);
  });

  test('no such file, a folder, no text', async () => {
    expect(await messageOf(() => read({ ...posterior, file: 'none.csv' }))).toBe(
      'none.csv: there is no such file. Check the path.',
    );
    mkdirSync(here.path('chains'), { recursive: true });
    expect(await messageOf(() => read({ ...posterior, file: 'chains' }))).toBe(
      'chains: this is a folder, not a file of samples. Check the path.',
    );
    here.write('chain.csv', Uint8Array.of(0xff, 0xfe, 0x41));
    expect(await messageOf(() => read())).toBe(
      'chain.csv: this is not UTF-8 text. Write the samples as CSV in UTF-8, or as Parquet.',
    );
  });
});

describe('Parquet', () => {
  const eccentricities = Array.from({ length: 2500 }, (_, i) => Math.abs(Math.sin(i)) * 0.99);
  const periods = eccentricities.map((e) => 100 + e);
  const parquet = (
    columns: { name: string; data: unknown[]; type?: 'DOUBLE' | 'INT64' | 'FLOAT' | 'STRING' }[],
    gzip = false,
  ) => {
    const options = gzip
      ? { codec: 'GZIP' as const, compressors: { GZIP: (bytes: Uint8Array) => new Uint8Array(gzipSync(bytes)) } }
      : {};
    here.write(
      'chain.csv',
      new Uint8Array(parquetWriteBuffer({ columnData: columns, rowGroupSize: 1000, ...options })),
    );
    return read({ ...posterior, weights: columns.some(({ name }) => name === 'w') ? 'w' : null });
  };
  const both = [
    { name: 'P [d]', data: periods, type: 'DOUBLE' as const },
    { name: 'ecc', data: eccentricities, type: 'DOUBLE' as const },
  ];

  test.each([false, true])('columns by name over row groups, to the last bit (gzip %s)', async (gzip) => {
    const weights = { name: 'w', data: eccentricities.map((_, i) => BigInt(i)), type: 'INT64' as const };
    const samples = await parquet(
      [{ name: 'note', data: eccentricities.map(String), type: 'STRING' }, ...both, weights],
      gzip,
    );
    expect(samples.count).toBe(2500);
    expect(samples.values.get('orbit.eccentricity')).toEqual(Float64Array.from(eccentricities));
    expect(samples.values.get('orbit.period')).toEqual(Float64Array.from(periods, (days) => days * secondsPerDay));
    expect(samples.weights?.[2499]).toBe(2499);
  });

  test('what is refused', async () => {
    const [period, ecc] = both;
    expect(await messageOf(() => parquet([period!]))).toBe(
      'chain.csv: there is no column `ecc`. Its columns are P [d].',
    );
    const holes = { ...ecc!, data: eccentricities.map((e, i) => (i === 1200 ? null : e)) };
    expect(await messageOf(() => parquet([period!, holes]))).toBe(
      'chain.csv: row 1201: ecc: nothing is given. Give numbers, or leave the row out.',
    );
    const words = { name: 'ecc', data: eccentricities.map(String), type: 'STRING' as const };
    expect(await messageOf(() => parquet([period!, words]))).toBe(
      'chain.csv: row 1: ecc: string stands where a number should. Give numbers, or leave the row out.',
    );
    const infinite = { ...ecc!, data: eccentricities.map((e, i) => (i === 3 ? Number.NaN : e)) };
    expect(await messageOf(() => parquet([period!, infinite]))).toBe(
      'chain.csv: row 4: ecc: NaN is no finite number. Leave the row out, or correct the number.',
    );
    here.write('chain.csv', 'PAR1 and nothing behind');
    expect(await messageOf(() => read())).toMatch(/^chain.csv: the Parquet file cannot be read \(.*\). Write it again/);
  });
});

test('the output folder of a run finds the samples again', async () => {
  mkdirSync(here.path('in'), { recursive: true });
  here.write('in/chain one.csv', 'ecc\n0.6\n0.61\n');
  here.write(
    'in/p.yaml',
    `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
posterior: { file: chain one.csv, columns: { ecc: orbit.eccentricity } }
`,
  );
  const { code } = await here.perilag('run', 'in/p.yaml', '-o', 'results/deep', '--quiet');
  expect(code).toBe(0);
  const again = readScenarioFile('results/deep/scenario.yaml', here.folder);
  expect(again.scenario.posterior?.file).toBe('../../in/chain one.csv');
  const samples = await readSamples(again.scenario.posterior!, again.file, here.folder);
  expect(samples.values.get('orbit.eccentricity')).toEqual(Float64Array.of(0.6, 0.61));
  expect(samplesFrom(here.path('in'), again, here.folder)).toBe('chain one.csv');
});

test('the scenario inside fields.nc names the samples from where it lies', async () => {
  mkdirSync(here.path('in'), { recursive: true });
  here.write(
    'in/z.yaml',
    `${zonalText}posterior: { file: chain.csv, columns: { tilt: { key: planet.obliquity, unit: deg } } }\n`,
  );
  const { code } = await here.perilag('run', 'in/z.yaml', '-o', 'results/deep', '--quiet');
  expect(code).toBe(0);
  // An attribute of text lies in the file as it is.
  expect(readFileSync(here.path('results/deep/fields.nc')).includes('file: ../../in/chain.csv')).toBe(true);
});
