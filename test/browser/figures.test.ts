/** `--figures`: from the command line through the page to files for a paper. */
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { Interrupted } from '../../cli/exit.ts';
import { writeFigures } from '../../cli/figures/write.ts';
import type { Io } from '../../cli/io.ts';
import { threeCasesText, undisturbed, type Workplace, workplace, zonalText } from '../cli/support.ts';
import { requireTool, toolPath } from '../support/require.ts';
import { builtPage, chromiumPath } from './page.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const hasPython = requireTool('python');
let place: Workplace;

beforeEach(() => {
  place = workplace({ LANG: 'C.UTF-8', PERILAG_BROWSER: chromiumPath() ?? '' });
  place.write('page.html', readFileSync(builtPage));
});
afterEach(() => {
  vi.unstubAllEnvs();
  place.remove();
});

interface SvgRoot {
  readonly name: string;
  readonly width: string;
  readonly height: string;
  readonly viewBox: string;
  readonly text: string;
}

/** By a parser of XML that is not ours. */
function parsedSvg(path: string): SvgRoot {
  const program = `import json, sys, xml.dom.minidom as d
root = d.parse(sys.argv[1]).documentElement
words = lambda n: n.data if n.nodeType == 3 else ''.join(map(words, n.childNodes))
text = ' '.join(map(words, root.getElementsByTagName('text')))
print(json.dumps({'name': root.tagName, 'text': text, **{k: root.getAttribute(k) for k in ('width', 'height', 'viewBox')}}))`;
  const { stdout, stderr } = spawnSync(toolPath('python')!, ['-c', program, path], { encoding: 'utf8' });
  if (stdout === '') throw new Error(stderr);
  return JSON.parse(stdout) as SvgRoot;
}

/** Width and height, and pixels a metre where the chunk stands that says so. */
function pngSize(path: string): { width: number; height: number; perMetre: number | null } {
  const bytes = readFileSync(path);
  const at = bytes.indexOf('pHYs', 0, 'latin1');
  expect(bytes.subarray(0, 8).toString('latin1')).toBe('\x89PNG\r\n\x1a\n');
  return {
    width: bytes.readUInt32BE(16),
    height: bytes.readUInt32BE(20),
    perMetre: at < 0 || bytes[at + 12] !== 1 ? null : bytes.readUInt32BE(at + 4),
  };
}

describe.skipIf(!hasBrowser)('figures as files, by Chromium', () => {
  test.skipIf(!hasPython)('run: every figure in both formats, at its size on paper', async () => {
    place.write('chione.yaml', zonalText);
    const { code, stderr } = await place.perilag('run', 'chione.yaml', '--figures', 'png,svg');
    expect({ code, stderr }).toMatchObject({ code: 0 });
    const files = readdirSync(place.path('out/chione/figures')).sort();
    const svgs = files.filter((name) => name.endsWith('.svg'));
    const pngs = files.filter((name) => name.endsWith('.png'));
    expect(svgs.map((name) => name.slice(0, -4))).toEqual(pngs.map((name) => name.slice(0, -4)));
    expect(svgs.length + pngs.length).toBe(files.length);
    expect(stderr).toContain(`figures out/chione/figures: ${svgs.length} figures as svg and png, 180 mm wide`);
    // Through the orbit, the orbit of the first state, the loop, a map a state, one of insolation, profile, lags and windows.
    const states = JSON.parse(readFileSync(place.path('out/chione/summary.json'), 'utf8')).cases[0].states.length;
    const several = states > 1 ? '-1' : '';
    expect(svgs.map((name) => name.slice(3, -4)).slice(0, 3)).toEqual([
      'temperature-through-the-orbit',
      `orbit-from-above${several}`,
      'lag-loop',
    ]);
    expect(svgs.filter((name) => name.includes('temperature-by-latitude'))).toHaveLength(states);
    expect(svgs).toHaveLength(3 + states + 1 + 3);
    expect(svgs[0]).toBe('01-temperature-through-the-orbit.svg');
    for (const [at, name] of svgs.entries()) {
      const { name: root, width, height, viewBox } = parsedSvg(place.path('out/chione/figures', name));
      const [, , across, down] = viewBox.split(' ').map(Number);
      expect([root, width]).toEqual(['svg', '180mm']);
      expect(Number.parseFloat(height)).toBeCloseTo((180 * down!) / across!, 2);
      const png = pngSize(place.path('out/chione/figures', pngs[at]!));
      // 180 mm at 300 dpi: 180 / 25.4 · 300 = 2125.98; 300 / 0.0254 m = 11811.02.
      expect([png.width, png.perMetre]).toEqual([2126, 11_811]);
      expect(Math.abs(png.height - (2126 * down!) / across!)).toBeLessThan(1);
    }
  });

  test.skipIf(!hasPython).each(['grid', 'trace'])(
    '%s too, at the width asked for; names are only text',
    async (command) => {
      const hostile = '<b>&amp; "../../x"';
      place.write('corvane.yaml', threeCasesText.replace('shallow sea: {}', `'${hostile}': {}`));
      const along = ['--along', 'orbit.eccentricity=0 to 0.5', ...(command === 'grid' ? ['--steps', '3'] : [])];
      const asked = ['--figures', 'svg', '--figure-width', '9 cm', '--quiet'];
      const done = await place.perilag(command, 'corvane.yaml', ...along, '-o', 'there', ...asked);
      expect(done).toEqual({ code: 0, stdout: '', stderr: '' });
      const [first] = readdirSync(place.path('there/figures')).sort();
      const svg = parsedSvg(place.path('there/figures', first!));
      expect(svg.width).toBe('90mm');
      expect(svg.text).toContain('bare rock');
      expect(svg.text).toContain(hostile);
    },
  );

  test('a signal: the browser is gone, nothing is written, and the run says so', async () => {
    place.write('report.html', '<script>globalThis.perilagFigures = () => new Promise(() => undefined)</script>');
    let listening = 0;
    const io = {
      ...undisturbed,
      env: {},
      cwd: place.folder,
      stderr: { write: () => undefined },
      signals: {
        on: (listener: () => void) => {
          listening++;
          const timer = setTimeout(listener, 4000);
          return () => {
            clearTimeout(timer);
            listening--;
          };
        },
      },
    } as unknown as Io;
    const request = { formats: ['svg'], widthMm: 180, browser: chromiumPath() } as const;
    await expect(writeFigures(['.'], request, {}, io)).rejects.toThrow(Interrupted);
    expect(listening).toBe(0);
    expect(existsSync(place.path('figures'))).toBe(false);
    const children = () => spawnSync('ps', ['-o', 'comm=', '--ppid', String(process.pid)], { encoding: 'utf8' }).stdout;
    await expect.poll(children).not.toMatch(/chrom/i);
  });

  test('a page that offers none is told, and the browser closed', async () => {
    place.write('report.html', '<p>old</p>');
    const written: string[] = [];
    const stderr = { write: (text: string) => written.push(text) };
    const io = { ...undisturbed, env: {}, cwd: place.folder, stderr } as unknown as Io;
    const request = { formats: ['svg'], widthMm: 180, browser: chromiumPath() } as const;
    expect(await writeFigures(['.'], request, {}, io)).toBe(2);
    expect(written.join('')).toMatch(/report\.html: it offers no figures\. Run `npm run build`/);
  });
});

