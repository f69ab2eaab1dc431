/** `perilag trace`: what it prints and writes, and its exit codes. */
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { textWidth } from '../../cli/output/text.ts';
import { main } from '../../cli/program.ts';
import { undisturbed, type Workplace, workplace } from './support.ts';

const scenario = `title: Melaina b, thawed or frozen
star: { luminosity: 0.6 Lsun, mass: 0.88 Msun }
orbit: { semiMajorAxis: 0.79 au, eccentricity: 0.2 }
planet:
  albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 40 m }
cases:
  deep sea: {}
  "shallow, wide": { planet: { heatStore: { mixedLayer: 5 m } } }
`;
const range = 'star.luminosity=0.4 to 0.9 Lsun';
let place: Workplace;
let told: { readonly code: number; readonly stdout: string; readonly stderr: string };
const read = (...names: string[]) => readFileSync(place.path(...names), 'utf8');

beforeAll(async () => {
  place = workplace();
  place.write('melaina.yaml', scenario);
  told = await place.perilag('trace', 'melaina.yaml', '--along', range);
});

afterAll(() => place.remove());

/** `tick`: what the clock gains from one look at it to the next, ms. */
async function toldIn(columns: number, env: Record<string, string>, isTTY = false, tick = 0) {
  let clock = 0;
  const printed = { stdout: '', stderr: '' };
  const io = {
    stdout: { write: (text: string) => (printed.stdout += text) },
    stderr: { write: (text: string) => (printed.stderr += text) },
    isTTY,
    ...undisturbed,
    stderrIsTTY: isTTY,
    columns,
    env,
    cwd: place.folder,
    now: () => (clock += tick),
    reportTemplate: place.path('page.html'),
  };
  const code = await main(['trace', 'melaina.yaml', '--along', range, '--only', 'deep sea', '-o', 'narrow'], io);
  return { code, ...printed };
}

