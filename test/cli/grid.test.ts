import { existsSync, readFileSync, rmSync } from 'node:fs';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { readScenarioFile } from '../../cli/scenarioFile.ts';
import { threeCasesText, type Workplace, workplace, zonalText } from './support.ts';

let place: Workplace;
beforeEach(() => {
  place = workplace();
  place.write('corvane.yaml', threeCasesText);
});
afterEach(() => place.remove());

const read = (...names: string[]) => readFileSync(place.path(...names), 'utf8');
const ranges = ['--along', 'orbit.eccentricity=0 to 0.9', '--along', 'planet.bondAlbedo=0.1 to 0.5'];

/** Rows of grid.csv by their header. */
function rowsOf(folder: string): Record<string, string>[] {
  const [header = '', ...lines] = read(folder, 'grid.csv').trim().split('\n');
  const names = header.split(',');
  return lines.map((line) => Object.fromEntries(line.split(',').map((field, i) => [names[i]!, field])));
}

async function grid(file: string, ...words: string[]) {
  const done = await place.perilag('grid', file, '-o', 'out', '--quiet', ...words);
  expect(done).toEqual({ code: 0, stdout: '', stderr: '' });
}

test('every node is what a scenario that says its values gives, to the last bit', async () => {
  await grid('corvane.yaml', ...ranges, '--steps', '4');
  const rows = rowsOf('out');
  expect(rows).toHaveLength(3 * 16);
  for (const node of [0, 7, 14]) {
    const row = rows[node]!;
    const [e, albedo] = [row['orbit.eccentricity']!, row['planet.bondAlbedo']!];
    place.write(
      'one.yaml',
      threeCasesText
        .replace('eccentricity: 0.62', `eccentricity: ${e}`)
        .replace('bondAlbedo: 0.3', `bondAlbedo: ${albedo}`),
    );
    const run = await place.perilag('run', 'one.yaml', '--json', '--quiet', '-o', 'one');
    const { findings } = JSON.parse(run.stdout).cases.find(({ name }: { name: string }) => name === row.case);
    for (const [name, column] of [
      ['temperatureMax', 'temperatureMax_K'],
      ['lagOfMax', 'lagOfMax_s'],
      ['damping', 'damping'],
      ['fractionInWindow.liquid water at 1 bar', 'fractionInWindow.liquid water at 1 bar'],
    ] as const) {
      expect(row[column], `${name} at ${e}, ${albedo}`).toBe(
        findings[name].value === null ? '' : String(findings[name].value),
      );
    }
  }
});

test('the mean flux is held where it is asked for: the period follows', async () => {
  await grid(
    'corvane.yaml',
    '--along',
    'orbit.eccentricity=0 to 0.8',
    '--hold',
    'orbitMeanInstellation',
    '--steps',
    '3',
  );
  const fluxes = rowsOf('out').map((row) => Number(row.orbitMeanInstellation_W_m2));
  for (const flux of fluxes) expect(flux / fluxes[0]!).toBeCloseTo(1, 13);
  const periods = rowsOf('out')
    .slice(0, 3)
    .map((row) => Number(row.period_s));
  // a ∝ (1 − e²)^−¼, P ∝ a^1.5
  expect(periods[2]! / periods[0]!).toBeCloseTo((1 - 0.64) ** -0.375, 12);
});

