/** The live report by the keyboard alone: everything can be done, the focus is always seen and never lost. */
import { readFile } from 'node:fs/promises';
import type { BrowserContextOptions, Locator, Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { requireTool } from '../support/require.ts';
import { axeFindings, chromiumPath } from './page.ts';
import { reportBench } from './reportBench.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');

const scenario = `
title: Velmora b, by keys
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.4, argumentOfPeriapsis: 105 deg }
planet: { bondAlbedo: 0.3 }
cases:
  sea: { planet: { heatStore: { mixedLayer: 20 m } } }
  rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }
`;
const screens: readonly (readonly [string, BrowserContextOptions])[] = [
  ['phone', { viewport: { width: 390, height: 844 } }],
  ['wide screen', { viewport: { width: 1600, height: 900 } }],
];
const mostStops = 150;

const slider = (page: Page, label: string): Locator => page.getByRole('slider', { name: label, exact: true });
const field = (page: Page, label: string): Locator => page.getByRole('textbox', { name: label, exact: true });
const button = (page: Page, label: string | RegExp): Locator => page.getByRole('button', { name: label, exact: true });
const select = (page: Page, label: string): Locator => page.getByRole('combobox', { name: label, exact: true });
const moves = async (page: Page): Promise<string> => (await page.locator('.moves').allTextContents()).join();
const lead = (page: Page): Promise<string | null> => page.locator('.lead').textContent();
const hasFocus = (found: Locator): Promise<boolean> => found.evaluate((one) => one === document.activeElement);

/** What is wrong with how the focus is seen; nothing where it is well. */
function focusFault(page: Page): Promise<string | null> {
  return page.evaluate(() => {
    const active = document.activeElement;
    if (active === null || active === document.body) return 'the focus is lost';
    const name = active.outerHTML.slice(0, 90);
    const { outlineStyle, outlineWidth } = getComputedStyle(active);
    if (outlineStyle === 'none' || Number.parseFloat(outlineWidth) < 2) return `no outline: ${name}`;
    const { left, top, width, height } = active.getBoundingClientRect();
    if (width === 0 || height === 0) return `not shown: ${name}`;
    const isSeen = [0.1, 0.3, 0.5, 0.7, 0.9].some((share) => {
      const seen = document.elementFromPoint(left + width / 2, top + share * height);
      return seen !== null && (active.contains(seen) || (seen !== document.body && seen.contains(active)));
    });
    return isSeen ? null : `out of sight: ${name}`;
  });
}

/** By Tab alone, forwards or back. */
async function tabTo(page: Page, target: Locator, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
  for (let stop = 0; stop < mostStops; stop++) {
    await page.keyboard.press(key);
    if ((await page.evaluate(() => document.activeElement?.tagName)) !== 'BODY')
      expect(await focusFault(page)).toBeNull();
    if ((await target.count()) > 0 && (await hasFocus(target))) return;
  }
  throw new Error(`not reached by ${key}: ${target}`);
}

async function choose(page: Page, label: string, key: string, value: string): Promise<void> {
  await tabTo(page, select(page, label));
  await page.keyboard.press(key);
  await expect.poll(() => select(page, label).inputValue()).toBe(value);
  expect(await hasFocus(select(page, label))).toBe(true);
}

async function type(page: Page, label: string, text: string): Promise<void> {
  await page.keyboard.press('Control+A');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
  await expect.poll(() => moves(page)).toContain(`→ ${text}`);
  expect(await hasFocus(field(page, label))).toBe(true);
}

