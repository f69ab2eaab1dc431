import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContextOptions } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pagePieces } from '../../cli/output/report.ts';
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { requireTool } from '../support/require.ts';
import { loopCase, plainCase, traceOf } from '../viewer/traceFixture.ts';
import { builtPage, chromiumPath, drawn, launch, openFile } from './page.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');

const settings: readonly [string, BrowserContextOptions][] = [
  ['wide and light', { colorScheme: 'light' }],
  ['on a dark phone', { colorScheme: 'dark', viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true }],
];

describe.skipIf(!hasBrowser)('the report of a trace in Chromium', () => {
  let browser: Browser;
  let folder: string;

  beforeAll(async () => {
    browser = await launch();
    folder = await mkdtemp(join(tmpdir(), 'perilag-trace-'));
  });

  afterAll(async () => {
    await browser.close();
    await rm(folder, { recursive: true, force: true });
  });

  async function written(trace: TraceReport): Promise<string> {
    const path = join(folder, 'trace.html');
    await writeFile(path, pagePieces({ trace }, fileURLToPath(builtPage)));
    return path;
  }

  test.each(settings)('draws the loop, quietly and for everyone, %s', async (_, options) => {
    const open = await openFile(browser, await written(traceOf([loopCase(), plainCase()])), options);
    const { page } = open;
    await drawn(page);
    expect(await page.locator('h1, h2').allTextContents()).toEqual([
      'How far can Ossilith dim before it freezes?',
      'Where climates end',
      'How it was computed',
      'What the numbers are not',
    ]);
    expect(await page.locator('.lead').textContent()).toMatch(/^1 of 2 cases allows more than one climate/);
    // Two stable and one unstable, the plain case's one, two jumps; and below the same without jumps.
    const paths = page.locator('.plot .scatterlayer .trace .lines path');
    expect(await paths.count()).toBe(10);
    for (const path of await paths.all()) expect(await path.getAttribute('d')).toMatch(/^M[\d.,-]+/);
    expect(await page.locator('.plot').getAttribute('aria-label')).toMatch(/the warm climate ends in a fold at 0\.930/);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
    await page.evaluate(await readFile(axePath, 'utf8'));
    const violations = await page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: { run(options: object): Promise<{ violations: { id: string }[] }> };
      };
      return (
        await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] })
      ).violations.map(({ id }) => id);
    });
    expect(violations).toEqual([]);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });
});
