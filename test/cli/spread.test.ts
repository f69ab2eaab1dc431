import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { fingerprintOf } from '../../cli/engine/job.ts';
import { readColumn } from './readColumn.ts';
import { type Workplace, workplace, zonalText } from './support.ts';

/** A fast world: its temperature is the steady one, T ∝ (L (1 − A))^¼, up to its small store. */
const quarterText = `title: Corvane b, a rock that answers at once
star: { luminosity: 0.5 to 1.5 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: { heatCapacity: 1e4 J/m2/K } }
`;

const twoCasesText = `title: Corvane b under two assumptions
star: { luminosity: 0.52 ± 0.02 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 ± 0.03 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: { mixedLayer: 5 m to 50 m log } }
cases:
  sea: {}
  rock: { planet: { heatStore: { heatCapacity: 1e6 J/m2/K } } }
`;

let place: Workplace;
beforeEach(() => {
  place = workplace();
  place.write('quarter.yaml', quarterText);
  place.write('two.yaml', twoCasesText);
});
afterEach(() => place.remove());

const bytes = (...names: string[]) => readFileSync(place.path(...names));
const summary = (folder: string) => JSON.parse(readFileSync(place.path(folder, 'summary.json'), 'utf8'));

async function spread(file: string, out: string, ...words: string[]) {
  const workers = words.includes('--workers') ? [] : ['--workers', '1']; // threads take their time to start from source
  const done = await place.perilag('spread', file, '-o', out, '--quiet', ...workers, ...words);
  expect(done.stderr).toBe('');
  expect(done.code).toBe(0);
}

test('T ∝ (1 − A)^¼ L^¼: percentiles as their closed form has them', async () => {
  await spread('quarter.yaml', 'out', '--draws', '16384', '--no-indices');
  const { findings } = summary('out').spread.cases[0];
  const { percentiles, mean } = findings.temperatureMean;
  // Stefan–Boltzmann with IAU nominal values; L (1 − A) is a product of two uniforms on [½, 3/2] and [½, 9/10].
  const at = (luminosity: number, albedo: number) =>
    ((luminosity * 3.828e26 * (1 - albedo)) / (16 * Math.PI * 5.670374419e-8 * (0.48 * 149_597_870_700) ** 2)) ** 0.25;
  const grid = 2000;
  const values = new Float64Array(grid * grid);
  for (let i = 0; i < grid; i++) {
    for (let j = 0; j < grid; j++) values[i * grid + j] = at(0.5 + (i + 0.5) / grid, 0.1 + (0.4 * (j + 0.5)) / grid);
  }
  values.sort();
  // 16384 Sobol' points: the share below a value is off by some 2e-4, of a density of about 1/60 per K
  for (const level of ['2.5', '16', '50', '84', '97.5']) {
    expect(Math.abs(percentiles[level] - values[Math.floor((values.length * Number(level)) / 100)]!)).toBeLessThan(0.1);
  }
  expect(Math.abs(mean - values.reduce((sum, value) => sum + value, 0) / values.length)).toBeLessThan(0.02);
});

test("indices of T ∝ L^¼ (1 − A)^¼ are those of the product's closed form", async () => {
  await spread('quarter.yaml', 'out', '--draws', '4096');
  const { first, total } = summary('out').spread.cases[0].importance.temperatureMean;
  // f = g(L) h(A): V = E g² E h² − (E g E h)²; first order of g: Var g (E h)² / V; total: Var g E h² / V.
  const moment = (low: number, high: number, power: number) =>
    (high ** (power + 1) - low ** (power + 1)) / ((power + 1) * (high - low));
  const [g1, g2, h1, h2] = [
    moment(0.5, 1.5, 0.25),
    moment(0.5, 1.5, 0.5),
    moment(0.5, 0.9, 0.25),
    moment(0.5, 0.9, 0.5),
  ];
  const variance = g2 * h2 - (g1 * h1) ** 2;
  const light = first['star.luminosity'];
  // within its own interval, which for Sobol' points is rather too wide
  const expected = ((g2 - g1 ** 2) * h1 ** 2) / variance;
  expect(light.percentiles['2.5']).toBeLessThan(expected);
  expect(light.percentiles['97.5']).toBeGreaterThan(expected);
  expect(Math.abs(light.value - expected)).toBeLessThan(0.01);
  expect(Math.abs(total['planet.bondAlbedo'].value - ((h2 - h1 ** 2) * g2) / variance)).toBeLessThan(0.01);
});

