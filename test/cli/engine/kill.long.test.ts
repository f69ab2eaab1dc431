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

/** Runs to its end, or is killed so many milliseconds after its start. */
function run(folder: string, workers: number, killAfter: number | null): Promise<number | null> {
  return new Promise((resolve) => {
    const words = ['--import', 'tsx', program, folder, rows, price, String(workers), '--resume'];
    const child = spawn(process.execPath, words, { cwd: root, stdio: 'ignore' });
    const timer = killAfter === null ? undefined : setTimeout(() => child.kill('SIGKILL'), killAfter);
    child.on('close', (code) => {
      clearTimeout(timer);
      resolve(code);
    });
  });
}

/** Whole and half-written files of a folder and the work folder in it. */
function filesIn(folder: string): readonly string[] {
  return existsSync(folder) ? readdirSync(folder, { recursive: true }).map(String) : [];
}

test.each([1, 2])('kill -9 at random moments, %i workers', async (workers) => {
  const home = mkdtempSync(join(tmpdir(), 'perilag-kill-'));
  const [whole, killed] = [join(home, 'whole'), join(home, 'killed')];
  const start = performance.now();
  expect(await run(whole, workers, null)).toBe(0);
  const duration = performance.now() - start;
  let kills = 0;
  let halfWritten = 0;
  for (let round = 0; ; round++) {
    // From the starting of the threads to the writing of the table; on a busy machine later and later, so that it ends.
    const share = 0.2 + 0.8 * hashed(workers, round, 0) + 0.05 * round;
    const code = await run(killed, workers, share * duration);
    if (code === 0) break;
    expect(code).toBeNull();
    kills++;
    if (filesIn(killed).some((name) => name.endsWith('.tmp'))) halfWritten++;
  }
  process.stderr.write(`${workers} workers: killed ${kills} times, ${halfWritten} of them with a file half written\n`);
  expect(kills).toBeGreaterThan(0);
  expect(readdirSync(killed).sort()).toEqual(['draws.parquet', 'failed.csv']);
  for (const name of ['draws.parquet', 'failed.csv'])
    expect(readFileSync(join(killed, name)).equals(readFileSync(join(whole, name))), name).toBe(true);
  rmSync(home, { recursive: true });
});
