import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { BrowserContextOptions, Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { requireTool } from '../support/require.ts';
import { temperateWindow } from '../viewer/fixture.ts';
import { zonalRun } from '../viewer/zonalFixture.ts';
import { chromiumPath } from './page.ts';
import { reportBench } from './reportBench.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');
const phone: BrowserContextOptions = { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true };
const one = { cases: [{ name: 'tilted sea' }] };

interface Drawn {
  readonly _fullData: readonly {
    readonly type: string;
    readonly name: string;
    readonly z?: readonly ArrayLike<number>[];
  }[];
  readonly layout: { readonly font: { readonly color: string } };
}

describe.skipIf(!hasBrowser)('the report of a run with latitudes in Chromium', () => {
  const { openReport } = reportBench();

  const titles = (page: Page): Promise<string[]> =>
    page.locator('.chart figcaption b').evaluateAll((heads) => heads.map((head) => head.textContent!.trim()));

  test('the orbit, a map a state, in order, then profile, lag and windows', async () => {
    const page = await openReport(zonalRun());
    expect(await titles(page)).toEqual([
      'Figure 1. Area-mean temperature through the orbit.',
      'Figure 2. The orbit from above, coloured by area-mean temperature: tilted sea, warm state.',
      'Figure 3. The lag loop: area-mean temperature against instellation.',
      'Figure 4. Temperature by latitude and season: tilted sea, warm state.',
      'Figure 5. Temperature by latitude and season: tilted sea, cold state.',
      'Figure 6. Temperature by latitude and season: upright sea.',
      'Figure 7. Insolation by latitude and season: tilted sea.',
      'Figure 8. Insolation by latitude and season: upright sea.',
      'Figure 9. Annual mean by latitude.',
      'Figure 10. Local lag by latitude.',
      'Figure 11. Time in windows.',
    ]);
  });

  test('the map is drawn with the run’s own numbers: a picture of the field, lines of freezing and ice, both time axes', async () => {
    const run = zonalRun({ ...one, samples: 180 });
    const page = await openReport(run);
    const map = page.locator('.plot').nth(3);
    const traces = await map.evaluate((plot) =>
      (plot as unknown as Drawn)._fullData.map(({ type, z }) => ({
        type,
        highest: type === 'heatmap' ? Math.max(...z!.map((row) => Math.max(...Array.from(row)))) : null,
      })),
    );
    expect(traces.map(({ type }) => type)).toEqual(['heatmap', 'contour', 'contour', 'contour', 'scatter', 'scatter']);
    const field = run.cases[0]!.states[0]!.dataset.variables.bandTemperature!.data;
    expect(traces[0]!.highest).toBe(Math.max(...field));
    const picture = map.locator('.heatmaplayer image');
    expect(await picture.count()).toBe(1);
    expect((await picture.getAttribute('href'))!.length).toBeGreaterThan(1000);
    const lines = map.locator('.contourlayer .contourlevel path');
    expect(await lines.count()).toBeGreaterThanOrEqual(3);
    for (const line of await lines.all()) expect((await line.getAttribute('d'))!.length).toBeGreaterThan(20);
    expect(await map.locator('.contourlabels text').first().textContent()).toBe('273.15');
    expect(await map.locator('.x2tick text').allTextContents()).toEqual(expect.arrayContaining(['0°', '90°', '180°']));
    expect(await map.locator('.ytick text').allTextContents()).toContain('0°');
    expect(await map.locator('.cbaxis text').count()).toBeGreaterThan(2);
  });

  test('the pointer reads temperature, latitude, time and season', async () => {
    const page = await openReport(zonalRun(one));
    const map = page.locator('.plot').nth(3);
    await map.scrollIntoViewIfNeeded();
    const box = (await map.locator('.nsewdrag').boundingBox())!;
    await page.mouse.move(box.x + 0.6 * box.width, box.y + 0.4 * box.height);
    const label = map.locator('.hoverlayer .hovertext');
    await label.waitFor();
    expect((await label.textContent())!.replaceAll('\u00a0', ' ').replaceAll('\u200b', '')).toMatch(
      /^\d{3}\.\d K\d+\.\d° N\d+\.\d d after periapsisLs \d+°\d{4}-\d\d-\d\d \d\d:\d\d UTC$/,
    );
  });

  test('the profile’s pointer reads the latitude in degrees, and both panels', async () => {
    const page = await openReport(zonalRun(one));
    const profile = page.locator('.plot').nth(5);
    await profile.scrollIntoViewIfNeeded();
    const box = (await profile.locator('.nsewdrag').first().boundingBox())!;
    await page.mouse.move(box.x + 0.5 * box.width, box.y + 0.5 * box.height);
    const label = profile.locator('.hoverlayer .legend');
    await label.waitFor();
    const text = (await label.textContent())!.replaceAll('\u00a0', ' ');
    expect(text).toMatch(
      /Latitude.*\d\.\d° [NS].*tilted sea : \d+\.\d K \(\d+\.\d to \d+\.\d K\).*insolation : \d+\.\d W m⁻²/,
    );
  });

  test('zooming a map refines the seasons and offers a way back', async () => {
    const page = await openReport(zonalRun(one));
    const map = page.locator('.plot').nth(3);
    await map.scrollIntoViewIfNeeded();
    const seasons = (): Promise<string[]> => map.locator('.x2tick text').allTextContents();
    const before = await seasons();
    const box = (await map.locator('.nsewdrag').boundingBox())!;
    await page.mouse.move(box.x + 0.3 * box.width, box.y + 0.3 * box.height);
    await page.mouse.down();
    await page.mouse.move(box.x + 0.45 * box.width, box.y + 0.6 * box.height, { steps: 5 });
    await page.mouse.up();
    await expect.poll(seasons).not.toEqual(before);
    await page.locator('.chart').nth(3).getByRole('button', { name: 'Show all' }).click();
    await expect.poll(seasons).toEqual(before);
  });

  test('a large run opens with maps of 200 columns at most', async () => {
    const page = await openReport(zonalRun({ bands: 90, samples: 720 }));
    const columns = await page
      .locator('.plot')
      .evaluateAll((plots) =>
        plots.flatMap((plot) =>
          (plot as unknown as Drawn)._fullData.filter(({ type }) => type === 'heatmap').map(({ z }) => z![0]!.length),
        ),
      );
    expect(columns).toHaveLength(5);
    expect(Math.max(...columns)).toBeLessThanOrEqual(202); // one beyond either edge
  });

  test('the answer and the table name places', async () => {
    const page = await openReport(zonalRun(one));
    const text = (await page.locator('main').textContent())!.replaceAll('\u00a0', ' ');
    expect(text).toMatch(/The hottest place has \d+\.\d K at \d+\.\d° [NS], \d+\.\d d (after|before) periapsis;/);
    expect(text).toMatch(/Hottest at any latitude\d+\.\d\d K\d+\.\d° [NS], /);
    expect(text).toMatch(/Rosenbrock.*whole circle and the whole day/s);
  });

  test.each(['light', 'dark'] as const)('axe finds nothing in the %s scheme', async (colorScheme) => {
    const page = await openReport(zonalRun(), { colorScheme });
    await page.evaluate(await readFile(axePath, 'utf8'));
    const violations = await page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: { run: (options: object) => Promise<{ violations: { id: string; nodes: { target: string[] }[] }[] }> };
      };
      const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
      return found.violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(' ')}`);
    });
    expect(violations).toEqual([]);
  });

  test.each([
    ['phone', phone],
    ['small phone', { ...phone, viewport: { width: 320, height: 640 } }],
    ['tablet', { viewport: { width: 768, height: 1024 } }],
  ])(
    'no sideways scrolling on a %s, with a key of the lines where it has no room beside the map',
    async (_, options) => {
      const page = await openReport(zonalRun(), options);
      const [content, screen] = await page.evaluate(() => [document.documentElement.scrollWidth, innerWidth]);
      expect(content).toBeLessThanOrEqual(screen!);
      const key = page.locator('.chart').nth(3).locator('.legend li');
      const beside = page.locator('.plot').nth(3).locator('.annotation-text', { hasText: 'edge of the ice' });
      expect((await key.count()) > 0).toBe((await beside.count()) === 0);
    },
  );

  test('saves a map as SVG with its key and its colours', async () => {
    const page = await openReport(zonalRun(one), { colorScheme: 'dark' });
    const waiting = page.waitForEvent('download');
    await page.locator('.chart').nth(3).getByRole('button', { name: 'Save SVG' }).click();
    const download = await waiting;
    expect(download.suggestedFilename()).toBe('temperature-by-latitude-and-season.svg');
    const content = await readFile((await download.path())!, 'utf8');
    expect(content).toContain('data:image/png');
    expect(content).toContain('edge of the ice');
  });

  test.each([
    ['markup', '<img src=x onerror="document.title=\'taken\'">'],
    ['long', 'x'.repeat(3000)],
    ['the end of a script', '</script><b>\u202e'],
  ])('a case whose name is %s is only text', async (_, name) => {
    const run = zonalRun({
      cases: [{ name, coldState: true }, { name: 'b' }],
      windows: [{ ...temperateWindow, name }],
    });
    const page = await openReport(run);
    expect(await page.title()).not.toBe('taken');
    expect(await page.locator('main img, main script, b b').count()).toBe(0);
    const [content, screen] = await page.evaluate(() => [document.documentElement.scrollWidth, innerWidth]);
    expect(content).toBeLessThanOrEqual(screen!);
  });
});
