/** The Chromium that draws figures: the one that is named, or the one that is found. */
import { accessSync, constants, statSync } from 'node:fs';
import { delimiter, join, resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import type { Io } from '../io.ts';

const variable = 'PERILAG_BROWSER';
const names = [
  'chromium',
  'chromium-browser',
  'google-chrome',
  'google-chrome-stable',
  'chrome',
  'microsoft-edge',
  'msedge',
];

/** Where installers put them that do not put them on the path. */
const places: Partial<Record<NodeJS.Platform, (env: Io['env']) => readonly string[]>> = {
  darwin: () =>
    ['Chromium', 'Google Chrome', 'Microsoft Edge'].map((name) => `/Applications/${name}.app/Contents/MacOS/${name}`),
  win32: (env) =>
    [env.PROGRAMFILES, env['PROGRAMFILES(X86)'], env.LOCALAPPDATA]
      .filter((folder) => folder !== undefined)
      .flatMap((folder) => [
        join(folder, 'Google/Chrome/Application/chrome.exe'),
        join(folder, 'Chromium/Application/chrome.exe'),
        join(folder, 'Microsoft/Edge/Application/msedge.exe'),
      ]),
};

/** Of `--browser` or $PERILAG_BROWSER; null where neither is given. Errors: SimError where there is no such program. */
export function namedBrowser(option: string | undefined, { env, cwd }: Pick<Io, 'env' | 'cwd'>): string | null {
  const given = option ?? env[variable];
  if (given === undefined || given === '') return null;
  const path = resolve(cwd, given);
  if (isProgram(path)) return path;
  const where = option === undefined ? `$${variable}` : '--browser';
  throw new SimError(where, `there is no program ${given}`, 'Give the path of a Chromium or Chrome, or leave it out');
}

/** Errors: SimError that says what to install. */
export async function findBrowser({ env }: Pick<Io, 'env'>): Promise<string> {
  const onPath = (env.PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  const found = [
    ...names.flatMap((name) =>
      onPath.map((folder) => join(folder, process.platform === 'win32' ? `${name}.exe` : name)),
    ),
    ...(places[process.platform]?.(env) ?? []),
  ].find(isProgram);
  if (found !== undefined) return found;
  const { chromium } = await driver();
  const cached = chromium.executablePath(); // where its own installer would put one
  if (isProgram(cached)) return cached;
  throw new SimError(
    '--figures',
    'no Chromium was found, and it is what draws the figures',
    'Install one (on Debian or Ubuntu `apt-get install chromium`, elsewhere Chromium or Chrome from its makers), or name one with --browser PATH or $PERILAG_BROWSER',
  );
}

/** Loaded only when a browser is needed. Errors: SimError where it was not installed. */
export async function driver(): Promise<typeof import('playwright-core')> {
  try {
    return await import('playwright-core');
  } catch (error) {
    const what = 'the package playwright-core, which drives the browser, is not installed';
    throw new SimError('--figures', what, 'Run `npm ci` where perilag is installed', error);
  }
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return statSync(path).isFile();
  } catch {
    return false;
  }
}