test('files and table: only what was asked for, gaps where there is no world', async () => {
  place.write(
    'graze.yaml',
    threeCasesText.replace('mass: 0.85 Msun', 'mass: 0.85 Msun, radius: 0.9 Rsun').replace('0.48 au', '0.02 au'),
  );
  const words = [
    '--along',
    'orbit.eccentricity=0 to 0.9',
    '--steps',
    '10',
    '--of',
    'temperatureMax,lagOfMax',
    '--only',
    'shallow sea',
  ];
  const { code, stdout } = await place.perilag('grid', 'graze.yaml', '-o', 'out', ...words);
  expect(code).toBe(0);
  expect(stdout).toContain('nodes have no world that can be computed');
  const rows = rowsOf('out');
  expect(Object.keys(rows[0]!)).toEqual(['case', 'orbit.eccentricity', 'temperatureMax_K', 'lagOfMax_s']);
  // 0.9 Rsun is 0.00419 au: periapsis lies inside the star from e = 0.79 on
  expect(rows.map((row) => row.temperatureMax_K === '')).toEqual([0, 0, 0, 0, 0, 0, 0, 0, 1, 1].map(Boolean));
  expect(rows[0]!.lagOfMax_s).toBe(''); // a circle has no maximum to lag behind
  const { grid: told } = JSON.parse(read('out', 'summary.json'));
  expect(told.cases[0]).toMatchObject({
    name: 'shallow sea',
    failed: 2,
    members: [{ name: 'shallow sea', own: [0.62] }],
  });
  for (const name of ['grid.nc', 'grid.parquet', 'failed-grid.csv', 'report.html', 'scenario.yaml'])
    expect(existsSync(place.path('out', name)), name).toBe(true);
  expect(existsSync(place.path('out', 'grid.work'))).toBe(false);
});

test('the scenario beside a grid finds its samples again; a finding that is asked for twice is there once', async () => {
  place.write('chain.csv', 'ecc\n0.6\n');
  place.write(
    'sampled.yaml',
    `${threeCasesText}posterior: { file: chain.csv, columns: { ecc: orbit.eccentricity } }\n`,
  );
  const twice = ['--of', 'temperatureMax, temperatureMax'];
  await grid('sampled.yaml', '--along', 'planet.bondAlbedo=0.1 to 0.5', '--steps', '2', ...twice);
  expect(readScenarioFile('out/scenario.yaml', place.folder).scenario.posterior?.file).toBe('../chain.csv');
  expect(Object.keys(rowsOf('out')[0]!)).toEqual(['case', 'planet.bondAlbedo', 'temperatureMax_K']);
});

test('a finished grid whose list of failed nodes is lost is computed again', async () => {
  place.write('graze.yaml', threeCasesText.replace('mass: 0.85 Msun', 'mass: 0.85 Msun, radius: 0.9 Rsun'));
  const words = ['--along', 'orbit.eccentricity=0 to 0.995', '--steps', '3', '--of', 'temperatureMax'];
  await grid('graze.yaml', ...words);
  const list = read('out', 'failed-grid.csv');
  rmSync(place.path('out', 'failed-grid.csv'));
  await grid('graze.yaml', ...words, '--resume');
  expect(read('out', 'failed-grid.csv')).toBe(list);
});

test('cases that the input makes alike are computed once, and files, table and page say so', async () => {
  const words = ['--along', 'planet.heatStore.heatCapacity=1e5 to 1e9 J/m2/K log', '--steps', '3'];
  const { stdout } = await place.perilag('grid', 'corvane.yaml', '-o', 'out', ...words);
  const together = 'shallow sea = bare rock = thick air';
  const said = [
    'planet.heatStore.mixedLayer, planet.heatStore.ground and planet.heatStore.atmosphere are left out: planet.heatStore.heatCapacity takes their place.',
    'The cases “shallow sea”, “bare rock”, “thick air” are the same along this input, which replaces what sets them apart: they were computed once.',
  ];
  for (const text of said) expect(stdout.replace(/\n\s+/g, ' ')).toContain(text);
  expect(rowsOf('out').map((row) => row.case)).toEqual([together, together, together]);
  const { grid: told } = JSON.parse(read('out', 'summary.json'));
  expect(told.cases.map(({ name, notes }: { name: string; notes: string[] }) => [name, notes])).toEqual([
    [together, said],
  ]);
  expect(read('out', 'report.html')).toContain(said[1]);
});

