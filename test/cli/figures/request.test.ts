import { chmodSync, mkdirSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { findBrowser, namedBrowser } from '../../../cli/figures/browser.ts';
import { figureRequest } from '../../../cli/figures/request.ts';
import { safeName } from '../../../cli/figures/write.ts';
import type { Io } from '../../../cli/io.ts';
import { type Workplace, workplace } from '../support.ts';

let place: Workplace;
const io = (env: Record<string, string> = {}) => ({ env, cwd: place.folder }) as unknown as Io;

beforeAll(() => {
  place = workplace();
  mkdirSync(place.path('bin', 'google-chrome'), { recursive: true }); // a folder is no program
  for (const name of ['chromium-browser', 'plain']) place.write(`bin/${name}`, '');
  chmodSync(place.path('bin/chromium-browser'), 0o755);
});
afterAll(() => place.remove());

describe('figureRequest', () => {
  test('nothing asked for', () => {
    expect(figureRequest({}, io())).toBeNull();
  });

  test('one format or both, in any order and case, once each', () => {
    expect(figureRequest({ figures: 'PNG, svg,png' }, io())).toEqual({
      formats: ['svg', 'png'],
      widthMm: 180,
      browser: null,
    });
  });

  test.each([
    ['90 mm', 90],
    ['9 cm', 90],
    ['0.18 m', 180],
    ['7 in', 177.8],
    ['3.5 inches', 88.9],
  ])('a width of %s is %d mm', (figureWidth, widthMm) => {
    expect(figureRequest({ figures: 'svg', figureWidth }, io())!.widthMm).toBeCloseTo(widthMm, 10);
  });

  test.each([
    [{ figures: 'gif' }, '--figures: `gif` is no format in which figures are written. Write svg, png'],
    [{ figures: 'svg,' }, '--figures: a format is missing'],
    [{ figures: 'svg', figureWidth: '180' }, '--figure-width: `180` has no unit. Write a width'],
    [{ figures: 'svg', figureWidth: '20 kg' }, '--figure-width: '],
    [{ figures: 'svg', figureWidth: '90 ± 5 mm' }, '--figure-width: '],
    [{ figures: 'svg', figureWidth: '1 au' }, '--figure-width: `1 au` is not between 40 mm and 600 mm'],
    [{ figures: 'svg', figureWidth: '1.2.3 in' }, '--figure-width: `1.2.3 in` is not between'],
    [{ figures: 'svg', figureWidth: '-9 cm' }, '--figure-width: '],
    [{ figureWidth: '9 cm' }, '--figure-width: no figures are asked for. Add e.g. `--figures svg,png`'],
    [{ browser: 'chromium' }, '--browser: no figures are asked for'],
    [{ figures: 'svg', browser: 'bin/nothing' }, '--browser: there is no program bin/nothing'],
    [{ figures: 'svg', browser: 'bin/plain' }, '--browser: there is no program bin/plain'],
  ])('%j is refused', (options, message) => {
    expect(() => figureRequest(options, io())).toThrow(message);
  });
});

describe('the browser', () => {
  const program = () => place.path('bin/chromium-browser');

  test('the option comes before the environment', () => {
    expect(namedBrowser('bin/chromium-browser', io({ PERILAG_BROWSER: 'elsewhere' }))).toBe(program());
    expect(namedBrowser(undefined, io({ PERILAG_BROWSER: 'bin/chromium-browser' }))).toBe(program());
    expect(() => namedBrowser(undefined, io({ PERILAG_BROWSER: 'gone' }))).toThrow(
      '$PERILAG_BROWSER: there is no program',
    );
  });

  test('else what is on the path, folders and plain files apart', async () => {
    expect(await findBrowser(io({ PATH: `/nowhere:${place.path('bin')}` }))).toBe(program());
  });
});

describe('safeName', () => {
  test.each([
    ['temperature-through-the-orbit', 'temperature-through-the-orbit'],
    ['what-matters-most-fractionInWindow.../../etc/passwd', 'what-matters-most-fractionInWindow...-..-etc-passwd'],
    ['../..', 'figure'],
    ['.hidden', 'hidden'],
    ['a\0b\nc\\d:e', 'a-b-c-d-e'],
  ])('%j', (name, expected) => {
    expect(safeName(name)).toBe(expected);
    expect(safeName(name)).not.toMatch(/[/\\]|^\./);
  });

  test('no file system finds it too long', () => {
    expect(Buffer.byteLength(`01-${safeName('𝒜'.repeat(1000))}.svg`)).toBeLessThanOrEqual(255);
  });
});
