import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import type { Dataset } from 'h5wasm/node';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { Interrupted, tellError } from '../../cli/exit.ts';
import type { Io } from '../../cli/io.ts';
import { loadHdf5 } from '../../cli/output/hdf5.ts';
import { main } from '../../cli/program.ts';
import packageJson from '../../package.json' with { type: 'json' };
import { SimError } from '../../sim/error.ts';
import { threeCasesText, undisturbed, type Workplace, workplace, zonalText } from './support.ts';

const products = ['report.html', 'scenario.yaml', 'series.csv', 'summary.json'];
let place: Workplace;

beforeEach(() => {
  place = workplace();
  place.write('corvane.yaml', threeCasesText);
});
afterEach(() => place.remove());

const read = (...names: string[]) => readFileSync(place.path(...names), 'utf8');

/** What a run in a window of so many columns tells on standard error. */
async function toldIn(columns: number): Promise<string> {
  let stderr = '';
  const io: Io = {
    stdout: { write: () => true },
    stderr: { write: (text: string) => (stderr += text) },
    isTTY: false,
    ...undisturbed,
    columns,
    env: { LANG: 'C.UTF-8' },
    cwd: place.folder,
    now: () => 0,
    reportTemplate: place.path('page.html'),
  };
  expect(await main(['run', 'corvane.yaml'], io)).toBe(0);
  return stderr;
}

describe('help', () => {
  test('no command: help on standard error, exit 2; --help: on standard output, exit 0', async () => {
    const none = await place.perilag();
    expect([none.code, none.stdout]).toEqual([2, '']);
    const asked = await place.perilag('--help');
    expect([asked.code, asked.stderr]).toEqual([0, '']);
    for (const name of ['run', 'trace', 'check', 'new', 'schema'])
      expect(asked.stdout).toMatch(new RegExp(`^  ${name}\\b`, 'm'));
    for (const name of ['dates', 'fit', 'survey']) expect(asked.stdout).not.toContain(name);
  });

  test('--version is the one of the package', async () => {
    expect(await place.perilag('--version')).toEqual({ code: 0, stdout: `${packageJson.version}\n`, stderr: '' });
  });

  test('a misspelt command or option: did you mean, exit 2', async () => {
    const command = await place.perilag('rum', 'corvane.yaml');
    expect([command.code, command.stdout]).toEqual([2, '']);
    expect(command.stderr).toContain('(Did you mean run?)');
    const option = await place.perilag('run', 'corvane.yaml', '--quite');
    expect(option.code).toBe(2);
    expect(option.stderr).toContain('(Did you mean --quiet?)');
    expect((await place.perilag('run')).code).toBe(2);
  });
});