describe('figures as files, without a browser', () => {
  test('bad formats are refused before anything is computed', async () => {
    place.write('corvane.yaml', threeCasesText);
    for (const command of [['run'], ['trace', '--along', 'orbit.eccentricity=0 to 0.5']]) {
      const { code, stderr } = await place.perilag(...command, 'corvane.yaml', '-o', 'out', '--figures', 'gif');
      expect(code).toBe(2);
      expect(stderr).toBe(
        '--figures: `gif` is no format in which figures are written. Write svg, png, or both: `--figures svg,png`.\n',
      );
      expect(existsSync(place.path('out'))).toBe(false);
    }
  });

  test('a shard has no report to draw', async () => {
    place.write('corvane.yaml', threeCasesText);
    const { code, stderr } = await place.perilag('spread', 'corvane.yaml', '--shard', '1/2', '--figures', 'svg');
    expect([code, stderr]).toEqual([2, expect.stringMatching(/^--figures: a shard writes no report/)]);
  });

  test('no browser: the run is whole, what to install is said, exit 2', async () => {
    const lonely = workplace({ LANG: 'C.UTF-8', PATH: place.folder });
    vi.stubEnv('PLAYWRIGHT_BROWSERS_PATH', lonely.path('cache'));
    lonely.write('corvane.yaml', threeCasesText);
    const { code, stdout, stderr } = await lonely.perilag('run', 'corvane.yaml', '--figures', 'svg');
    expect(code).toBe(2);
    expect(stdout).toContain('Corvane b');
    expect(stderr).toMatch(/--figures: no Chromium was found.*apt-get install chromium.*\$PERILAG_BROWSER\.\n$/s);
    expect(readdirSync(lonely.path('out/corvane')).sort()).toEqual([
      'report.html',
      'scenario.yaml',
      'series.csv',
      'summary.json',
    ]);
    lonely.remove();
  });

  test('a browser that does not start: likewise', async () => {
    place.write('corvane.yaml', threeCasesText);
    const { code, stderr } = await place.perilag(
      'run',
      'corvane.yaml',
      '--quiet',
      '--figures',
      'svg',
      '--browser',
      '/bin/false',
    );
    expect(code).toBe(2);
    expect(stderr).toMatch(/^--figures: the browser \/bin\/false did not start/);
    expect(existsSync(place.path('out/corvane/report.html'))).toBe(true);
    expect(existsSync(place.path('out/corvane/figures'))).toBe(false);
  });
});
