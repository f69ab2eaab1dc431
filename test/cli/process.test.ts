/** What only a real process shows, on the built program. */
import { spawn, spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { threeCasesText, type Workplace, workplace, zonalText } from './support.ts';

const program = fileURLToPath(new URL('../../dist/perilag.mjs', import.meta.url));
const bash = (script: string) =>
  spawnSync('bash', ['-c', script], { cwd: place.folder, encoding: 'utf8', env: { ...process.env, PROGRAM: program } });
let place: Workplace;

beforeEach(() => {
  place = workplace();
  place.write('corvane.yaml', threeCasesText);
});
afterEach(() => place.remove());

describe('the built program', () => {
  test('runs with its own page and leaves a whole report', () => {
    const { status, stdout, stderr } = bash('"$PROGRAM" run corvane.yaml');
    expect({ status, stderr }).toMatchObject({ status: 0 });
    expect(stdout).toMatch(/shallow sea +bare rock +thick air/);
    const report = readFileSync(place.path('out/corvane/report.html'), 'utf8');
    expect(report).toMatch(/<script type="application\/json" id="perilag-data">\{"result":\{/);
    expect(report.trimEnd()).toMatch(/<\/html>$/);
  });

  test('writes the fields of a model with latitude with its own copy of the library', () => {
    place.write('chione.yaml', zonalText);
    const { status, stderr } = bash('"$PROGRAM" run chione.yaml -o chione');
    expect({ status, stderr }).toMatchObject({ status: 0 });
    const products = 'fields.nc,report.html,scenario.yaml,series.csv,summary.json';
    expect(readdirSync(place.path('chione')).sort().join()).toBe(products);
    expect(readFileSync(place.path('chione/fields.nc')).subarray(0, 4).toString('latin1')).toBe('\x89HDF');
  });

  test('prints the same without the compiled form beside it', () => {
    const { status, stdout } = bash(
      'cp "$(dirname "$PROGRAM")"/perilag.{mjs,cjs} . && cp "$(dirname "$PROGRAM")"/report.html . && node perilag.mjs run corvane.yaml',
    );
    expect(status).toBe(0);
    expect(stdout).toBe(bash('"$PROGRAM" run corvane.yaml').stdout);
  });

  test('a reader that stops reading does not make it fail', () => {
    const { stdout, stderr } = bash('"$PROGRAM" run corvane.yaml | head -1; echo "code $PIPESTATUS"');
    expect(stdout).toMatch(/^Corvane b .*\ncode 0\n$/);
    expect(stderr).not.toContain('Error');
    expect(bash('"$PROGRAM" run corvane.yaml 2>&1 | true; echo "code $PIPESTATUS"').stdout).toBe('code 0\n');
  });

  test.skipIf(!existsSync('/dev/full'))('a standard output that is full: exit 2, and the files are whole', () => {
    const { status, stderr } = bash('"$PROGRAM" run corvane.yaml > /dev/full');
    expect(status).toBe(2);
    expect(stderr).toContain('standard output: ');
    expect(JSON.parse(readFileSync(place.path('out/corvane/summary.json'), 'utf8')).cases).toHaveLength(3);
  });

  test('a file that may not grow: exit 2, nothing left', () => {
    const { status, stderr } = bash('ulimit -f 300; "$PROGRAM" run corvane.yaml');
    expect(status).toBe(2);
    expect(stderr).toContain('a file would be larger than allowed here. Choose another folder with -o.');
    expect(readdirSync(place.folder).sort()).toEqual(['corvane.yaml', 'page.html']);
  });

  test('a terminal’s width reaches the table; NO_COLOR keeps it plain', () => {
    const wide = bash('COLUMNS=60 NO_COLOR=1 "$PROGRAM" run corvane.yaml').stdout;
    expect(Math.max(...wide.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(60);
    expect(wide).not.toContain('\u001b');
  });

  test('Ctrl-C at any moment: exit 130 or the end, and the folder has all files or none', async () => {
    for (let wait = 40; wait <= 400; wait += 40) {
      const folder = `stopped-${wait}`;
      const child = spawn(process.execPath, [program, 'run', 'corvane.yaml', '-o', folder, '--quiet'], {
        cwd: place.folder,
      });
      setTimeout(() => child.kill('SIGINT'), wait);
      const [code, signal] = await new Promise<[number | null, string | null]>((resolve) =>
        child.on('exit', (...how) => resolve(how)),
      );
      expect(signal === 'SIGINT' || code === 130 || code === 0, `${code} ${signal}`).toBe(true);
      const found = existsSync(place.path(folder)) ? readdirSync(place.path(folder)).sort() : [];
      expect(
        found.length === 0 || found.join() === 'report.html,scenario.yaml,series.csv,summary.json',
        found.join(),
      ).toBe(true);
    }
  });
});
