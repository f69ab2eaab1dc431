import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import type { BrowserContextOptions, Locator, Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { requireTool } from '../support/require.ts';
import { type PlainCase, plainRun, temperateWindow } from '../viewer/fixture.ts';
import { builtPage, chromiumPath } from './page.ts';
import { reportBench } from './reportBench.ts';

const hasBrowser = chromiumPath() !== null || requireTool('chromium');
const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');

const sea: PlainCase = { name: 'shallow sea', heatCapacity: 8e7 };
const phone: BrowserContextOptions = { viewport: { width: 390, height: 844 }, isMobile: true, hasTouch: true };

interface Drawn {
  readonly _fullData: readonly { readonly type: string; readonly name: string; readonly y: ArrayLike<number> }[];
  readonly layout: { readonly width: number; readonly font: { readonly color: string } };
}

describe.skipIf(!hasBrowser)('the report in Chromium', () => {
  const { openReport, openText } = reportBench();

  test('opens from disk and draws every line with the run’s own numbers', async () => {
    const run = plainRun();
    const page = await openReport(run);
    const lines = await page
      .locator('.plot')
      .first()
      .evaluate((plot) =>
        (plot as unknown as Drawn)._fullData.map(({ type, name, y }) => ({
          type,
          name,
          peak: Math.max(...Array.from(y)),
        })),
      );
    expect(lines.map(({ type }) => type)).toEqual(Array(6).fill('scatter'));
    for (const { name, states } of run.cases) {
      const peak = Math.max(...states[0]!.dataset.variables.temperature!.data);
      expect(lines.find((line) => line.name === name)?.peak).toBe(peak);
    }
    const paths = page.locator('.plot').first().locator('.scatterlayer .trace .lines path');
    expect(await paths.count()).toBe(5);
    for (const path of await paths.all()) expect((await path.getAttribute('d'))!.length).toBeGreaterThan(20);
    expect(await page.locator('.plot .x2axislayer-above text, .plot .x2tick text').count()).toBeGreaterThan(2);
  });

  test('reads from top to bottom: answer, cases, figure, accounts, inputs, method, cautions', async () => {
    const page = await openReport(plainRun());
    const headings = await page.locator('h1, h2').allTextContents();
    expect(headings).toEqual([
      'Corvane b under three ground assumptions',
      'The cases',
      'The two accounts',
      'Numbers',
      'Inputs',
      'How it was computed',
      'What the numbers are not',
    ]);
    expect(await page.title()).toBe(headings[0]);
    expect(await page.locator('.lead').textContent()).toMatch(/^The peak temperature lies between/);
    const order = await page.evaluate(() => {
      const top = (selector: string): number => document.querySelector(selector)!.getBoundingClientRect().top;
      return [top('.lead'), top('.table'), top('.plot')];
    });
    expect(order).toEqual(order.toSorted((a, b) => a - b));
    const text = (await page.locator('main').textContent())!.replaceAll('\u00a0', ' ');
    expect(text).toMatch(/default/);
    expect(text).toMatch(/✓ kept/);
    expect(text).toMatch(/radial-velocity convention/);
    expect(text).toMatch(/no basis for qualifying hardware or for anyone’s safety/);
  });

  test('an account that was not kept is said at the top', async () => {
    const run = plainRun({ cases: [sea] });
    const page = await openReport({
      ...run,
      cases: [{ ...run.cases[0]!, passed: false, warnings: ['The star is near.'] }],
    });
    expect(await page.locator('.notice').allTextContents()).toEqual([
      'Not within tolerance shallow sea: see the accounts below, and do not rely on these numbers.',
      'Caution The star is near.',
    ]);
  });

  test('a run from a start gets a figure of its own', async () => {
    const page = await openReport(plainRun({ cases: [sea, { ...sea, name: 'heated', forward: true }] }));
    const labels = await page
      .locator('.plot')
      .evaluateAll((plots) => plots.map((plot) => plot.getAttribute('aria-label')));
    expect(labels.map((label) => label?.split('.')[0])).toEqual([
      'Temperature through the orbit',
      'The orbit from above, coloured by temperature',
      'The lag loop: temperature against instellation',
      'Time in windows',
      'Damping and lag of every plain lumped world',
      'Temperature after the start',
      'Time in windows after the start',
    ]);
  });

  test.each(['light', 'dark'] as const)('axe finds nothing in the %s scheme', async (colorScheme) => {
    const page = await openReport(plainRun(), { colorScheme });
    await page.evaluate(await readFile(axePath, 'utf8'));
    const violations = await page.evaluate(async () => {
      const { axe } = globalThis as unknown as {
        axe: { run: (options: object) => Promise<{ violations: AxeFinding[] }> };
      };
      const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
      return found.violations.map(
        ({ id, impact, nodes }) => `${id} (${impact}): ${nodes.map(({ target }) => target).join(' ')}`,
      );
    });
    expect(violations).toEqual([]);
  });

  test('figures follow the colour scheme while the page is open', async () => {
    const page = await openReport(plainRun({ cases: [sea] }), { colorScheme: 'light' });
    const ink = () =>
      page
        .locator('.plot')
        .first()
        .evaluate((plot) => (plot as unknown as Drawn).layout.font.color);
    const light = await ink();
    await page.emulateMedia({ colorScheme: 'dark' });
    await expect.poll(ink).not.toBe(light);
  });

  test.each([
    ['phone', phone],
    ['small phone', { ...phone, viewport: { width: 320, height: 640 } }],
    ['tablet', { viewport: { width: 768, height: 1024 } }],
    ['wide screen', { viewport: { width: 1920, height: 1080 } }],
  ])('no sideways scrolling on a %s', async (_, options) => {
    const page = await openReport(plainRun({ title: 'A'.repeat(300) }), options);
    const [content, screen] = await page.evaluate(() => [document.documentElement.scrollWidth, innerWidth]);
    expect(content).toBeLessThanOrEqual(screen!);
    expect(
      await page
        .locator('.plot svg')
        .first()
        .evaluate((svg) => svg.getBoundingClientRect().right),
    ).toBeLessThanOrEqual(screen!);
  });

  test('the figure follows the width of the window', async () => {
    const page = await openReport(plainRun({ cases: [sea] }));
    const width = () =>
      page
        .locator('.plot')
        .first()
        .evaluate((plot) => (plot as unknown as Drawn).layout.width);
    const before = await width();
    await page.setViewportSize({ width: 900, height: 900 });
    await expect.poll(width).toBeLessThan(before);
  });

  test('zooming refines the dates and offers a way back', async () => {
    const page = await openReport(plainRun({ cases: [sea] }));
    const dates = () => page.locator('.plot .x2tick text').allTextContents();
    const before = await dates();
    const back = page.getByRole('button', { name: 'Show all' });
    expect(await back.isVisible()).toBe(false);
    const area = page.locator('.plot .nsewdrag').first();
    await area.scrollIntoViewIfNeeded();
    await drag(page, area);
    await expect.poll(dates).not.toEqual(before);
    expect((await dates()).join()).toMatch(/Mar \d/);
    await back.focus();
    await page.keyboard.press('Enter');
    await expect.poll(dates).toEqual(before);
    await expect.poll(() => back.isVisible()).toBe(false);
    await drag(page, area);
    await expect.poll(dates).not.toEqual(before);
    await area.dblclick();
    await expect.poll(dates).toEqual(before);
  });

  test.each([
    ['svg', /^<svg[^>]* width="1100"/],
    ['png', /^\x89PNG/],
    ['csv', /^series,time_after_periapsis_d,temperature_K\n/],
  ] as const)('saves the figure as %s', async (format, start) => {
    const page = await openReport(plainRun({ cases: [sea] }), { colorScheme: 'dark' });
    const waiting = page.waitForEvent('download');
    await page
      .getByRole('button', { name: `Save ${format.toUpperCase()}` })
      .first()
      .click();
    const download = await waiting;
    expect(download.suggestedFilename()).toBe(`temperature-through-the-orbit.${format}`);
    const content = await readFile((await download.path())!, 'latin1');
    expect(content).toMatch(start);
    if (format !== 'png') expect(content).toContain('shallow sea');
  });

  test('prints in light colours at the width of paper, and returns to the screen', async () => {
    const page = await openReport(plainRun({ cases: [sea] }), { colorScheme: 'dark' });
    const look = () =>
      page
        .locator('.plot')
        .first()
        .evaluate((plot) => {
          const { width, font } = (plot as unknown as Drawn).layout;
          return { width, colour: font.color };
        });
    const screen = await look();
    await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
    await expect.poll(look).toEqual({ width: 680, colour: '#1c2024' });
    await page.evaluate(() => dispatchEvent(new Event('afterprint')));
    await expect.poll(look).toEqual(screen);
  });

  const hostile = [
    '</script><script>document.title="taken"</script>',
    '<img src=x onerror="document.title=\'taken\'">',
    '<!-- <b>bold</b> & $& \u202e',
    '<a href="javascript:document.title=1">x</a>',
    'x'.repeat(10_000),
  ];

  test.each(hostile.map((text) => [text.slice(0, 40), text]))('%s in every name is only text', async (_, text) => {
    const cases = [
      { ...sea, name: text },
      { name: `${text} 2`, heatCapacity: 2e6, coldState: true },
    ];
    const run = plainRun({ title: text, notes: text, cases, windows: [{ ...temperateWindow, name: text }] });
    const page = await openReport({ ...run, cases: run.cases.map((one) => ({ ...one, warnings: [text] })) });
    expect(await page.locator('h1').textContent()).toBe(text);
    expect((await page.title()).length).toBeGreaterThan(1);
    expect(await page.title()).not.toBe('taken');
    expect(await page.locator('img, main script, main a, b b').count()).toBe(0);
    const [content, screen] = await page.evaluate(() => [document.documentElement.scrollWidth, innerWidth]);
    expect(content).toBeLessThanOrEqual(screen!);
  });

  test('a page without a run says so', async () => {
    const page = await openText(await readFile(builtPage, 'utf8'));
    expect(await page.locator('main').textContent()).toBe(
      'No reportThis page holds no run yet. `perilag run` writes a copy of it with the results inside.',
    );
  });

  test('a page with broken data says so', async () => {
    const html = await readFile(builtPage, 'utf8');
    const page = await openText(html.replace('id="perilag-data">', () => 'id="perilag-data">{"result": [1, 2'));
    expect(await page.locator('main').textContent()).toContain('This report is damaged: the data cannot be read.');
  });
});

/** Zooms into a tenth of the width. */
async function drag(page: Page, area: Locator): Promise<void> {
  const box = (await area.boundingBox())!;
  await page.mouse.move(box.x + 0.3 * box.width, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + 0.4 * box.width, box.y + box.height / 2, { steps: 5 });
  await page.mouse.up();
}

interface AxeFinding {
  readonly id: string;
  readonly impact: string;
  readonly nodes: readonly { readonly target: readonly string[] }[];
}