describe('run', () => {
  test('prints the table on standard output, the paths on standard error, and writes the files', async () => {
    const { code, stdout, stderr } = await place.perilag('run', 'corvane.yaml');
    expect(code).toBe(0);
    expect(stdout).toMatch(/shallow sea +bare rock +thick air/);
    expect(stdout.match(/: pass$/gm)).toHaveLength(3);
    expect(stderr).toContain('out/corvane/report.html');
    expect(readdirSync(place.path('out', 'corvane')).sort()).toEqual(products);
  });

  test('the numbers of the table are those of summary.json', async () => {
    const { stdout } = await place.perilag('run', 'corvane.yaml');
    const { cases } = JSON.parse(read('out', 'corvane', 'summary.json'));
    const cells = (label: RegExp) =>
      stdout
        .split('\n')
        .find((line) => label.test(line))!
        .trim()
        .split(/\s{2,}/)
        .slice(1)
        .map(Number);
    const findings = (name: string) =>
      cases.map((item: { findings: Record<string, { value: number }> }) => item.findings[name]!.value);
    const near = (shown: readonly number[], exact: readonly number[], half: number) => {
      expect(shown).toHaveLength(3);
      for (const [index, value] of shown.entries()) expect(Math.abs(value - exact[index]!)).toBeLessThanOrEqual(half);
    };
    near(cells(/^ {2}maximum /), findings('temperatureMax'), 0.0051);
    near(cells(/^ {2}mean /), findings('temperatureMean'), 0.0051);
    near(
      cells(/^ {2}after periapsis, d/),
      findings('timeOfMax').map((seconds: number) => seconds / 86_400),
      0.0051,
    );
    near(
      cells(/^ {2}liquid water/),
      findings('fractionInWindow.liquid water at 1 bar').map((share: number) => 100 * share),
      0.051,
    );
  });

  test('a model with latitude writes fields.nc as well, which tells how it was made', async () => {
    place.write('chione.yaml', zonalText);
    const { code, stdout, stderr } = await place.perilag('run', 'chione.yaml', '-o', 'by latitude');
    expect(code).toBe(0);
    expect(stdout).toMatch(/hottest at latitude/);
    expect(stderr).toContain('summary.json, series.csv, fields.nc, scenario.yaml beside it');
    expect(readdirSync(place.path('by latitude')).sort()).toEqual([...products, 'fields.nc'].sort());
    const { File } = await loadHdf5();
    const file = new File(place.path('by latitude', 'fields.nc'), 'r');
    expect(file.attrs.history!.value).toMatch(
      /^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\dZ: perilag \S+: perilag run chione.yaml -o 'by latitude'$/,
    );
    expect(file.attrs.groups!.value).toBe('base/warm base/cold');
    const field = file.get('base/warm/band_temperature') as Dataset;
    expect(field.shape).toEqual([48, 36]);
    // Bands have equal areas: the mean over the latitudes of a row is the area mean of series.csv.
    const rows = field.value as Float64Array;
    const [first] = read('by latitude', 'series.csv').split('\n').slice(1);
    expect(rows.subarray(0, 36).reduce((sum, value) => sum + value / 36, 0)).toBeCloseTo(
      Number(first!.split(',')[10]),
      9,
    );
    file.close();
  });

  test('scenario.yaml runs again to the same numbers', async () => {
    await place.perilag('run', 'corvane.yaml', '--quiet');
    const again = await place.perilag('run', 'out/corvane/scenario.yaml', '-o', 'again', '--quiet');
    expect(again).toEqual({ code: 0, stdout: '', stderr: '' });
    const findings = (folder: string) =>
      JSON.parse(read(folder, 'summary.json')).cases.map((item: { findings: unknown }) => item.findings);
    expect(findings('again')).toEqual(findings('out/corvane'));
    expect(read('again', 'series.csv')).toBe(read('out', 'corvane', 'series.csv'));
  });

  test('--json: the summary and nothing else on standard output; several scenarios give an array', async () => {
    const one = await place.perilag('run', 'corvane.yaml', '--json');
    expect(one.stdout).toBe(read('out', 'corvane', 'summary.json'));
    place.write('second.json', secondJson);
    const two = await place.perilag('run', 'corvane.yaml', 'second.json', '--json', '--quiet', '-o', 'both');
    expect(two.code).toBe(0);
    expect(JSON.parse(two.stdout).map((summary: { scenario: { file: string } }) => summary.scenario.file)).toEqual([
      'corvane.yaml',
      'second.json',
    ]);
    expect(readdirSync(place.path('both')).sort()).toEqual(['corvane', 'second']);
    expect(readdirSync(place.path('both', 'second')).sort()).toEqual(products);
  });

  test('--only computes those cases, in the order of the file; a misspelt one is an error', async () => {
    const some = await place.perilag('run', 'corvane.yaml', '--only', 'thick air', '--only', 'shallow sea', '--json');
    expect(JSON.parse(some.stdout).cases.map((item: { name: string }) => item.name)).toEqual([
      'shallow sea',
      'thick air',
    ]);
    rmSync(place.path('out'), { recursive: true });
    const wrong = await place.perilag('run', 'corvane.yaml', '--only', 'bare rok');
    expect(wrong).toEqual({
      code: 2,
      stdout: '',
      stderr: '--only: there is no case `bare rok`. Did you mean `bare rock`?\n',
    });
    expect(existsSync(place.path('out'))).toBe(false);
  });

  test('a case with ground: the half-space itself beside the one store, in the table', async () => {
    const { stdout } = await place.perilag('run', 'corvane.yaml');
    const { cases } = JSON.parse(read('out', 'corvane', 'summary.json'));
    const derived = (name: string) => cases[1].derived[`planet.heatStore.ground.${name}`].value;
    const shown = (label: string) => {
      const cells = new RegExp(`^  ${label}(.*)$`, 'm')
        .exec(stdout)![1]!
        .trim()
        .split(/\s{2,}/);
      expect(cells).toHaveLength(1); // the other cases have no ground
      return Number(cells[0]);
    };
    expect(stdout).toContain('\nsmall swing of the ground alone\n');
    expect(shown('damping, half-space')).toBeCloseTo(derived('halfSpaceDamping'), 3);
    expect(shown('damping, one lumped store')).toBeCloseTo(derived('lumpedDamping'), 3);
    expect(shown('lag, half-space, d')).toBeCloseTo(derived('halfSpaceLag') / 86_400, 2);
    expect(shown('lag, one lumped store, d')).toBeCloseTo(derived('lumpedLag') / 86_400, 2);
    const without = await place.perilag('run', 'corvane.yaml', '--only', 'thick air');
    expect(without.stdout).not.toContain('half-space');
  });

  test('spreads: said once, in the table and in the summary, with the centres that nobody typed', async () => {
    place.write(
      'vague.yaml',
      threeCasesText.replace('0.62', '0.62 ± 0.03').replace('bondAlbedo: 0.3', 'bondAlbedo: < 0.4 (95%)'),
    );
    const { stdout } = await place.perilag('run', 'vague.yaml');
    expect(stdout.match(/Spreads of inputs are not propagated by run/g)).toHaveLength(1);
    expect(stdout).toContain('planet.bondAlbedo < 0.4 (95%) is used at 0.1377, its median.');
    const { notes } = JSON.parse(read('out', 'vague', 'summary.json'));
    expect(notes).toHaveLength(2);
    await place.perilag('run', 'corvane.yaml');
    expect(JSON.parse(read('out', 'corvane', 'summary.json')).notes).toEqual([]);
  });

  test('the summary calls the numerical bound by its name, and dates have their seconds', async () => {
    place.write('dated.yaml', threeCasesText.replace('0.62', '0.62, periapsisTime: 2000-01-02T12:00 TDB'));
    await place.perilag('run', 'dated.yaml', '--quiet');
    const text = read('out', 'dated', 'summary.json');
    const [first] = JSON.parse(text).cases;
    expect(first.findings.temperatureMax.numericalError).toBeGreaterThan(0);
    expect(text).not.toContain('plusMinus');
    // A day after J2000.0, 2000-01-01T12:00 TDB.
    expect(first.inputs['orbit.periapsisTime']).toMatchObject({ value: 86_400, unit: 's', since: 'J2000.0 TDB' });
  });

  test('in a narrow window the line on the files wraps', async () => {
    const narrow = await toldIn(40);
    for (const line of narrow.split('\n').filter((text) => !text.startsWith('report')))
      expect(line.length).toBeLessThanOrEqual(40);
    expect(narrow.replace(/\s+/g, ' ')).toContain('files summary.json, series.csv, scenario.yaml beside it');
  });

  test('--fractions adds the textbook value for each absorbing fraction', async () => {
    const { stdout } = await place.perilag('run', 'corvane.yaml', '--fractions', '--only', 'bare rock');
    const value = (fraction: string) =>
      Number(new RegExp(`absorbing fraction ${fraction} +([\\d.]+)`).exec(stdout)![1]);
    // T ∝ f^¼ by the definition of the textbook value.
    expect(value('1') / value('1/4')).toBeCloseTo(Math.SQRT2, 4);
    expect(value('1/2') / value('1/4')).toBeCloseTo(2 ** 0.25, 4);
    expect(value('2/3') / value('1/4')).toBeCloseTo((8 / 3) ** 0.25, 4);
  });

  test('several scenarios are all checked before anything is computed; every fault of every file is told', async () => {
    place.write('bad.yaml', threeCasesText.replace('0.62', '1.62').replace('20 m', '20 K'));
    const { code, stdout, stderr } = await place.perilag('run', 'corvane.yaml', 'bad.yaml', 'missing.yaml');
    expect([code, stdout]).toEqual([2, '']);
    const lines = stderr.trimEnd().split('\n');
    expect(lines.filter((line) => /^bad\.yaml:\d+:\d+: [\w.]+: .+\. .+\.$/.test(line)).length).toBeGreaterThanOrEqual(
      2,
    );
    expect(lines.at(-1)).toBe('missing.yaml: there is no such file. Check the path.');
    expect(existsSync(place.path('out'))).toBe(false);
  });

  test('two scenarios of one name would share a folder: refused', async () => {
    mkdirSync(place.path('sub'));
    place.write('sub/corvane.yaml', threeCasesText);
    const { code, stderr } = await place.perilag('run', 'corvane.yaml', 'sub/corvane.yaml');
    expect(code).toBe(2);
    expect(stderr).toMatch(/^-o: two scenarios would both write to the folder "corvane"\. /);
  });

  test.each([
    ['a folder', '.', 'this is a folder, not a scenario file'],
    ['no text', 'latin.yaml', 'this is not UTF-8 text'],
  ])('%s as a scenario: exit 2', async (_, file, what) => {
    place.write('latin.yaml', Uint8Array.of(0x74, 0x3a, 0xe9));
    const { code, stderr } = await place.perilag('run', file);
    expect(code).toBe(2);
    expect(stderr).toContain(`${file}: ${what}. `);
  });

  test('a folder that cannot be written: exit 2, and nothing half-written', async () => {
    const { code, stdout, stderr } = await place.perilag('run', 'corvane.yaml', '-o', 'corvane.yaml/sub');
    expect([code, stdout]).toEqual([2, '']);
    expect(stderr).toContain('a part of this path is a file, not a folder. Choose another folder with -o.');
    expect(readdirSync(place.folder).sort()).toEqual(['corvane.yaml', 'page.html']);
  });

  test('an output folder without a name: exit 2', async () => {
    const { code, stderr } = await place.perilag('run', 'corvane.yaml', '-o', '');
    expect([code, stderr]).toEqual([2, '-o: the folder has no name. Name one, e.g. `-o results`, or leave -o out.\n']);
    expect(existsSync(place.path('out'))).toBe(false);
  });

  test('a missing page names npm run build', async () => {
    rmSync(place.path('page.html'));
    const { code, stderr } = await place.perilag('run', 'corvane.yaml');
    expect(code).toBe(2);
    expect(stderr).toMatch(/page\.html: the report page is not built\. Run `npm run build`\.\n$/);
    expect(existsSync(place.path('out'))).toBe(false);
  });

  test('a fault of ours: the stack, a line that asks for a report, exit 1', async () => {
    // An environment that throws when it is asked stands for any error that nobody foresaw.
    let stderr = '';
    const io = {
      stdout: { write: () => true },
      stderr: { write: (text: string) => (stderr += text) },
      isTTY: false,
      ...undisturbed,
      columns: 80,
      env: new Proxy(
        {},
        {
          get: () => {
            throw new Error('unforeseen');
          },
        },
      ),
      cwd: place.folder,
      now: () => 0,
      reportTemplate: place.path('page.html'),
    };
    expect(await main(['run', 'corvane.yaml'], io)).toBe(1);
    expect(stderr).toMatch(/Error: unforeseen\n +at /);
    expect(stderr).toMatch(/please report it with the scenario file\.\n$/);
  });
});

