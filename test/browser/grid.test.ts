import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pagePieces } from '../../cli/output/report.ts';
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { lagReader } from '../../sim/studies/grid/readBack.ts';
import { readingText } from '../../viewer/words/storeReading.ts';
import { requireTool } from '../support/require.ts';
import { curveGrid, mapGrid } from '../viewer/gridFixture.ts';
import { builtPage, chromiumPath, drawn, launch, openFile } from './page.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');

const settings: readonly [string, BrowserContextOptions][] = [
  ['wide and light', { colorScheme: 'light' }],
  ['on a dark phone', { colorScheme: 'dark', viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true }],
];

describe.skipIf(!hasBrowser)('the report of a grid in Chromium', () => {
  let browser: Browser;
  let folder: string;

  beforeAll(async () => {
    browser = await launch();
    folder = await mkdtemp(join(tmpdir(), 'perilag-grid-'));
  });

  afterAll(async () => {
    await browser.close();
    await rm(folder, { recursive: true, force: true });
  });

  async function written(grid: GridReport): Promise<string> {
    const path = join(folder, 'grid.html');
    await writeFile(path, pagePieces({ grid }, fileURLToPath(builtPage)));
    return path;
  }

  async function violations(page: Page): Promise<string[]> {
    await page.evaluate(await readFile(axePath, 'utf8'));
    return page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: { run(options: object): Promise<{ violations: { id: string }[] }> };
      };
      const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
      return found.violations.map(({ id }) => id);
    });
  }

  test.each(settings)('a map and the chart of plain worlds, quietly and for everyone, %s', async (_, options) => {
    const open = await openFile(browser, await written(mapGrid()), options);
    const { page } = open;
    await drawn(page);
    expect(await page.locator('h1, h2').allTextContents()).toEqual([
      'How late is summer on Vessarine?',
      'A finding over both inputs',
      'Over the whole grid',
      'Among all plain worlds',
      'Inputs',
      'How it was computed',
      'What the numbers are not',
    ]);
    expect(await page.locator('.plot .hm image, .plot .heatmaplayer image').count()).toBeGreaterThanOrEqual(2);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
    expect(await violations(page)).toEqual([]);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('finding and case are chosen by keyboard; figure and words follow', async () => {
    const open = await openFile(browser, await written(mapGrid()));
    const { page } = open;
    await drawn(page);
    const figure = page.locator('figure.chart').first();
    await page.keyboard.press('Tab');
    expect(await page.evaluate(() => document.activeElement!.closest('label')!.textContent)).toMatch(/^Finding/);
    await page.keyboard.press('ArrowDown');
    await page.locator('figcaption', { hasText: 'Maximum temperature over' }).waitFor();
    await page.keyboard.press('Tab');
    await page.keyboard.press('ArrowDown');
    await page.locator('figcaption', { hasText: 'heat capacity: thin air' }).waitFor();
    expect(await figure.locator('.plot').getAttribute('aria-label')).toMatch(
      /^Maximum temperature over eccentricity and heat capacity: thin air\. thin air: lowest/,
    );
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('a lag that is typed is read back as the library reads it, and marked', async () => {
    const grid = mapGrid();
    const open = await openFile(browser, await written(grid));
    const { page } = open;
    await drawn(page);
    const answer = page.getByRole('status');
    const field = (name: string) => page.getByRole('textbox', { name });
    await field('Eccentricity').fill('0,3');
    await field('Lag behind periapsis').fill('9');
    await field('Its uncertainty').fill('1.5');
    await page.getByRole('combobox', { name: 'Case' }).last().selectOption('deep sea');
    const reading = lagReader()({ eccentricity: 0.3, lag: 0.09, plusMinus: 0.015 });
    expect(await answer.textContent()).toBe(readingText(reading, grid.cases[2]!.members[0]!.universal!));
    const plot = page.locator('.plot').nth(1);
    await page.waitForFunction(() => document.querySelectorAll('.plot')[1]!.ariaLabel!.includes('Read back at'));
    expect(await plot.getAttribute('aria-label')).toContain('Read back at eccentricity 0.3');
    await field('Lag behind periapsis').fill('24');
    expect(await answer.textContent()).toMatch(/^No heat store can be read: at this eccentricity no heat store/);
    await field('Eccentricity').fill('1.2');
    expect(await answer.textContent()).toMatch(/^Give an eccentricity/);
    expect(await violations(page)).toEqual([]);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test.each(settings)('curves of all cases along one input, %s', async (_, options) => {
    const open = await openFile(browser, await written(curveGrid()), options);
    const { page } = open;
    await drawn(page);
    const paths = page.locator('.plot').first().locator('.scatterlayer .trace .lines path');
    expect(await paths.count()).toBe(3);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
    await page.getByRole('combobox', { name: 'Finding' }).selectOption('radiativeTimeConstant');
    await page.locator('figcaption', { hasText: 'Radiative time constant against' }).waitFor();
    expect(await violations(page)).toEqual([]);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });
});