describe.skipIf(!hasBrowser)('the live report by the keyboard alone', () => {
  const { openLive } = reportBench();

  test.each(screens)('moves, goes back, keeps, removes, resets and saves on a %s', async (_, options) => {
    const page = await openLive(scenario, options);
    const atFirst = await lead(page);
    if (!(await slider(page, 'Bond albedo').isVisible())) {
      await tabTo(page, page.locator('.instruments > summary'));
      await page.keyboard.press('Enter');
      await expect.poll(() => slider(page, 'Bond albedo').isVisible()).toBe(true);
    }
    await choose(page, 'Move in', 'ArrowDown', '0');

    // every press counts, however fast they come
    const albedo = slider(page, 'Bond albedo');
    await tabTo(page, albedo);
    const step = Number(await albedo.getAttribute('step'));
    for (let i = 0; i < 9; i++) await page.keyboard.press('ArrowRight');
    expect(Number(await albedo.inputValue())).toBeCloseTo(0.3 + 9 * step, 9);
    await expect.poll(() => moves(page)).toContain(`→ ${(0.3 + 9 * step).toFixed(3)}`);
    expect(await lead(page)).not.toBe(atFirst);

    await tabTo(page, button(page, 'Bond albedo back to 0.3'), 'Shift+Tab');
    await page.keyboard.press('Enter');
    await expect.poll(() => moves(page)).toBe('');
    expect(await hasFocus(albedo)).toBe(true);
    expect(await focusFault(page)).toBeNull();

    await tabTo(page, field(page, 'Bond albedo'), 'Shift+Tab');
    for (const text of ['0.45', '0.5']) {
      await type(page, 'Bond albedo', text);
      await tabTo(page, button(page, 'Keep as a case'), 'Shift+Tab');
      await page.keyboard.press('Enter');
      await expect.poll(() => button(page, `Remove sea, Bond albedo ${text}`).count()).toBe(1);
      expect(await hasFocus(button(page, 'Keep as a case'))).toBe(true);
      await tabTo(page, field(page, 'Bond albedo'));
    }
    await tabTo(page, button(page, 'Remove sea, Bond albedo 0.45'), 'Shift+Tab');
    await page.keyboard.press('Enter');
    expect(await hasFocus(button(page, 'Remove sea, Bond albedo 0.5'))).toBe(true);
    expect(await focusFault(page)).toBeNull();
    await page.keyboard.press('Enter');
    await expect.poll(() => page.locator('.kept-cases li').count()).toBe(0);
    expect(await hasFocus(button(page, 'Keep as a case'))).toBe(true);

    await tabTo(page, field(page, 'Bond albedo'));
    await type(page, 'Bond albedo', '0.2');
    await tabTo(page, button(page, 'Save as scenario'), 'Shift+Tab');
    const waiting = page.waitForEvent('download');
    await page.keyboard.press('Enter');
    expect(await readFile((await (await waiting).path())!, 'utf8')).toMatch(/bondAlbedo: 0\.2/);
    await tabTo(page, button(page, 'Reset all'), 'Shift+Tab');
    await page.keyboard.press('Enter');
    await expect.poll(() => lead(page)).toBe(atFirst);
    expect(await hasFocus(button(page, 'Reset all'))).toBe(true);
    expect(await focusFault(page)).toBeNull();
  });

  test.each(screens)('reads the figures on a %s', async (_, options) => {
    const page = await openLive(scenario, options);
    await choose(page, 'Through the orbit by', 'ArrowDown', 'phase');
    await choose(page, 'Temperatures in', 'ArrowDown', 'degC');
    await choose(page, 'Difference from', 'ArrowDown', 'sea');
    const moment = slider(page, 'Moment');
    await tabTo(page, moment);
    await page.keyboard.press('ArrowRight');
    await expect.poll(() => moment.getAttribute('aria-valuetext')).toMatch(/ after periapsis: sea .*°C/);
    expect(await page.locator('.moment-line, .moment-dot').count()).toBeGreaterThan(0);
    await tabTo(page, button(page, 'No moment'));
    await page.keyboard.press('Enter');
    await expect.poll(() => moment.getAttribute('aria-valuetext')).toBe('no moment');
    expect(await hasFocus(moment)).toBe(true);
    expect(await focusFault(page)).toBeNull();
    await choose(page, 'Case', 'ArrowDown', 'rock');
  });

  test.each(screens)('every stop of Tab is seen on a %s, with the instruments open', async (_, options) => {
    const page = await openLive(scenario, options);
    await page.locator('.instruments').evaluate((drawer) => {
      (drawer as HTMLDetailsElement).open = true;
    });
    const names: string[] = [];
    for (let stop = 0; stop < mostStops; stop++) {
      await page.keyboard.press('Tab');
      if ((await page.evaluate(() => document.activeElement?.tagName)) === 'BODY') break;
      expect(await focusFault(page)).toBeNull();
      names.push(await page.evaluate(() => document.activeElement!.textContent!));
    }
    expect(names.length).toBeLessThan(mostStops);
    expect(names).toEqual(expect.arrayContaining(['Save SVG', 'Copy as LaTeX', 'Every finding']));
  });

  test.each(screens)(
    'axe finds nothing on a %s whose figures are read otherwise, light or dark',
    async (_, options) => {
      for (const colorScheme of ['light', 'dark'] as const) {
        const page = await openLive(
          scenario,
          { ...options, colorScheme },
          '#0.planet.bondAlbedo=0.5&by=phase&in=degC&from=sea',
        );
        await expect.poll(() => moves(page)).toContain('→ 0.5');
        await page.locator('.instruments').evaluate((drawer) => {
          (drawer as HTMLDetailsElement).open = true;
        });
        await page.getByRole('button', { name: 'Keep as a case' }).click();
        await slider(page, 'Moment').fill('300');
        await expect.poll(() => page.locator('.moment-values li').count()).toBeGreaterThan(2);
        expect(await axeFindings(page)).toEqual([]);
      }
    },
  );
});
