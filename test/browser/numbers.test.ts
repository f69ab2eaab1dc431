import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { BrowserContextOptions, Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { columnsOf } from '../../viewer/words/columns.ts';
import { latexTable } from '../../viewer/words/latexTable.ts';
import { numbersCsv, numbersTable, numbersText } from '../../viewer/words/numbersTable.ts';
import { requireTool } from '../support/require.ts';
import { plainRun } from '../viewer/fixture.ts';
import { chromiumPath } from './page.ts';
import { reportBench } from './reportBench.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');
const phone: BrowserContextOptions = {
  viewport: { width: 390, height: 844 },
  isMobile: true,
  hasTouch: true,
  colorScheme: 'dark',
};

const run = plainRun({ cases: [{ name: '50 % & "sea"', heatCapacity: 8e7, coldState: true }] });
const table = numbersTable(columnsOf(run));
const ways = [
  ['Copy as text', numbersText(table)],
  ['Copy as CSV', numbersCsv(table)],
  ['Copy as LaTeX', latexTable(table, run.program.version)],
] as const;

/** What a reader gets who pastes. */
async function pasted(page: Page): Promise<string> {
  await page.evaluate(() => {
    const field = document.createElement('textarea');
    field.id = 'pasted';
    document.body.append(field);
    field.focus();
  });
  await page.keyboard.press('Control+V');
  const text = await page.locator('#pasted').inputValue();
  await page.locator('#pasted').evaluate((field) => field.remove());
  return text;
}

const section = (page: Page) => page.locator('section.numbers');
const status = (page: Page) => section(page).getByRole('status').textContent();

describe.skipIf(!hasBrowser)('the numbers of a run in Chromium', () => {
  const { openReport } = reportBench();

  test('folded away until asked for; every finding of every state; opened for print', async () => {
    const page = await openReport(run);
    const rows = section(page).locator('tbody th[scope="row"]');
    expect(await rows.first().isVisible()).toBe(false);
    await section(page).locator('summary').focus();
    await page.keyboard.press('Enter');
    await expect.poll(() => rows.first().isVisible()).toBe(true);
    expect(await rows.count()).toBe(table.groups.flatMap((group) => group.rows).length);
    expect(await section(page).locator('thead small').allTextContents()).toEqual(['warm state', 'cold state']);
    await page.keyboard.press('Enter');
    await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
    expect(await rows.first().isVisible()).toBe(true);
  });

  test.each(ways)('%s, and says so', async (label, text) => {
    const page = await openReport(run);
    await section(page).getByRole('button', { name: label }).focus();
    await page.keyboard.press('Enter');
    await expect.poll(() => status(page)).toBe('Copied');
    expect(await pasted(page)).toBe(text);
  });

  test('without a clipboard, by a selection; the focus stays on the button', async () => {
    const page = await openReport(run);
    await page.evaluate(() => Object.defineProperty(navigator, 'clipboard', { value: undefined }));
    await section(page).getByRole('button', { name: ways[1][0] }).click();
    await expect.poll(() => status(page)).toBe('Copied');
    expect(await page.evaluate(() => document.activeElement?.textContent)).toBe(ways[1][0]);
    expect(await pasted(page)).toBe(ways[1][1]);
  });

  test('where nothing may be copied, as a file', async () => {
    const page = await openReport(run);
    await page.evaluate(() => {
      Object.defineProperty(navigator, 'clipboard', { value: undefined });
      document.execCommand = () => false;
    });
    const waiting = page.waitForEvent('download');
    await section(page).getByRole('button', { name: ways[2][0] }).click();
    const download = await waiting;
    expect(download.suggestedFilename()).toBe('numbers.tex');
    expect(await readFile((await download.path())!, 'utf8')).toBe(ways[2][1]);
    expect(await status(page)).toBe('Saved as numbers.tex');
  });

  test('unfolded on a dark phone: axe finds nothing, and nothing scrolls sideways', async () => {
    const page = await openReport(run, phone);
    await section(page).locator('summary').tap();
    await section(page).getByRole('button', { name: ways[0][0] }).tap();
    await page.evaluate(await readFile(axePath, 'utf8'));
    const violations = await page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: { run(options: object): Promise<{ violations: { id: string }[] }> };
      };
      const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
      return found.violations.map(({ id }) => id);
    });
    expect(violations).toEqual([]);
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});