test('the mean flux of an uncertain eccentricity: E(1 − e²)^−½ is (asin b − asin a)/(b − a)', async () => {
  place.write(
    'unsure.yaml',
    quarterText.replace('eccentricity: 0 ', 'eccentricity: 0.1 to 0.8 ').replace('0.5 to 1.5 Lsun', '1 Lsun'),
  );
  await spread('unsure.yaml', 'out', '--draws', '4096', '--no-indices');
  const { mean, percentiles } = summary('out').spread.cases[0].findings.orbitMeanInstellation;
  const circular = 3.828e26 / (4 * Math.PI * (0.48 * 149_597_870_700) ** 2);
  // 4096 Sobol' points of one input: even to 1/4096, so that a smooth mean is off by less than 1e-5
  expect(Math.abs(mean / ((circular * (Math.asin(0.8) - Math.asin(0.1))) / 0.7) - 1)).toBeLessThan(1e-5);
  // Quantiles go with e, off by one part in 4096 of its range at most.
  expect(Math.abs(percentiles['50'] / (circular / Math.sqrt(1 - 0.45 ** 2)) - 1)).toBeLessThan(2e-4);
});

describe('the same bytes', () => {
  const tables = ['draws.parquet', 'bands.parquet', 'indices.parquet'];

  // 100 draws: what a chunk may not do to a number shows in few
  test('on one, two and four workers, and from three shards that are gathered', async () => {
    const draws = ['--draws', '100'];
    await spread('two.yaml', 'one', ...draws, '--workers', '1');
    await spread('two.yaml', 'two', ...draws, '--workers', '2');
    await spread('two.yaml', 'four', ...draws, '--workers', '4');
    for (const part of ['1/3', '2/3', '3/3']) await spread('two.yaml', `part${part[0]}`, ...draws, '--shard', part);
    const gathered = await place.perilag('gather', 'part1', 'part2', 'part3', '-o', 'whole', '--quiet');
    expect(gathered).toEqual({ code: 0, stdout: '', stderr: '' });
    for (const table of tables) {
      for (const folder of ['two', 'four', 'whole'])
        expect(bytes(folder, table).equals(bytes('one', table))).toBe(true);
    }
    expect(summary('whole').spread).toEqual(summary('one').spread);
  }, 120_000);

  test('a case alone draws as it does among others', async () => {
    await spread('two.yaml', 'both', '--draws', '64', '--no-indices');
    await spread('two.yaml', 'sea', '--draws', '64', '--no-indices', '--only', 'sea');
    const among = await readColumn(place.path('both', 'draws.parquet'), 'sea: temperatureMax');
    expect(await readColumn(place.path('sea', 'draws.parquet'), 'temperatureMax')).toEqual(among);
  });
});

test('inputs that cases share are drawn once: cases differ by what is told apart', async () => {
  await spread('two.yaml', 'out', '--draws', '64', '--no-indices');
  const { openParquet } = await import('../../cli/output/parquetReader.ts');
  const table = await openParquet(place.path('out', 'draws.parquet'));
  expect(table.names.slice(0, 5)).toEqual([
    'draw',
    'star.luminosity',
    'orbit.eccentricity',
    'planet.bondAlbedo',
    'planet.heatStore.mixedLayer',
  ]);
  await table.close();
});

test('a seed gives its draws again; another gives others', async () => {
  const draws = ['--draws', '32', '--no-indices'];
  await spread('quarter.yaml', 'a', ...draws, '--seed', '7');
  await spread('quarter.yaml', 'b', ...draws, '--seed', '8');
  await spread('quarter.yaml', 'c', ...draws, '--seed', '7', '--random');
  const column = async (folder: string) => readColumn(place.path(folder, 'draws.parquet'), 'star.luminosity');
  await spread('quarter.yaml', 'again', ...draws, '--seed', '7');
  expect(await column('again')).toEqual(await column('a'));
  expect(await column('a')).not.toEqual(await column('b'));
  expect(await column('a')).not.toEqual(await column('c'));
});

test('cases have one seed among them, or are told so', async () => {
  place.write('seeds.yaml', twoCasesText.replace('sea: {}', 'sea: { solve: { seed: 2 } }'));
  const apart = await place.perilag('spread', 'seeds.yaml', '-o', 'out');
  expect(apart.code).toBe(2);
  expect(apart.stderr).toContain('solve.seed: the cases have different ones (2, 1)');
  await spread('seeds.yaml', 'out', '--draws', '4', '--no-indices', '--seed', '3');
  await spread('seeds.yaml', 'sea', '--draws', '4', '--no-indices', '--only', 'sea');
  expect([summary('out').spread.seed, summary('sea').spread.seed]).toEqual([3, 2]);
});

