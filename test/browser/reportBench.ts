/** One browser and one folder for a file of tests; every page that a test opened must have kept quiet. */
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { type RunResult, runScenario } from '../../sim/run.ts';
import { readScenario } from '../../sim/scenario/read.ts';
import { drawn, launch, live, type OpenReport, openFile, reportFile } from './page.ts';

export interface ReportBench {
  openReport(result: RunResult, options?: BrowserContextOptions): Promise<Page>;
  /** The report of a scenario as `perilag run` writes it, when its numbers can be moved. `hash` stands behind its address. */
  openLive(text: string, options?: BrowserContextOptions, hash?: string): Promise<Page>;
  openText(html: string): Promise<Page>;
}

/** To be called within `describe`: it brings its own hooks. */
export function reportBench(): ReportBench {
  let browser: Browser;
  let folder: string;
  let open: OpenReport | null = null;
  let files = 0;

  beforeAll(async () => {
    browser = await launch();
    folder = await mkdtemp(join(tmpdir(), 'perilag-report-'));
  });

  afterAll(async () => {
    await browser.close();
    await rm(folder, { recursive: true, force: true });
  });

  afterEach(async () => {
    const complaints = await open?.complaints();
    await open?.close();
    open = null;
    expect(complaints ?? []).toEqual([]);
  });

  return {
    async openReport(result, options = {}) {
      open = await openFile(browser, await reportFile(folder, `report-${files++}`, result), options);
      await drawn(open.page);
      return open.page;
    },
    async openLive(text, options = {}, hash = '') {
      const scenario = readScenario(text, 'x.yaml');
      const result = runScenario(scenario, { sha256: 'f'.repeat(64), version: '0.0.0' });
      const path = await reportFile(folder, `report-${files++}`, result, scenario.tree);
      open = await openFile(browser, path, options, hash);
      await drawn(open.page);
      await live(open.page);
      return open.page;
    },
    async openText(html) {
      const path = join(folder, `page-${files++}.html`);
      await writeFile(path, html);
      open = await openFile(browser, path);
      return open.page;
    },
  };
}
