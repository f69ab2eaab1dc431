/** The live report in Firefox: it opens from disk, draws, computes in a worker, and its numbers are those of the command line. */
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, describe, expect, test } from 'vitest';
import { openSession } from '../../sim/live/session.ts';
import { type RunResult, runScenario } from '../../sim/run.ts';
import { readScenario } from '../../sim/scenario/read.ts';
import { answer } from '../../viewer/words/answer.ts';
import { requireTool } from '../support/require.ts';
import { arrowRight, type FirefoxPage, openInFirefox } from './firefox.ts';
import { reportFile } from './page.ts';

const scenario = `
title: Velmora b, moved
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.4, argumentOfPeriapsis: 105 deg }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
`;
const identity = { sha256: 'f'.repeat(64), version: '0.0.0' };
const plainSpaces = (text: string) => text.replaceAll('\u00a0', ' ');

describe.skipIf(!requireTool('firefox'))('the live report in Firefox', () => {
  let page: FirefoxPage | null = null;
  let folder = '';

  afterEach(async () => {
    await page?.close();
    await rm(folder, { recursive: true, force: true });
  });

  test('opens from disk, draws, and follows a slider with the numbers of the command line', async () => {
    folder = await mkdtemp(join(tmpdir(), 'perilag-report-'));
    const read = readScenario(scenario, 'x.yaml');
    const file = await reportFile(folder, 'report', runScenario(read, identity), read.tree);
    page = await openInFirefox(file);
    const { read: look } = page;
    const state = () => look<object>('({ ...document.body.dataset })');
    await expect.poll(state, { timeout: 40_000 }).toMatchObject({ drawn: 'yes', live: 'yes' });

    const marks = `[...document.querySelectorAll('.plot')].map((plot) =>
      [...plot.querySelectorAll('.main-svg path')].filter((path) => (path.getAttribute('d') ?? '').length > 20).length)`;
    const drawnMarks = await look<number[]>(marks);
    expect(drawnMarks.length).toBeGreaterThan(3);
    for (const count of drawnMarks) expect(count).toBeGreaterThan(0);

    const lead = async () => plainSpaces(await look<string>(`document.querySelector('.lead').textContent`));
    const first = await lead();
    expect(first).toBe(plainSpaces(answer(runScenario(read, identity)).lead));
    await look(`document.getElementById('dial-planet-bondAlbedo').focus()`);
    await page.press(...Array<string>(9).fill(arrowRight));
    await expect.poll(lead).not.toBe(first);
    const text = await look<string>(`document.getElementById('dial-planet-bondAlbedo').getAttribute('aria-valuetext')`);
    const moved = movedRun(text);
    await expect.poll(lead).toBe(plainSpaces(answer(moved).lead));

    const shown = await shownNumber(page, 'temperatureMax');
    const wanted = moved.cases[0]!.states[0]!.findings.find(({ name }) => name === 'temperatureMax')!.value!;
    // other engines round exp and sin differently in the last bit; the solver must not make more of it
    expect(Math.abs(shown / wanted - 1)).toBeLessThan(1e-10);
    expect(page.log).toEqual([]);
  }, 120_000);
});

/** As the command line computes it. */
function movedRun(albedo: string): RunResult {
  const read = readScenario(scenario, 'x.yaml');
  const { name } = read.cases[0]!;
  const { run } = openSession(read.tree, 'x.yaml');
  const cases = run([{ name, from: name, edits: [{ key: 'planet.bondAlbedo', text: albedo }] }]);
  return { ...runScenario({ ...read, cases: [] }, identity), cases };
}

/** SI, with every digit: from what the page copies as CSV. */
async function shownNumber(page: FirefoxPage, finding: string): Promise<number> {
  const csv = await page.read<string>(`new Promise((done) => {
    Object.defineProperty(navigator, 'clipboard', { value: { writeText: async (text) => done(text) } });
    [...document.querySelectorAll('button')].find(({ textContent }) => textContent === 'Copy as CSV').click();
  })`);
  const [head, ...rows] = csv
    .trim()
    .split('\n')
    .map((line) => line.split(','));
  const row = rows.find((cells) => cells.includes(finding));
  return Number(row?.[head!.indexOf('value')]);
}