describe('gather', () => {
  const part = (index: number, ...words: string[]) =>
    spread('two.yaml', `part${index}`, '--draws', '3', '--shard', `${index}/5`, ...words);

  test('more shards than draws, without indices', async () => {
    for (let index = 1; index <= 5; index++) await part(index, '--no-indices');
    await spread('two.yaml', 'one', '--draws', '3', '--no-indices');
    const parts = [1, 2, 3, 4, 5].map((index) => `part${index}`);
    const gathered = await place.perilag('gather', ...parts, '-o', 'whole', '--quiet');
    expect(gathered).toEqual({ code: 0, stdout: '', stderr: '' });
    for (const file of ['draws.parquet', 'bands.parquet', 'summary.json'])
      expect(bytes('whole', file).equals(bytes('one', file)), file).toBe(true);
    expect(existsSync(place.path('whole', 'indices.parquet'))).toBe(false);
  });

  test('rows of an earlier run beside the draws, and those of another program, are refused', async () => {
    const shard = ['two.yaml', 'part', '--draws', '4', '--shard', '1/1'] as const;
    await spread(...shard, '--seed', '1');
    for (const table of ['draws', 'bands']) rmSync(place.path('part', `${table}.work`), { recursive: true });
    await spread(...shard, '--seed', '2', '--no-indices');
    const mixed = await place.perilag('gather', 'part', '-o', 'whole');
    expect(mixed.code).toBe(2);
    expect(mixed.stderr).toContain('another run than the draws beside them (seed: 2 in the draws, 1 here)');
    expect(existsSync(place.path('whole'))).toBe(false);
    rmSync(place.path('part', 'indices.work'), { recursive: true });
    const path = place.path('part', 'draws.work', 'manifest.json');
    const manifest = JSON.parse(readFileSync(path, 'utf8'));
    manifest.job.settings.version = '0.0.0';
    manifest.fingerprint = fingerprintOf(manifest.job);
    writeFileSync(path, JSON.stringify(manifest));
    rmSync(place.path('part', 'bands.work'), { recursive: true });
    const old = await place.perilag('gather', 'part', '-o', 'whole');
    expect(old.code).toBe(2);
    expect(old.stderr).toContain('its rows are of perilag 0.0.0, and this is ');
  });
});

test('names that would make one column of two findings are told', async () => {
  const cases = 'cases: { A: { windows: { "x: period": 250 K to 300 K } }, "A: fractionInWindow.x": {} }';
  place.write('colon.yaml', `${quarterText}${cases}\n`);
  for (const words of [['spread'], ['grid', '--along', 'planet.bondAlbedo=0.1 to 0.5']]) {
    const { code, stderr } = await place.perilag(words[0]!, 'colon.yaml', '-o', 'out', ...words.slice(1));
    expect(stderr).toContain('two findings would both stand in column `A: fractionInWindow.x: period`');
    expect(code).toBe(2);
  }
});

test('samples of an angle around the centre have their median there, whichever way they were written', async () => {
  place.write('chain.csv', 'ls\n358\n359\n0\n1\n2\n');
  place.write(
    'zonal.yaml',
    `${zonalText.replace('bands: 36', 'bands: 18').replace('120 deg', '0 deg')}posterior: { file: chain.csv, columns: { ls: { key: planet.solarLongitudeOfPeriapsis, unit: deg } } }\n`,
  );
  await spread('zonal.yaml', 'out', '--draws', '16');
  const { mean, percentiles } = summary('out').spread.cases[0].inputs['planet.solarLongitudeOfPeriapsis'];
  expect(Math.abs(mean)).toBeLessThan(0.5); // 16 draws take one of five samples once more than the others
  expect(percentiles['2.5']).toBeCloseTo(-2, 9);
  expect(percentiles['97.5']).toBeCloseTo(2, 9);
});

test('draws that are no planets are listed with their inputs, and many of them end with 3', async () => {
  // the star of 0.9 Rsun reaches 0.0042 au: periapsis is inside it when e > 0.9163
  place.write(
    'graze.yaml',
    quarterText
      .replace('mass: 0.85 Msun', 'mass: 0.85 Msun, radius: 0.9 Rsun')
      .replace('0.48 au, eccentricity: 0', '0.05 au, eccentricity: 0.85 to 0.95'),
  );
  const { code, stderr } = await place.perilag(
    'spread',
    'graze.yaml',
    '-o',
    'out',
    '--draws',
    '256',
    '--no-indices',
    '--quiet',
  );
  expect(code).toBe(3);
  expect(stderr).toContain('of 256 draws failed');
  const lines = readFileSync(place.path('out', 'failed.csv'), 'utf8').trim().split('\n');
  expect(lines[0]).toContain('draw,star.luminosity_Lsun,orbit.eccentricity,planet.bondAlbedo,message');
  const { failed, cases } = summary('out').spread;
  expect(lines.length - 1).toBe(failed);
  expect(cases[0].failed).toBe(failed);
  // uniform: a third of the draws lies above 0.9163, to within what 256 even points allow
  expect(failed / 256).toBeCloseTo((0.95 - 0.9163) / 0.1, 1);
  expect(cases[0].findings.temperatureMean.defined).toBeCloseTo(1 - failed / 256, 12);
  for (const line of lines.slice(1)) expect(Number(line.split(',')[2])).toBeGreaterThan(0.916);
});