describe('trace', () => {
  test('tells where climates end, where there are two, and draws them', () => {
    expect(told.code).toBe(0);
    expect(told.stdout).toContain('along star.luminosity, 0.4 to 0.9 Lsun');
    expect(told.stdout).toMatch(/warm climate ends below +0\.\d+ +2\d\d\.\d\d\n/);
    expect(told.stdout).toMatch(/cold climate ends above +0\.\d+ +2\d\d\.\d\d\n/);
    expect(told.stdout).toMatch(/more than one climate: 0\.\d+ to 0\.\d+ Lsun/);
    expect(told.stdout).toContain('stable (solid), unstable (dotted)');
    expect(told.stderr).toMatch(/out\/melaina\/trace\//); // and no progress: this is no terminal
    expect(told.stderr).not.toContain('branch');
  });

  test('trace.csv holds the points that summary.json counts, its input in the unit typed', () => {
    const [header, ...rows] = read('out', 'melaina', 'trace', 'trace.csv').trimEnd().split('\n');
    expect(header).toBe(
      'case,branch,point,star.luminosity_Lsun,stable,fold,log_multiplier,temperature_mean_K,temperature_max_K,temperature_min_K,ice_fraction',
    );
    const summary = JSON.parse(read('out', 'melaina', 'trace', 'summary.json'));
    expect(summary.along).toMatchObject({ key: 'star.luminosity', unit: 'Lsun', from: 0.4, to: 0.9, log: false });
    expect(summary.cases.map(({ name }: { name: string }) => name)).toEqual(['deep sea', 'shallow, wide']);
    const deep = rows.filter((row) => row.startsWith('deep sea,')).map((row) => row.split(','));
    const [{ branches, folds, climateEnds }] = summary.cases;
    expect(deep).toHaveLength(branches.reduce((sum: number, { points }: { points: number }) => sum + points, 0));
    expect(
      deep
        .filter(([, , , , , fold]) => fold === 'true')
        .map((row) => Number(row[3]))
        .sort(),
    ).toEqual(folds);
    expect(climateEnds.map(({ value }: { value: number }) => value)).toEqual(folds);
    for (const row of deep) {
      const [, , , value, stable, fold, multiplier, mean, max, min] = row.map(Number) as number[];
      expect(value).toBeGreaterThanOrEqual(0.4 - 1e-12);
      expect(value).toBeLessThanOrEqual(0.9 + 1e-12);
      expect([stable, fold]).toEqual([Number.NaN, Number.NaN]); // words
      expect(multiplier! < 0).toBe(row[4] === 'true');
      expect(min!).toBeLessThanOrEqual(mean!);
      expect(mean!).toBeLessThanOrEqual(max!);
    }
    expect(rows.some((row) => row.startsWith('"shallow, wide",1,1,'))).toBe(true);
  });

  test('report.html carries the trace', () => {
    const page = read('out', 'melaina', 'trace', 'report.html');
    const { trace } = JSON.parse(/id="perilag-data">(.*)<\/script>/.exec(page)![1]!);
    expect(trace.scenario.file).toBe('melaina.yaml');
    expect(trace.cases.map(({ folds }: { folds: number[] }) => folds.length)).toEqual([2, 2]);
    expect(Object.keys(trace.cases[0].branches[0].points[0])).toEqual(
      expect.arrayContaining([
        'value',
        'stable',
        'fold',
        'temperatureMean',
        'temperatureMax',
        'temperatureMin',
        'iceFraction',
      ]),
    );
  });

  test('scenario.yaml, traced again, gives the same', async () => {
    place.write('again.yaml', read('out', 'melaina', 'trace', 'scenario.yaml'));
    const again = await place.perilag('trace', 'again.yaml', '--along', range);
    expect(again.stdout).toBe(told.stdout);
  });

  test('--json, --only, -o and --quiet', async () => {
    const words = ['trace', 'melaina.yaml', '--along', range, '--only', 'deep sea', '-o', 'here', '--json', '--quiet'];
    const { code, stdout, stderr } = await place.perilag(...words);
    expect([code, stderr]).toEqual([0, '']);
    expect(stdout).toBe(read('here', 'summary.json'));
    expect(JSON.parse(stdout).cases).toHaveLength(1);
  });

  test.each([
    [40, { LANG: 'C.UTF-8' }],
    [60, { LANG: 'C.UTF-8' }],
    [120, { LANG: 'C.UTF-8' }],
    [60, { LANG: 'C' }],
  ])('fits %d columns (%o)', async (columns, env) => {
    const { stdout } = await toldIn(columns, env as Record<string, string>);
    for (const line of stdout.split('\n')) expect(textWidth(line)).toBeLessThanOrEqual(columns);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: the first of ASCII
    if (env.LANG === 'C') expect(stdout).toMatch(/^[\x00-\x7f]*$/);
  });

  test('without a terminal, a line after every ten seconds says how far it is', async () => {
    const { stderr } = await toldIn(80, { LANG: 'C.UTF-8' }, false, 3000);
    const lines = stderr.split('\n').filter((line) => line.startsWith('deep sea:'));
    expect(lines.length).toBeGreaterThan(2);
    for (const line of lines) expect(line).toMatch(/^deep sea: branch 1, \d+ points, at 0\.\d+ Lsun$/);
  });

  test('on a terminal, progress goes to standard error', async () => {
    const { stderr, stdout } = await toldIn(80, { LANG: 'C.UTF-8', NO_COLOR: '1' }, true);
    expect(stderr).toMatch(/^deep sea: following its climates\ndeep sea: branch 1, \d+ points\n/);
    expect(stdout).not.toContain('branch 1,');
  });
});

describe('what trace refuses: exit 2, and nothing is written', () => {
  test.each([
    [
      ['--along', 'star.luminosty=0.4 to 0.9 Lsun'],
      '--along: `luminosty` is not a key of star. Did you mean `star.luminosity`?\n',
    ],
    [
      ['--along', 'orbit.eccentricity=0 to 0.99995'],
      /^--along: case `deep sea` is not sound at orbit\.eccentricity = 0\.99995: /,
    ],
    [['--along', range, '--only', 'deep see'], '--only: there is no case `deep see`. Did you mean `deep sea`?\n'],
    [['--along', range, '-o', ' '], /^-o: the folder has no name/],
    [
      [],
      "trace: --along <key=range> is missing. Write e.g. `perilag trace planet.yaml --along 'star.luminosity=0.8 to 1.3 Lsun'`.\n",
    ],
    [
      ['--along', range, '--along', 'orbit.eccentricity=0 to 0.5'],
      '--along: 2 ranges are given, and climates are followed along one input. Keep one of them; `perilag grid` takes two.\n',
    ],
  ])('%j', async (words, message) => {
    const empty = workplace();
    empty.write('melaina.yaml', scenario);
    const { code, stdout, stderr } = await empty.perilag('trace', 'melaina.yaml', ...words);
    expect([code, stdout]).toEqual([2, '']);
    if (typeof message === 'string') expect(stderr).toBe(message);
    else expect(stderr).toMatch(message);
    expect(existsSync(empty.path('out'))).toBe(false);
    expect(readdirSync(empty.folder).sort()).toEqual(['melaina.yaml', 'page.html']);
    empty.remove();
  });
});
