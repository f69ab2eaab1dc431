import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { pagePieces } from '../../cli/output/report.ts';
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { requireTool } from '../support/require.ts';
import { spreadCase, spreadOf } from '../viewer/spreadFixture.ts';
import { builtPage, chromiumPath, drawn, launch, type OpenReport, openFile } from './page.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');

const settings: readonly [string, BrowserContextOptions][] = [
  ['wide and light', { colorScheme: 'light' }],
  ['on a dark phone', { colorScheme: 'dark', viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true }],
];

const sea = spreadCase({ zonal: true });
const rock = spreadCase({ name: 'bare rock', heatCapacity: [4e5, 4e6] });
const report = spreadOf([{ ...sea, failed: 9 }, rock], { failed: 9 });

describe.skipIf(!hasBrowser)('the report of a spread in Chromium', () => {
  let browser: Browser;
  let folder: string;

  beforeAll(async () => {
    browser = await launch();
    folder = await mkdtemp(join(tmpdir(), 'perilag-spread-'));
  });

  afterAll(async () => {
    await browser.close();
    await rm(folder, { recursive: true, force: true });
  });

  async function opened(spread: SpreadReport, options: BrowserContextOptions = {}): Promise<OpenReport> {
    const path = join(folder, 'spread.html');
    await writeFile(path, pagePieces({ spread }, fileURLToPath(builtPage)));
    const open = await openFile(browser, path, options);
    await drawn(open.page);
    return open;
  }

  const label = (page: Page, figure: number): Promise<string | null> =>
    page.locator('.plot').nth(figure).getAttribute('aria-label');

  test.each(settings)('draws every figure, quietly and for everyone, %s', async (_, options) => {
    const open = await opened(report, options);
    const { page } = open;
    expect(await page.locator('h1, h2').allTextContents()).toEqual([
      'Corvane b: how sure is its peak?',
      'The findings',
      'Inputs as drawn',
      'The draws',
      'How it was computed',
      'What the numbers are not',
    ]);
    expect(await page.locator('.lead').textContent()).toMatch(/^The median peak temperature lies between/);
    expect(await page.locator('.notice').first().textContent()).toMatch(/^Caution 9 of 512 draws.*more than 1/);
    // Bands through the orbit (two cases) and by latitude (one), histograms, bars, clouds.
    expect(await page.locator('.plot').count()).toBe(5);
    expect(await page.locator('.plot').nth(0).locator('.scatterlayer .trace').count()).toBe(12);
    expect(await page.locator('.plot').nth(1).locator('.scatterlayer .trace').count()).toBe(6);
    expect(await page.locator('.plot').nth(2).locator('.barlayer .point').count()).toBeGreaterThan(40);
    expect(await page.locator('.plot').nth(3).locator('.barlayer .point').count()).toBe(16);
    expect(await page.locator('.plot').nth(4).locator('.scatterlayer .point').count()).toBe(2 * 256 + 2);
    for (const text of await page.locator('svg text').allTextContents()) expect(text).not.toMatch(/NaN|undefined/);
    expect(await page.evaluate(() => document.documentElement.scrollWidth - innerWidth)).toBeLessThanOrEqual(0);
    await page.getByText('Every finding').click();
    expect(await violations(page)).toEqual([]);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('the choices are made by keyboard, and figure and words follow', async () => {
    const open = await opened(report);
    const { page } = open;
    const chosen = page.locator('.chart select');
    expect(await chosen.count()).toBe(4);

    await chosen.nth(0).focus();
    await page.keyboard.type('Damping');
    await expect.poll(() => label(page, 2)).toMatch(/^The draws: damping/);
    expect(await page.locator('figcaption').filter({ hasText: 'The draws: damping' }).count()).toBe(1);
    const title = page.locator('.plot').nth(2).locator('.xtitle, .x2title');
    await expect.poll(() => title.allTextContents()).toContain('Damping (swing over steady swing)');
    expect(await label(page, 3)).toMatch(/^What matters most: maximum temperature/);

    const before = await label(page, 3);
    await page.keyboard.press('Tab'); // Save SVG
    await page.keyboard.press('Tab'); // Save PNG
    await page.keyboard.press('Tab'); // Save CSV
    await page.keyboard.press('Tab');
    expect(await chosen.nth(1).evaluate((select) => select === document.activeElement)).toBe(true);
    await page.keyboard.press('ArrowDown');
    await expect.poll(() => label(page, 3)).not.toBe(before);

    await chosen.nth(3).focus();
    await page.keyboard.type('Ecc');
    await expect.poll(() => label(page, 4)).toMatch(/^Maximum temperature against eccentricity/);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('every finding unfolds by keyboard, and on paper by itself', async () => {
    const open = await opened(report);
    const { page } = open;
    const table = page.getByRole('table', { name: 'Steady values and the textbook' });
    expect(await table.isVisible()).toBe(false);
    await page.locator('summary').focus();
    await page.keyboard.press('Enter');
    expect(await table.isVisible()).toBe(true);
    await page.keyboard.press('Enter');
    await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
    expect(await table.isVisible()).toBe(true);
    await page.emulateMedia({ media: 'print' });
    expect(await page.locator('select').first().isVisible()).toBe(false);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('figures can be saved as they were chosen', async () => {
    const open = await opened(report);
    const { page } = open;
    await page.locator('.chart select').nth(1).selectOption('damping');
    const waiting = page.waitForEvent('download');
    await page.locator('.chart').nth(3).getByRole('button', { name: 'Save SVG' }).click();
    const download = await waiting;
    expect(download.suggestedFilename()).toBe('what-matters-most-damping.svg');
    expect(await readFile((await download.path())!, 'utf8')).toMatch(/^<svg/);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });

  test('samples whose inputs go together: ranks, and text from a scenario as text', async () => {
    const nasty = '<img src=x onerror="console.log(1)">';
    const posterior = spreadCase({ name: nasty, sampling: 'posterior' });
    const labelled = { ...posterior, inputs: posterior.inputs.map((input) => ({ ...input, label: nasty })) };
    const open = await opened(
      spreadOf([labelled, { ...rock, name: '</script>' }], { sampling: 'posterior', indexRows: 0 }),
    );
    const { page } = open;
    expect(await page.locator('main img').count()).toBe(0);
    expect(await page.locator('.steps').textContent()).toContain('Dette, Siburg & Stoimenov');
    expect(await page.locator('td').filter({ hasText: 'column “bondAlbedo”' }).count()).toBe(1);
    expect(await open.complaints()).toEqual([]);
    await open.close();
  });
});

async function violations(page: Page): Promise<string[]> {
  await page.evaluate(await readFile(axePath, 'utf8'));
  return page.evaluate(async () => {
    const { axe } = globalThis as unknown as {
      axe: { run(options: object): Promise<{ violations: { id: string; nodes: { target: unknown }[] }[] }> };
    };
    const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
    return found.violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(' ')}`);
  });
}
