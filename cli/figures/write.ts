/** Every figure of finished reports as files for a paper: drawn by the page itself, in a browser without a window. */
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Browser } from 'playwright-core';
import { SimError } from '../../sim/error.ts';
import { exitCode, Interrupted, tellError } from '../exit.ts';
import type { Io } from '../io.ts';
import { type OutputFile, writeFolder } from '../output/folder.ts';
import { terminalOf } from '../output/terminal.ts';
import { printable } from '../output/text.ts';
import { driver, findBrowser } from './browser.ts';
import type { FigureFormat, FigureRequest } from './request.ts';

const dpi = 300;
/** A page of some megabytes on a slow machine. */
const patience = 300_000;
const folderName = 'figures';

/**
 * `folders` hold a report each, as the user named them; null asks for nothing. Gives the exit code of this part alone: what went
 * before stands, so the input's faults are told here. Errors: Interrupted after a signal, with the browser closed.
 */
export async function writeFigures(
  folders: readonly string[],
  request: FigureRequest | null,
  { quiet = false }: { readonly quiet?: boolean },
  io: Io,
): Promise<number> {
  if (request === null) return exitCode.done;
  try {
    await inBrowser(request, io, async (browser) => {
      for (const folder of folders) {
        const files = await figuresOf(browser, resolve(io.cwd, folder), request);
        await writeFolder(resolve(io.cwd, folder, folderName), files);
        if (!quiet) tell(join(folder, folderName), files.length / request.formats.length, request, io);
      }
    });
    return exitCode.done;
  } catch (error) {
    if (error instanceof SimError) return tellError(error, io);
    throw error;
  }
}

/** Whatever ends the work, the browser ends with it. */
async function inBrowser(request: FigureRequest, io: Io, work: (browser: Browser) => Promise<void>): Promise<void> {
  const executablePath = request.browser ?? (await findBrowser(io));
  let stopped = false;
  let browser: Browser | null = null;
  let closed: Promise<void> | undefined;
  const off = io.signals.on(() => {
    stopped = true;
    closed = browser?.close();
  });
  try {
    browser = await launched(executablePath);
    if (!stopped) await work(browser);
  } catch (error) {
    if (stopped) throw interrupted();
    if (browser?.isConnected() === false) throw fault(`the browser ${executablePath} ended before its time`, error);
    throw error;
  } finally {
    off();
    await (closed ?? browser?.close());
  }
  if (stopped) throw interrupted();
}

function interrupted(): Interrupted {
  return new Interrupted('Interrupted: the report and its data are written, figures are missing.');
}

async function launched(executablePath: string): Promise<Browser> {
  const { chromium } = await driver();
  try {
    // The signals are ours: the browser is closed by `inBrowser`.
    const signals = { handleSIGINT: false, handleSIGTERM: false, handleSIGHUP: false };
    return await chromium.launch({ executablePath, ...signals, args: ['--disable-gpu'] });
  } catch (error) {
    throw fault(`the browser ${executablePath} did not start`, error);
  }
}

function fault(what: string, cause: unknown): SimError {
  const [reason = ''] = cause instanceof Error ? cause.message.split('\n') : [];
  return new SimError('--figures', `${what} (${reason})`, 'Check that it starts by itself, or name another', cause);
}

async function figuresOf(browser: Browser, folder: string, request: FigureRequest): Promise<OutputFile[]> {
  const context = await browser.newContext({ offline: true, colorScheme: 'light', reducedMotion: 'reduce' });
  try {
    const page = await context.newPage();
    page.setDefaultTimeout(patience);
    const report = join(folder, 'report.html');
    await page.goto(pathToFileURL(report).href);
    const files: OutputFile[] = [];
    for (const format of request.formats) {
      const figures = await page.evaluate(askPage, { format, widthMm: request.widthMm, dpi });
      if (figures === null)
        throw new SimError(report, 'it offers no figures', 'Run `npm run build`, then run it again');
      files.push(...figures.map(({ name, data }, at) => fileOf(name, data, at + 1, format)));
    }
    return files;
  } finally {
    await context.close();
  }
}

interface Asked {
  readonly format: FigureFormat;
  readonly widthMm: number;
  readonly dpi: number;
}

/** Runs in the page: `viewer/report/exportFigures.ts` is what answers. */
async function askPage(asked: Asked): Promise<{ name: string; data: string }[] | null> {
  const { perilagFigures } = globalThis as {
    perilagFigures?: (asked: Asked) => Promise<{ name: string; data: string }[]>;
  };
  return perilagFigures === undefined ? null : perilagFigures(asked);
}

function fileOf(name: string, data: string, number: number, format: FigureFormat): OutputFile {
  return {
    name: `${String(number).padStart(2, '0')}-${safeName(name)}.${format}`,
    pieces: [format === 'svg' ? data : Buffer.from(data, 'base64')],
  };
}

/** Names of windows are in it: nothing may lead out of the folder, and no file system takes more than 255 bytes. */
export function safeName(name: string): string {
  const words = name.replace(/[^\p{L}\p{N}.-]+/gu, '-').replace(/^[-.]+|[-.]+$/g, '');
  return [...words].slice(0, 60).join('') || 'figure';
}

function tell(folder: string, count: number, { formats, widthMm }: FigureRequest, io: Io): void {
  const what = `${count} ${count === 1 ? 'figure' : 'figures'} as ${formats.join(' and ')}, ${Number(widthMm.toFixed(1))} mm wide`;
  io.stderr.write(`figures ${terminalOf(io).say(folder)}: ${printable(what)}\n`);
}
