/** One browser and one folder for a file of tests; every page that a test opened must have kept quiet. */
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Browser, BrowserContextOptions, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import type { RunResult } from '../../sim/run.ts';
import { drawn, launch, type OpenReport, openFile, reportFile } from './page.ts';

export interface ReportBench {
  openReport(result: RunResult, options?: BrowserContextOptions): Promise<Page>;
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
    async openText(html) {
      const path = join(folder, `page-${files++}.html`);
      await writeFile(path, html);
      open = await openFile(browser, path);
      return open.page;
    },
  };
}
