/** A report opened in Chromium from disk, offline, with everything that it should not do written down. */
import { readFile, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { type Browser, type BrowserContextOptions, chromium, type Page } from 'playwright-core';
import { reportPieces } from '../../cli/output/report.ts';
import type { RunResult } from '../../sim/run.ts';
import type { Branch } from '../../sim/scenario/tree.ts';
import { toolPath } from '../support/require.ts';

/** The page that `npm run build` makes. */
export const builtPage = new URL('../../dist/report.html', import.meta.url);

export const chromiumPath = (): string | null => process.env.CHROMIUM ?? toolPath('chromium');

const flags = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking'];

export function launch(): Promise<Browser> {
  return chromium.launch({
    executablePath: chromiumPath()!,
    args: [...flags, '--disable-component-update', '--disable-sync'],
  });
}

export interface OpenReport {
  readonly page: Page;
  /** Console messages, page errors, requests and policy violations; to be empty. */
  readonly complaints: () => Promise<readonly string[]>;
  readonly close: () => Promise<void>;
}

/** Writes a report as the command line does. */
export async function reportFile(
  folder: string,
  name: string,
  result: RunResult,
  tree: Branch | null = null,
): Promise<string> {
  const path = join(folder, `${name}.html`);
  await writeFile(path, reportPieces({ result, tree }, fileURLToPath(builtPage)));
  return path;
}

export async function openFile(
  browser: Browser,
  path: string,
  options: BrowserContextOptions = {},
  hash = '',
): Promise<OpenReport> {
  const context = await browser.newContext({
    offline: true,
    acceptDownloads: true,
    reducedMotion: 'reduce',
    viewport: { width: 1280, height: 900 },
    ...options,
  });
  const page = await context.newPage();
  const heard: string[] = [];
  const file = pathToFileURL(path).href;
  page.on('console', (message) => heard.push(`console ${message.type()}: ${message.text()}`));
  page.on('pageerror', (error) => heard.push(`error: ${error.message}`));
  page.on('dialog', (dialog) => {
    heard.push(`dialog: ${dialog.message()}`);
    void dialog.dismiss();
  });
  page.on('request', (request) => {
    const url = request.url();
    if (url.replace(/#.*/, '') !== file && !/^(data|blob):/.test(url)) heard.push(`request: ${url}`);
  });
  await page.addInitScript(() => {
    const violations: string[] = [];
    addEventListener('securitypolicyviolation', (event) => violations.push(`policy: ${event.violatedDirective}`));
    Object.assign(globalThis, { violations });
  });
  await page.goto(`${file}${hash}`);
  const violations = (): Promise<string[]> =>
    page.evaluate(() => (globalThis as unknown as { violations: string[] }).violations);
  return { page, complaints: async () => [...heard, ...(await violations())], close: () => context.close() };
}

export const drawn = (page: Page): Promise<void> => page.locator('body[data-drawn="yes"]').waitFor({ timeout: 30_000 });

export const live = (page: Page): Promise<void> => page.locator('body[data-live="yes"]').waitFor({ timeout: 30_000 });

const axePath = createRequire(import.meta.url).resolve('axe-core/axe.min.js');

/** What axe finds wrong for those who do not see the page or use no mouse; to be empty. */
export async function axeFindings(page: Page): Promise<readonly string[]> {
  await page.evaluate(await readFile(axePath, 'utf8'));
  return page.evaluate(async () => {
    const { axe } = globalThis as unknown as {
      axe: { run: (options: object) => Promise<{ violations: { id: string; nodes: { target: string[] }[] }[] }> };
    };
    const found = await axe.run({ runOnly: ['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa', 'best-practice'] });
    return found.violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(' ')}`);
  });
}
