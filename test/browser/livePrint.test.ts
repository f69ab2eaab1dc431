/** The live report on paper: what a reader moves stays on the screen, what came of it is printed. */
import type { Locator, Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { requireTool } from '../support/require.ts';
import { chromiumPath } from './page.ts';
import { reportBench } from './reportBench.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const controls =
  'button, input, select, summary, .instrument-column, .controls, .moment-bar, .moment-layer, .tools, .fault:not(:empty)';

const scenario = `
title: Velmora b, on paper
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.4 }
planet: { bondAlbedo: 0.3 }
cases:
  sea: { planet: { heatStore: { mixedLayer: 20 m } } }
  rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }
`;

const visible = (found: Locator): Promise<string[]> =>
  found.evaluateAll((all) =>
    all
      .filter((one) => one.checkVisibility() && one.getClientRects().length > 0)
      .map((one) => one.outerHTML.slice(0, 80)),
  );

async function move(page: Page, label: string, value: string): Promise<void> {
  await page.getByRole('textbox', { name: label, exact: true }).fill(value);
  await page.keyboard.press('Enter');
  await expect.poll(() => page.locator('.moves').count()).toBe(1);
}

describe.skipIf(!hasBrowser)('the live report on paper', () => {
  const { openLive } = reportBench();

  test.each(['light', 'dark'] as const)(
    'prints from a %s screen what was moved, without what moves it',
    async (colorScheme) => {
      const page = await openLive(scenario, { colorScheme });
      expect((await visible(page.locator(controls))).length).toBeGreaterThan(20);
      await move(page, 'Eccentricity', '0.3');
      await page.locator('#moment').fill('300');
      await page.emulateMedia({ media: 'print', colorScheme });
      await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
      expect(await visible(page.locator(controls))).toEqual([]);
      const widths = () =>
        page.locator('.plot').evaluateAll((plots) => plots.map((plot) => plot.querySelector('svg')!.clientWidth));
      const figures = page.locator('.plot');
      await expect.poll(widths).toEqual(Array(await figures.count()).fill(680));
      for (const figure of await figures.all()) {
        expect(await figure.isVisible()).toBe(true);
        expect(await figure.locator('.main-svg path').count()).toBeGreaterThan(0);
      }
      const moves = page.locator('.moves');
      expect(await moves.isVisible()).toBe(true);
      expect(await moves.textContent()).toMatch(/Eccentricity 0\.4 → 0\.3/);
      const colours = await page.evaluate(() => {
        const { color, backgroundColor } = getComputedStyle(document.documentElement);
        return [color, backgroundColor];
      });
      expect(colours).toEqual(['rgb(28, 32, 36)', 'rgb(255, 255, 255)']);
    },
  );

  test('is a file of several pages, A4 or Letter', async () => {
    const page = await openLive(scenario);
    await move(page, 'Eccentricity', '0.3');
    for (const format of ['A4', 'Letter']) {
      const pdf = (await page.pdf({ format, printBackground: true })).toString('latin1');
      expect(pdf.startsWith('%PDF-')).toBe(true);
      const pages = [...pdf.matchAll(/\/Type\s*\/Page\b(?!s)/g)].length;
      expect(pages).toBeGreaterThan(3);
      expect(pages).toBeLessThan(20);
    }
  });
});
