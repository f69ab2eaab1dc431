/**
 * How fast the built report answers, and what it weighs, in Chromium on this machine:
 *
 *   npm run build && node --import tsx test/bench/reaction.ts           everything
 *   node --import tsx test/bench/reaction.ts zonal                      only subjects with this word in their name
 *
 * From the last movement of a slider to the new sentence, and to the figures in view drawn anew; from opening to the first
 * figure; gzipped sizes. The machine's load stands beside: on a busy one the times mean little. Never a test.
 */
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { loadavg, tmpdir } from 'node:os';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import type { Browser, Page } from 'playwright-core';
import { runScenario } from '../../sim/run.ts';
import { readScenario } from '../../sim/scenario/read.ts';
import { builtPage, launch, live, openFile, reportFile } from '../browser/page.ts';
import { firstFigureTime, type Reaction, reactionTimes, watchWorkers } from './reactionInPage.ts';
import { median } from './timing.ts';

const print = (line: string) => process.stdout.write(`${line}\n`);
const configs = new URL('../../configs/', import.meta.url);
const movements = 20;
const openings = 3;

const oneCase = `
title: One lumped case
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.6 au, eccentricity: 0.4 }
planet: { bondAlbedo: 0.3, heatStore: { mixedLayer: 20 m } }
`;
const ninetyBands = `
title: Ninety bands
model: zonal
star: { luminosity: 0.85 Lsun, mass: 0.94 Msun }
orbit: { instellation: 1 S0, eccentricity: 0.25 }
planet:
  bondAlbedo: 0.3
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 10 m }
  heatTransport: 0.6 W/m2/K
  obliquity: 23 deg
  rotationPeriod: 26 h
  solarLongitudeOfPeriapsis: 90 deg
  bands: 90
`;

interface Subject {
  readonly name: string;
  readonly text: string;
}

async function subjects(): Promise<readonly Subject[]> {
  const first = await readFile(new URL('three-inertias.yaml', configs), 'utf8');
  return [
    { name: 'three lumped cases (configs/three-inertias.yaml)', text: first },
    { name: 'one lumped case', text: oneCase },
    { name: 'one zonal case, 90 bands', text: ninetyBands },
  ];
}

async function written(folder: string, name: string, text: string): Promise<string> {
  const scenario = readScenario(text, `${name}.yaml`);
  const result = runScenario(scenario, { sha256: 'f'.repeat(64), version: '0.0.0' });
  return reportFile(folder, name, result, scenario.tree);
}

function load(): string {
  return `load ${loadavg()[0]!.toFixed(1)}`;
}

function spread(times: readonly number[]): string {
  return `${median(times).toFixed(0)} ms median, ${Math.max(...times).toFixed(0)} ms at most`;
}

async function measure(browser: Browser, { name, text }: Subject, folder: string): Promise<void> {
  print(`\n${name}`);
  const file = await written(folder, name.replaceAll(/\W+/g, '-'), text);
  const opened: number[] = [];
  for (let i = 0; i < openings; i++) {
    const { page, close } = await openFile(browser, file);
    opened.push(await page.evaluate(firstFigureTime));
    await close();
  }
  print(`  opening to the first figure      ${spread(opened)} (${openings} openings, ${load()})`);
  const { page, close } = await openFile(browser, file);
  await page.addInitScript('globalThis.__name = (made) => made'); // tsx writes it around functions
  await page.addInitScript(watchWorkers);
  await page.reload();
  await live(page);
  await page.locator('.plot').first().scrollIntoViewIfNeeded();
  const busy = await threadTime(page);
  const reactions = await page.evaluate(reactionTimes, { key: 'planet.bondAlbedo', movements });
  const ownTime = ((await busy()) / movements).toFixed(0);
  await close();
  const of = (part: keyof Reaction) => spread(reactions.map((one) => one[part]));
  print(`  movement to the sentence         ${of('sentence')} (${movements} movements, ${load()})`);
  print(`  movement to the figures in view  ${of('figures')}`);
  print(`    solved in the worker           ${of('solved')}`);
  print(`    its answer at hand in the page ${of('arrived')}`);
  print(`    the page's own thread          ${ownTime} ms of CPU time a movement`);
}

/** CPU time of the page's main thread since now, ms: says the same on a busy machine. */
async function threadTime(page: Page): Promise<() => Promise<number>> {
  const devtools = await page.context().newCDPSession(page);
  await devtools.send('Performance.enable', { timeDomain: 'threadTicks' });
  const spent = async () => {
    const { metrics } = await devtools.send('Performance.getMetrics');
    return 1000 * metrics.find(({ name }) => name === 'TaskDuration')!.value;
  };
  const before = await spent();
  return async () => (await spent()) - before;
}

async function weigh(name: string, file: string | URL): Promise<void> {
  const bytes = gzipSync(await readFile(file), { level: 9 }).length;
  print(`  ${name.padEnd(32)} ${(bytes / 1e6).toFixed(3)} MB`);
}

const folder = await mkdtemp(join(tmpdir(), 'perilag-reaction-'));
const browser = await launch();
try {
  const chosen = (await subjects()).filter(({ name }) => name.includes(process.argv[2] ?? ''));
  for (const subject of chosen) await measure(browser, subject, folder);
  print('\nGzipped');
  await weigh('page without data', builtPage);
  for (const name of ['three-inertias', 'ice-line']) {
    const text = await readFile(new URL(`${name}.yaml`, configs), 'utf8');
    await weigh(`configs/${name}.yaml`, await written(folder, name, text));
  }
} finally {
  await browser.close();
  await rm(folder, { recursive: true, force: true });
}
