/** What only a real process shows: signals that come as they like, and disks that are full. */
import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';

const program = fileURLToPath(new URL('demoMain.ts', import.meta.url));
const root = fileURLToPath(new URL('../../..', import.meta.url));
let home = '';
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'perilag-process-'));
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

const words = (...rest: string[]) => ['--import', 'tsx', program, ...rest];

interface Ended {
  readonly code: number | null;
  readonly signal: string | null;
  readonly stderr: string;
}

function begin(...rest: string[]): { readonly child: ChildProcess; readonly ended: Promise<Ended> } {
  const child = spawn(process.execPath, words(...rest), { cwd: root });
  let stderr = '';
  child.stderr.on('data', (data) => {
    stderr += data;
  });
  const ended = new Promise<Ended>((resolve) => child.on('close', (code, signal) => resolve({ code, signal, stderr })));
  return { child, ended };
}

async function until(holds: () => boolean): Promise<void> {
  while (!holds()) await new Promise((resolve) => setTimeout(resolve, 10));
}

const chunks = (folder: string) => {
  const work = join(folder, 'draws.work');
  return existsSync(work) ? readdirSync(work).filter((name) => name.endsWith('.bin')) : [];
};

describe('Ctrl-C', () => {
  test('once: exit 130, nothing but whole chunks, and --resume goes on', async () => {
    const { child, ended } = begin(home, '20000', '200', '2');
    await until(() => chunks(home).length > 6);
    child.kill('SIGINT');
    const { code, stderr } = await ended;
    expect(code).toBe(130);
    expect(stderr).toMatch(
      /Stopping: .*\nInterrupted: [\d,]+ of 20,000 rows are kept in .*draws\.work\. To go on:\n.* --resume\n$/,
    );
    expect(readdirSync(join(home, 'draws.work')).filter((name) => name.endsWith('.tmp'))).toEqual([]);
    const resumed = spawnSync(process.execPath, words(home, '20000', '200', '2', '--resume'), { cwd: root });
    expect({ status: resumed.status, stderr: `${resumed.stderr}` }).toMatchObject({ status: 0 });
    expect(readdirSync(home).sort()).toEqual(['draws.parquet', 'failed.csv']);
  });

  test.each(['1', '2'])('twice: at once, whatever is running (%s workers)', async (workers) => {
    const { child, ended } = begin(home, '400', '500000', workers); // a second or more a row
    await until(() => chunks(home).length > 0);
    await new Promise((resolve) => setTimeout(resolve, 500));
    child.kill('SIGINT');
    await new Promise((resolve) => setTimeout(resolve, 100)); // a hasty hand: the row under way takes longer
    child.kill('SIGINT');
    expect(await ended).toMatchObject({ code: null, signal: 'SIGINT' }); // by the system: no code of ours had to run
  });
});

test('a file that may not grow: exit 2 with the folder’s name; with room it goes on to the same bytes', () => {
  const whole = join(home, 'whole');
  const small = join(home, 'small');
  spawnSync(process.execPath, words(whole, '60000', '0', '1'), { cwd: root });
  const limited = spawnSync(
    'bash',
    ['-c', `ulimit -f 400; exec "$0" "$@"`, process.execPath, ...words(small, '60000', '0', '1')],
    {
      cwd: root,
      encoding: 'utf8',
    },
  );
  expect({ status: limited.status, stderr: limited.stderr }).toMatchObject({ status: 2 });
  expect(limited.stderr).toMatch(
    /small\/draws\.work: a file would be larger than allowed here\. What is finished stays there\. When this is mended, go on: .* --resume\.\n$/,
  );
  expect(chunks(small).length).toBeGreaterThan(3);
  expect(readdirSync(join(small, 'draws.work')).filter((name) => name.endsWith('.tmp'))).toEqual([]);
  const resumed = spawnSync(process.execPath, words(small, '60000', '0', '1', '--resume'), { cwd: root });
  expect(resumed.status).toBe(0);
  for (const name of ['draws.parquet', 'failed.csv'])
    expect(readFileSync(join(small, name)).equals(readFileSync(join(whole, name))), name).toBe(true);
});

/** A disk of so many MB, where this user may mount one. */
function smallDisk(size: number): string | null {
  const folder = join(home, 'disk');
  mkdirSync(folder);
  return spawnSync('mount', ['-t', 'tmpfs', '-o', `size=${size}m`, 'tmpfs', folder]).status === 0 ? folder : null;
}

test('a disk too small for the rows: told before they are computed', (context) => {
  const disk = smallDisk(1);
  if (disk === null) return context.skip('no right to mount a small disk here');
  try {
    const full = spawnSync(process.execPath, words(disk, '60000', '0', '1'), { cwd: root, encoding: 'utf8' });
    expect(full.status).toBe(2);
    expect(full.stderr).toMatch(
      /disk: 60,000 rows take 1\.92 MB of disk while they are computed, and 1\.05 MB are free there\. Make room,/,
    );
    expect(readdirSync(disk)).toEqual([]);
  } finally {
    spawnSync('umount', [disk]);
  }
});

test('a disk that is full: warned of, exit 2, what was finished stays', (context) => {
  const disk = smallDisk(3);
  if (disk === null) return context.skip('no right to mount a small disk here');
  try {
    const full = spawnSync(process.execPath, words(disk, '60000', '0', '1'), { cwd: root, encoding: 'utf8' });
    expect(full.status).toBe(2);
    expect(full.stderr).toMatch(
      /^warning: .*disk: rows and table together may take 3\.84 MB, and 3\.15 MB are free there\n/,
    );
    expect(full.stderr).toContain('draws.work: the disk is full. What is finished stays there.');
    expect(chunks(disk).length).toBeGreaterThan(3);
  } finally {
    spawnSync('umount', [disk]);
  }
});
