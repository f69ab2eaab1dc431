/** Two million rows of twenty columns: memory stays flat while they are computed, written and read back. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';

const program = fileURLToPath(new URL('demoMain.ts', import.meta.url));
const root = fileURLToPath(new URL('../../..', import.meta.url));

// A table in memory would be 320 MB, and what is kept beside it as much again; ten million rows have the same peak (234 MB).
test('2,000,000 rows of 20 columns within 300 MiB', () => {
  const folder = mkdtempSync(join(tmpdir(), 'perilag-memory-'));
  const words = ['--import', 'tsx', program, folder, '2000000', '0', '2', '--columns', '20', '--memory'];
  const { status, stdout, stderr } = spawnSync(process.execPath, words, { cwd: root, encoding: 'utf8' });
  rmSync(folder, { recursive: true });
  expect({ status, stderr }).toMatchObject({ status: 0 });
  process.stderr.write(`2,000,000 rows: ${stdout}`);
  const [, megabytes] = /, (\d+) MB at most/.exec(stdout)!;
  expect(Number(megabytes)).toBeLessThan(300);
});