test('nothing uncertain, a lost file of rows, numbers that are none: said, with 2', async () => {
  place.write('exact.yaml', quarterText.replace('0.5 to 1.5 Lsun', '1 Lsun').replace('0.1 to 0.5', '0.3'));
  const exact = await place.perilag('spread', 'exact.yaml', '-o', 'out');
  expect(exact.code).toBe(2);
  expect(exact.stderr).toContain('exact.yaml: no input has a spread. ');
  expect(existsSync(place.path('out'))).toBe(false);
  const wrong = await place.perilag('spread', 'quarter.yaml', '--draws', '1');
  expect(wrong.code).toBe(2);
  expect(wrong.stderr).toContain('--draws');
  const nowhere = await place.perilag('gather', 'nowhere', '-o', 'out');
  expect(nowhere.code).toBe(2);
  expect(nowhere.stderr).toContain('nowhere');
});

test('a latitude model: its own findings, and bands along latitude', async () => {
  place.write(
    'zonal.yaml',
    `title: Chione b
model: zonal
star: { luminosity: 0.48 Lsun, mass: 0.82 Msun }
orbit: { instellation: 0.95 S0, eccentricity: 0.05 }
planet:
  bondAlbedo: 0.2 to 0.4
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 12 m }
  heatTransport: 0.3 to 0.8 W/m2/K
  obliquity: 24 ± 2 deg
  rotationPeriod: 22 h
  solarLongitudeOfPeriapsis: 120 ± 20 deg
  bands: 18
solve: { samples: 48, tolerance: 1e-4 }
`,
  );
  await spread('zonal.yaml', 'out', '--draws', '24', '--no-indices');
  const { findings, bandDraws } = summary('out').spread.cases[0];
  expect(bandDraws).toBe(24);
  expect(findings.hottestTemperature.percentiles['97.5']).toBeGreaterThan(
    findings.hottestTemperature.percentiles['2.5'],
  );
  const equator = await readColumn(place.path('out', 'bands.parquet'), 'latitudeMean.9');
  const pole = await readColumn(place.path('out', 'bands.parquet'), 'latitudeMean.0');
  for (let draw = 0; draw < 24; draw++) expect(equator[draw]).toBeGreaterThan(pole[draw]!);
}, 120_000);

test('a latitude model says which climates its draws took, and that they fall into two groups', async () => {
  // From a star of 0.36 Lsun on (a band more or less) a warm start stays thawed; the axis is that of 0.95 S0 at 0.48 Lsun.
  place.write(
    'ice.yaml',
    zonalText
      .replace('0.48 Lsun', '0.3 to 0.55 Lsun')
      .replace('instellation: 0.95 S0', 'semiMajorAxis: 0.711 au')
      .replace('bands: 36', 'bands: 18')
      .replace('tolerance: 1e-5', 'tolerance: 1e-4'),
  );
  const { code, stdout } = await place.perilag(
    'spread',
    'ice.yaml',
    '-o',
    'out',
    '--draws',
    '32',
    '--no-indices',
    '--workers',
    '1',
  );
  expect(code).toBe(0);
  const [one] = summary('out').spread.cases;
  const column = (name: string) => readColumn(place.path('out', 'draws.parquet'), name);
  const [climates, ice, mean] = [
    await column('climates'),
    await column('iceFractionMean'),
    await column('temperatureMean'),
  ];
  const share = (is: (draw: number) => boolean) => Array.from(climates.keys()).filter(is).length / 32;
  expect(one.climates).toMatchObject({
    second: share((draw) => climates[draw] === 2),
    frozenOver: share((draw) => ice[draw]! > 0.99),
  });
  expect(one.climates.frozenOver).toBeGreaterThan(0.1);
  expect(one.climates.second).toBeGreaterThan(0.1);
  // who is frozen over has no second climate, and is the lower group
  expect(share((draw) => ice[draw]! > 0.99 && climates[draw]! > 1)).toBe(0);
  const [low, high] = one.findings.temperatureMean.groups;
  expect(low.share).toBe(one.climates.frozenOver);
  expect(mean.every((value) => value <= low.to || value >= high.from)).toBe(true);
  const words = stdout.replace(/\s+/g, ' ');
  expect(words).toContain('of the draws allow a second, colder climate');
  expect(words).toContain('Mean temperature: the draws fall into two groups');
  expect(one.warnings).toHaveLength(3);
}, 120_000);
