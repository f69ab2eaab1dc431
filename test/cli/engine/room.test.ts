import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { type Held, type Machine, requireDisk, requireMemory } from '../../../cli/engine/room.ts';
import { SimError } from '../../../sim/error.ts';
import { workplace } from '../support.ts';
import { demoJob } from './demo.ts';

const machine: Machine = { memory: 1e9, heap: 2e8, longestText: 5e8 };
const held: Held = { columns: 6, heapANumber: 0, textANumber: 0 };
/** One input and 29 findings. */
const job = (rows: number) => demoJob(rows, { findings: 29 });
const faultOf = (rows: number, changed: Partial<Held & Machine> = {}): string => {
  try {
    requireMemory('--draws', job(rows), { ...held, ...changed }, { ...machine, ...changed });
    return '';
  } catch (error) {
    expect(error).toBeInstanceOf(SimError);
    return (error as Error).message;
  }
};

test('ten million draws fit a gigabyte; a hundred million are refused with what they take', () => {
  expect(faultOf(1e7)).toBe('');
  // 300 MB, 6 columns of 8 bytes, and 1500 bytes for each of 30 columns of 6104 row groups: 5.37 GB
  expect(faultOf(1e8)).toBe(
    '--draws: 100,000,000 rows take about 5.37 GB of memory at the end, and this machine has 1.00 GB. Ask for fewer, or use a larger machine.',
  );
});

test('what V8 keeps itself has a limit of its own, and so has a text', () => {
  expect(faultOf(1e8, { memory: 1e12 })).toMatch(
    /^--draws: what is noted of 100,000,000 rows takes about 275 MB of memory, and Node allows 200 MB\. Ask for fewer, or set NODE_OPTIONS=--max-old-space-size=\d+\.$/,
  );
  expect(faultOf(1e5, { textANumber: 100 })).toBe('');
  expect(faultOf(1e6, { textANumber: 100 })).toContain('make a text longer than Node can hold. Ask for fewer.');
  expect(faultOf(1e6, { columns: Number.POSITIVE_INFINITY, memory: 5e8 })).toContain(
    '1,000,000 rows take about 543 MB',
  );
});

test('a folder that is not there yet is on the disk of the one above it', async () => {
  const home = mkdtempSync(join(tmpdir(), 'perilag-room-'));
  const folder = join(home, 'not', 'yet');
  expect(await requireDisk(folder, [{ missingRows: 10, job: job(10), isTable: true }])).toBeNull();
  const far = { missingRows: 1e15, job: job(1e15), isTable: true };
  await expect(requireDisk(folder, [far])).rejects.toThrow(
    /not\/yet: 1,000,000,000,000,000 rows take 2\.40e\+8 GB of disk while they are computed, and .* are free there\./,
  );
  rmSync(home, { recursive: true });
});

test('spread and grid ask before they compute, and leave nothing', async () => {
  const place = workplace();
  place.write(
    'p.yaml',
    `star: { luminosity: 0.5 to 1.5 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0 }
planet: { bondAlbedo: 0.3, heatStore: { heatCapacity: 1e4 J/m2/K } }
`,
  );
  const spread = await place.perilag('spread', 'p.yaml', '--draws', String(2 ** 31), '-o', 'out');
  expect(spread.code).toBe(2);
  expect(spread.stderr).toMatch(/^--draws: .*2,147,483,648 rows takes? about [\d.]+ GB of memory/);
  place.write(
    'many.yaml',
    `${readFileSync(place.path('p.yaml'), 'utf8')}cases: { ${['a', 'b', 'c', 'd', 'e'].map((name, i) => `${name}: { planet: { heatStore: { heatCapacity: ${i + 1}e5 J/m2/K } } }`).join(', ')} }\n`,
  );
  const along = ['orbit.eccentricity=0 to 0.9', 'planet.bondAlbedo=0 to 0.9'].flatMap((one) => ['--along', one]);
  const grid = await place.perilag('grid', 'many.yaml', ...along, '--steps', '1000', '-o', 'out');
  expect(grid.code).toBe(2);
  expect(grid.stderr).toMatch(/^--steps: .*1,000,000 rows/);
  expect(await place.perilag('grid', 'p.yaml', ...along, '--steps', '3', '-o', 'small')).toMatchObject({ code: 0 });
  place.remove();
});