test('an interrupted run is told, exit 130; of several faults ours weighs most', () => {
  let stderr = '';
  const io = { stderr: { write: (text: string) => (stderr += text) } } as unknown as Io;
  expect(tellError(new Interrupted(), io)).toBe(130);
  expect(stderr).toBe('Interrupted: nothing half-written is left.\n');
  expect(tellError(new AggregateError([new SimError('a', 'b', 'c'), new SimError('d', 'e', 'f')]), io)).toBe(2);
  expect(tellError(new AggregateError([new SimError('a', 'b', 'c'), new TypeError('x')]), io)).toBe(1);
});

const secondJson = `{"star":{"luminosity":"1 Lsun"},"orbit":{"semiMajorAxis":"1 au","eccentricity":0,"period":"365.25 d"},
"planet":{"bondAlbedo":0.3,"heatStore":{"heatCapacity":"4e7 J/m2/K"}}}`;

describe('check, new, schema', () => {
  test('check explains and writes nothing', async () => {
    const { code, stdout, stderr } = await place.perilag('check', 'corvane.yaml');
    expect([code, stderr]).toEqual([0, '']);
    expect(stdout).toContain('planet.emissivity');
    expect(readdirSync(place.folder).sort()).toEqual(['corvane.yaml', 'page.html']);
  });

  test('new writes a starter that runs, and never over a file that is there', async () => {
    expect((await place.perilag('new', 'mine.yaml')).code).toBe(0);
    expect((await place.perilag('run', 'mine.yaml')).code).toBe(0);
    const before = read('mine.yaml');
    expect((await place.perilag('new', 'mine.yaml')).code).toBe(2);
    expect(read('mine.yaml')).toBe(before);
  });

  test('schema is JSON Schema and knows the keys', async () => {
    const { code, stdout } = await place.perilag('schema');
    expect(code).toBe(0);
    expect(Object.keys(JSON.parse(stdout).properties)).toEqual(
      expect.arrayContaining(['star', 'orbit', 'planet', 'cases']),
    );
  });
});