test('a spread that the grid does not propagate is said, on the terminal and in the summary', async () => {
  place.write('unsure.yaml', threeCasesText.replace('bondAlbedo: 0.3', 'bondAlbedo: 0.3 ± 0.05'));
  const words = ['--along', 'orbit.eccentricity=0 to 0.9', '--steps', '2', '--of', 'temperatureMax'];
  const { stdout } = await place.perilag('grid', 'unsure.yaml', '-o', 'out', ...words);
  const said =
    'Spreads of inputs are not propagated by grid: every input that no range varies is used at its centre; perilag spread samples them.';
  expect(stdout.replace(/\n\s+/g, ' ')).toContain(`note      ${said}`);
  expect(JSON.parse(read('out', 'summary.json')).grid.notes).toEqual([said]);
});

test('by latitude, too, every node is what a scenario that says its values gives, to the last bit', async () => {
  const coarse = zonalText.replace('bands: 36', 'bands: 18').replace('samples: 48', 'samples: 24');
  place.write('zonal.yaml', coarse);
  const along = ['--along', 'orbit.eccentricity=0.05 to 0.3', '--along', 'planet.obliquity=10 to 40 deg'];
  await grid('zonal.yaml', ...along, '--steps', '2');
  for (const row of rowsOf('out')) {
    const [e, obliquity] = [row['orbit.eccentricity']!, row['planet.obliquity_deg']!];
    place.write(
      'one.yaml',
      coarse
        .replace('eccentricity: 0.05', `eccentricity: ${e}`)
        .replace('obliquity: 24 deg', `obliquity: ${obliquity} deg`),
    );
    const run = await place.perilag('run', 'one.yaml', '--json', '--quiet', '-o', 'one');
    const { findings } = JSON.parse(run.stdout).cases[0];
    const names = Object.keys(findings);
    expect(names.length).toBeGreaterThan(20);
    for (const name of names) {
      const column = Object.keys(row).find((one) => one === name || one.startsWith(`${name}_`))!;
      const { value } = findings[name];
      expect(row[column], `${name} at ${e}, ${obliquity}`).toBe(value === null ? '' : String(value));
    }
  }
});

test('latitudes too', async () => {
  place.write('zonal.yaml', zonalText.replace('bands: 36', 'bands: 18'));
  await grid(
    'zonal.yaml',
    '--along',
    'planet.obliquity=0 to 60 deg',
    '--steps',
    '3',
    '--of',
    'contrast,temperatureMean',
  );
  const contrasts = rowsOf('out').map((row) => Number(row.contrast_K));
  expect(contrasts[0]).toBeGreaterThan(contrasts[1]!);
  expect(contrasts[1]).toBeGreaterThan(contrasts[2]!);
});

test.each([
  [
    ['--along', 'orbit.eccentricity=0 to 0.9', '--of', 'temperture'],
    '--of: there is no finding `temperture`. Did you mean',
  ],
  [['--along', 'orbit.eccentricity=0 to 0.9', '--hold', 'period'], '--hold: `period` cannot be held'],
  [
    ['--along', 'orbit.eccentricity=0', 'to', '0.9', '--steps', '3'],
    "--along: the range is not in quotes. Write --along 'orbit.eccentricity=0 to 0.9'.",
  ],
  [
    ['--along', 'orbit.eccentricity', '=', '0', 'to', '0.9'],
    "--along: the range is not in quotes. Write --along 'orbit.eccentricity=0 to 0.9'.",
  ],
  [['--along', 'orbit.eccentricity=0 to 0.9', '--of', ' , '], '--of: no finding is named. Choose from period,'],
  [['--along', 'orbit.eccentricity=0..0.9'], '--along: `0..0.9` is not a range. Write `orbit.eccentricity=0 to 0.9`.'],
  [['--along', 'orbit.eccentricity=0 to 2'], '--along: orbit.eccentricity'],
  [[...ranges, '--along', 'star.luminosity=1 to 2 Lsun'], '--along: 3 ranges are given'],
  [['--along', 'orbit.eccentricity=0 to 0.9', '--steps', '1'], '--steps takes a whole number from 2'],
])('%j is refused', async (words, message) => {
  const { code, stderr } = await place.perilag('grid', 'corvane.yaml', '-o', 'out', ...words);
  expect(code).toBe(2);
  expect(stderr).toContain(message);
  expect(existsSync(place.path('out'))).toBe(false);
});
