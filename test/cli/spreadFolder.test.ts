/** What lies in the folder of a spread beside what it made, what it tells of inputs that it does not draw, and parts that do not fit. */
import {
  copyFileSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmdirSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { type Workplace, workplace } from './support.ts';

const rockText = `title: Corvane b, a rock that answers at once
star: { luminosity: 0.5 to 1.5 Lsun, mass: 0.85 Msun, radius: 0.9 ± 0.05 Rsun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.3 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: { heatCapacity: 1e4 J/m2/K } }
`;

let place: Workplace;
beforeEach(() => {
  place = workplace();
  place.write('rock.yaml', rockText);
});
afterEach(() => place.remove());

const draws = ['--draws', '16', '--workers', '1'];
const spread = (out: string, ...words: string[]) => place.perilag('spread', 'rock.yaml', '-o', out, ...draws, ...words);
const summary = (folder: string) => JSON.parse(readFileSync(place.path(folder, 'summary.json'), 'utf8'));

describe('a folder with tables of an earlier spread', () => {
  test('loses those that this one did not make, and that is said', async () => {
    await spread('out');
    const { code, stderr } = await spread('out', '--no-indices', '--seed', '2', '--quiet');
    expect(code).toBe(0);
    expect(stderr).toBe('removed from out, as of an earlier spread with other settings: indices.parquet\n');
    expect(readdirSync(place.path('out')).filter((name) => name.startsWith('indices'))).toEqual([]);
  });

  test('keeps those of the same settings, and files of the same name that are not ours', async () => {
    await spread('out');
    const indices = readFileSync(place.path('out', 'indices.parquet'));
    expect((await spread('out', '--no-indices', '--quiet')).stderr).toBe('');
    expect(readFileSync(place.path('out', 'indices.parquet')).equals(indices)).toBe(true);
    writeFileSync(place.path('out', 'indices.parquet'), 'somebody’s own');
    expect((await spread('out', '--no-indices', '--seed', '2', '--quiet')).stderr).toBe('');
    expect(readFileSync(place.path('out', 'indices.parquet'), 'utf8')).toBe('somebody’s own');
  });

  test('rows of other settings go, with a word; those of the same can be gone on with, and stay', async () => {
    const leave = (from: string, to: string) => {
      mkdirSync(place.path(to, 'indices.work'), { recursive: true });
      for (const name of readdirSync(place.path(from, 'indices.work')))
        copyFileSync(place.path(from, 'indices.work', name), place.path(to, 'indices.work', name));
    };
    await spread('part', '--shard', '1/1');
    leave('part', 'other');
    const other = await spread('other', '--no-indices', '--seed', '2', '--quiet');
    expect(other.stderr).toBe('removed from other, as of an earlier spread with other settings: indices.work\n');
    expect(existsSync(place.path('other', 'indices.work'))).toBe(false);
    leave('part', 'same');
    const same = await spread('same', '--no-indices', '--quiet');
    expect(same.stderr).toBe('indices.work in same: rows of this spread, to go on with by --resume\n');
    expect(existsSync(place.path('same', 'indices.work'))).toBe(true);
  });
});

describe('a run that does not come to its end', () => {
  const bytes = (folder: string, name: string) => readFileSync(place.path(folder, name), 'latin1');
  const tables = ['draws.parquet', 'bands.parquet', 'indices.parquet', 'summary.json'];

  test('leaves all of the earlier one in its place, and goes on to the bytes of a run at one go', async () => {
    await spread('out');
    const before = tables.map((name) => bytes('out', name));
    rmSync(place.path('out', 'report.html'));
    mkdirSync(place.path('out', 'report.html'));
    const { code, stderr } = await spread('out', '--seed', '2');
    expect(code).toBe(2);
    expect(stderr).toContain('a folder stands where this file should go');
    expect(tables.map((name) => bytes('out', name))).toEqual(before);
    rmdirSync(place.path('out', 'report.html'));
    expect((await spread('out', '--seed', '2', '--resume')).code).toBe(0);
    await spread('fresh', '--seed', '2');
    expect(tables.map((name) => bytes('out', name))).toEqual(tables.map((name) => bytes('fresh', name)));
    expect(readdirSync(place.path('out')).sort()).toEqual(readdirSync(place.path('fresh')).sort());
  });

  test('parts that cannot all be joined leave nothing', async () => {
    for (const part of ['1', '2']) await spread(`p${part}`, '--shard', `${part}/2`);
    await spread('out');
    const before = tables.map((name) => bytes('out', name));
    const work = place.path('p2', 'draws.work');
    const rows = readdirSync(work).find((name) => name.startsWith('rows-'))!;
    writeFileSync(`${work}/${rows}`, readFileSync(`${work}/${rows}`).subarray(0, 40));
    for (const out of ['out', 'new']) expect((await place.perilag('gather', 'p1', 'p2', '-o', out)).code).toBe(2);
    expect(tables.map((name) => bytes('out', name))).toEqual(before);
    expect(readdirSync(place.path('out')).filter((name) => name.endsWith('.work'))).toEqual([]);
    expect(existsSync(place.path('new'))).toBe(false);
  });
});

test('an uncertain input that moves no finding is not drawn, and that is said', async () => {
  const { stdout } = await spread('out', '--no-indices');
  expect(stdout).toContain('not drawn star.radius: model lumped does not use it here');
  const [{ idle, inputs }] = summary('out').spread.cases;
  expect(idle).toEqual([{ key: 'star.radius', label: 'Star radius', reason: 'model lumped does not use it here' }]);
  expect(Object.keys(inputs)).toEqual(['star.luminosity', 'planet.bondAlbedo']);
});

test('a posterior that no chosen case draws from changes nothing: indices, and its file is not asked for', async () => {
  const text = rockText.replace('0.1 to 0.5', '0.3');
  const cases = `cases: { sampled: {}, own: { planet: { bondAlbedo: 0.1 to 0.5 } } }
posterior: { file: chain.csv, columns: { A: planet.bondAlbedo } }
`;
  place.write('rock.yaml', `${text}${cases}`);
  const own = await spread('own', '--only', 'own', '--quiet');
  expect(own).toEqual({ code: 0, stdout: '', stderr: '' });
  expect(summary('own').spread).toMatchObject({ sampling: 'sobol', indexRows: 16 });
  expect(existsSync(place.path('own', 'indices.parquet'))).toBe(true);
  const both = await spread('both', '--quiet');
  expect(both.code).toBe(2);
  expect(both.stderr).toContain('chain.csv');
  for (const part of ['1/2', '2/2']) await spread(`part${part[0]}`, '--only', 'own', '--shard', part);
  const gathered = await place.perilag('gather', 'part1', 'part2', '-o', 'whole', '--quiet');
  expect(gathered).toEqual({ code: 0, stdout: '', stderr: '' });
  expect(
    readFileSync(place.path('whole', 'summary.json')).equals(readFileSync(place.path('own', 'summary.json'))),
  ).toBe(true);
});

test('gather refuses parts of which some have indices and others have none, whichever is first', async () => {
  await spread('with', '--shard', '1/2');
  await spread('without', '--shard', '2/2', '--no-indices');
  for (const parts of [
    ['with', 'without'],
    ['without', 'with'],
  ]) {
    const { code, stderr } = await place.perilag('gather', ...parts, '-o', 'whole');
    expect(code).toBe(2);
    expect(stderr).toContain('with holds rows of indices, without holds none: they are parts of different runs.');
    expect(stderr).toContain('all of them with --no-indices or none');
  }
  expect(existsSync(place.path('whole'))).toBe(false);
});

test('gather looks for tables of a spread only; a folder without its manifest is the input’s fault', async () => {
  await spread('part', '--shard', '1/1');
  mkdirSync(place.path('part', 'notes.work'));
  expect((await place.perilag('gather', 'part', '-o', 'whole', '--quiet')).code).toBe(0);
  rmSync(place.path('part', 'draws.work', 'manifest.json'));
  const { code, stderr } = await place.perilag('gather', 'part', '-o', 'other');
  expect(code).toBe(2);
  expect(stderr).toContain('draws.work: manifest.json is missing');
  expect(existsSync(place.path('other'))).toBe(false);
});

test('a shard answers --json with where it is', async () => {
  const { stdout } = await spread('part', '--shard', '1/2', '--json', '--quiet');
  expect(JSON.parse(stdout)).toEqual({
    shard: { index: 1, count: 2 },
    folder: 'part',
    tables: ['draws', 'bands', 'indices'],
  });
});

test('a later table that would be refused is refused before the first is computed', async () => {
  await spread('part', '--shard', '1/1');
  mkdirSync(place.path('out', 'indices.work'), { recursive: true });
  for (const name of readdirSync(place.path('part', 'indices.work')))
    copyFileSync(place.path('part', 'indices.work', name), place.path('out', 'indices.work', name));
  const { code, stderr } = await spread('out', '--seed', '2');
  expect(code).toBe(2);
  expect(stderr).toContain('indices.work: ');
  expect(readdirSync(place.path('out'))).toEqual(['indices.work']);
});
