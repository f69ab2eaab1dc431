/** A page from disk in Firefox, headless, with a profile of its own. */
import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { toolPath } from '../support/require.ts';
import { type Bidi, connectBidi } from './bidi.ts';

export interface FirefoxPage {
  /** What an expression gives; it must survive as JSON. */
  read<Value>(expression: string): Promise<Value>;
  /** Keys of WebDriver, one after another, to what has the focus. */
  press(...keys: readonly string[]): Promise<void>;
  screenshot(path: string): Promise<void>;
  /** Console messages and page errors so far. */
  readonly log: readonly string[];
  close(): Promise<void>;
}

/** W3C WebDriver, 17.4.2: the code points of keys without a character. */
export const arrowRight = '\uE014';

/** Nothing is asked of the network. */
const preferences = `
user_pref("browser.shell.checkDefaultBrowser", false);
user_pref("datareporting.policy.dataSubmissionEnabled", false);
user_pref("network.captive-portal-service.enabled", false);
user_pref("network.connectivity-service.enabled", false);
user_pref("app.update.enabled", false);
user_pref("ui.prefersReducedMotion", 1);
`;

export async function openInFirefox(path: string, width = 1280, height = 900): Promise<FirefoxPage> {
  const profile = await mkdtemp(join(tmpdir(), 'perilag-firefox-'));
  await writeFile(join(profile, 'user.js'), preferences);
  const browser = spawn(
    toolPath('firefox')!,
    ['--headless', '--no-remote', '--profile', profile, '--remote-debugging-port', '0'],
    { stdio: ['ignore', 'ignore', 'pipe'], env: { ...process.env, HOME: profile } },
  );
  const end = async () => {
    await ended(browser);
    await rm(profile, { recursive: true, force: true, maxRetries: 3 });
  };
  try {
    return await openPage(await addressOf(browser), path, { width, height }, end);
  } catch (error) {
    await end();
    throw error;
  }
}

async function openPage(
  address: string,
  path: string,
  viewport: { readonly width: number; readonly height: number },
  end: () => Promise<void>,
): Promise<FirefoxPage> {
  const log: string[] = [];
  const bidi = connectBidi(`${address}/session`, (method, { level, text }) => {
    if (method === 'log.entryAdded') log.push(`${level}: ${text}`);
  });
  const context = await firstContext(bidi);
  await bidi.send('browsingContext.setViewport', { context, viewport });
  await bidi.send('browsingContext.navigate', { context, url: pathToFileURL(path).href, wait: 'complete' });
  return {
    log,
    async read<Value>(expression: string) {
      const answer = await bidi.send('script.evaluate', {
        expression: `Promise.resolve(${expression}).then((value) => JSON.stringify(value ?? null))`,
        target: { context },
        awaitPromise: true,
      });
      if (answer.type !== 'success') throw new Error(`${expression}: ${JSON.stringify(answer.exceptionDetails)}`);
      return JSON.parse((answer.result as { readonly value: string }).value) as Value;
    },
    async press(...keys) {
      const actions = keys.flatMap((value) => [
        { type: 'keyDown', value },
        { type: 'keyUp', value },
      ]);
      await bidi.send('input.performActions', { context, actions: [{ type: 'key', id: 'keys', actions }] });
    },
    async screenshot(target) {
      const { data } = await bidi.send('browsingContext.captureScreenshot', { context });
      await writeFile(target, Buffer.from(data as string, 'base64'));
    },
    async close() {
      bidi.close();
      await end();
    },
  };
}

async function firstContext(bidi: Bidi): Promise<string> {
  await bidi.send('session.new', { capabilities: {} });
  await bidi.send('session.subscribe', { events: ['log.entryAdded'] });
  const { contexts } = await bidi.send('browsingContext.getTree', {});
  return (contexts as readonly { readonly context: string }[])[0]!.context;
}

/** Firefox says it on its standard error. */
function addressOf(browser: ChildProcess): Promise<string> {
  return new Promise((done, failed) => {
    let said = '';
    browser.on('exit', () => failed(new Error(`Firefox ended: ${said}`)));
    browser.on('error', failed);
    browser.stderr!.on('data', (chunk) => {
      said += String(chunk);
      const [, address] = /WebDriver BiDi listening on (ws:\S+)/.exec(said) ?? [];
      if (address !== undefined) done(address);
    });
  });
}

function ended(browser: ChildProcess): Promise<void> {
  return new Promise((done) => {
    if (browser.exitCode !== null) return done();
    browser.on('exit', () => done());
    browser.kill();
  });
}
