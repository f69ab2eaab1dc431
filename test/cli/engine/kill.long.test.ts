/** Killed outright at random moments, a run goes on until it is done, to the bytes of one that nobody disturbed. */
import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { hashed } from './demo.ts';

const program = fileURLToPath(new URL('demoMain.ts', import.meta.url));
const root = fileURLToPath(new URL('../../..', import.meta.url));
const rows = '300000';
const price = '20';

/** Whole and half-written files of a folder and the work folder in it. */
function filesIn(folder: string): readonly string[] {
  return existsSync(folder) ? readdirSync(folder, { recursive: true }).map(String) : [];
}

const isChunk = (name: string) => name.endsWith('.bin');
const isTableHalfWritten = (name: string) => /^draws\.parquet\..*\.tmp$/.test(name);

/** Runs to its end, or is killed some milliseconds after `moment` has come. Gives the exit code, null when it was killed. */
function run(folder: string, workers: number, moment: () => boolean, delay: number): Promise<number | null> {
  return new Promise((resolve) => {
    const words = ['--import', 'tsx', program, folder, rows, price, String(workers), '--resume'];
    const child = spawn(process.execPath, words, { cwd: root, stdio: 'ignore' });
    const watch = setInterval(() => {
      if (!moment()) return;
      clearInterval(watch);
      setTimeout(() => child.kill('SIGKILL'), delay);
    }, 1);
    child.on('close', (code) => {
      clearInterval(watch);
      resolve(code);
    });
  });
}

test.each([1, 2])('kill -9 at random moments, %i workers', async (workers) => {
  const home = mkdtempSync(join(tmpdir(), 'perilag-kill-'));
  const [whole, killed] = [join(home, 'whole'), join(home, 'killed')];
  expect(await run(whole, workers, () => false, 0)).toBe(0);
  const counts = { kills: 0, halfChunks: 0, halfTables: 0 };
  for (let round = 0; ; round++) {
    // Later and later: chunks grow from one row in every run.
    const enough = filesIn(killed).filter(isChunk).length + Math.floor((5 + 5 * round) * hashed(workers, round, 0));
    const before = new Set(filesIn(killed)); // with what the last kill left
    const moment = () => {
      const files = filesIn(killed);
      const isWriting = files.some((name) => isTableHalfWritten(name) && !before.has(name));
      return files.filter(isChunk).length > enough || (counts.halfTables < 3 && isWriting);
    };
    const code = await run(killed, workers, moment, 40 * hashed(workers, round, 1));
    if (code === 0) break;
    expect(code).toBeNull();
    counts.kills++;
    if (filesIn(killed).some((name) => name.includes('.bin.'))) counts.halfChunks++;
    if (filesIn(killed).some(isTableHalfWritten)) counts.halfTables++;
  }
  process.stderr.write(`${workers} workers: ${JSON.stringify(counts)}\n`);
  expect(counts.kills).toBeGreaterThan(3);
  expect(readdirSync(killed).sort()).toEqual(['draws.parquet', 'failed.csv']);
  for (const name of ['draws.parquet', 'failed.csv'])
    expect(readFileSync(join(killed, name)).equals(readFileSync(join(whole, name))), name).toBe(true);
  rmSync(home, { recursive: true });
});
