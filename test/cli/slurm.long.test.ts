/** A spread in four parts on a real Slurm of one node, by the script of the documents: the same bytes as one run. */
import { execFileSync, spawnSync } from 'node:child_process';
import { chmodSync, mkdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { requireTool } from '../support/require.ts';
import { workplace } from './support.ts';

const at = (path: string) => fileURLToPath(new URL(`../../${path}`, import.meta.url));
const program = at('dist/perilag.mjs');
const slurm = at('test/support/slurm.sh');

describe.skipIf(!requireTool('slurm'))('an array of jobs', () => {
  const place = workplace();
  const cluster = place.path('cluster');
  const env = {
    ...process.env,
    SLURM_CONF: place.path('cluster', 'slurm.conf'),
    PATH: `${place.path('bin')}:${process.env.PATH}`,
  };
  const run = (command: string, ...words: string[]) =>
    execFileSync(command, words, { cwd: place.folder, env, encoding: 'utf8' });

  beforeAll(() => {
    chmodSync(place.folder, 0o755); // munge's own user must reach its socket
    execFileSync('bash', [slurm, 'start', cluster], { stdio: ['ignore', 'ignore', 'inherit'], timeout: 100_000 });
    mkdirSync(place.path('bin'));
    place.write('bin/perilag', `#!/bin/bash\nexec ${process.execPath} ${program} "$@"\n`);
    chmodSync(place.path('bin', 'perilag'), 0o755);
    place.write(
      'planet.yaml',
      `title: Corvane b
star: { luminosity: 0.52 ± 0.02 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 ± 0.03 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: { heatCapacity: 1e5 to 1e9 J/m2/K log } }
`,
    );
  });
  afterAll(() => {
    spawnSync('bash', [slurm, 'stop', cluster], { stdio: 'ignore' });
    place.remove();
  });

  test('its parts, gathered, are the bytes of one run; a part that is not there is missed', () => {
    const script = at('docs/spread-array.sh');
    const submitted = run(
      'sbatch',
      '--wait',
      '--parsable',
      '--array=1-4',
      '-o',
      place.path('part-%a.log'),
      script,
      'planet.yaml',
      'parts',
      '--draws',
      '50000',
    );
    expect(submitted).toMatch(/^\d+/);
    const parts = [1, 2, 3, 4].map((part) => `parts/${part}`);
    const incomplete = spawnSync('perilag', ['gather', ...parts.slice(1), '-o', 'less'], {
      cwd: place.folder,
      env,
      encoding: 'utf8',
    });
    expect(incomplete.status).toBe(2);
    expect(incomplete.stderr).toContain('shard 1 of 4');
    run('perilag', 'gather', ...parts, '-o', 'whole', '--quiet');
    run('perilag', 'spread', 'planet.yaml', '-o', 'one', '--draws', '50000', '--quiet');
    for (const table of ['draws.parquet', 'bands.parquet', 'indices.parquet']) {
      expect(readFileSync(place.path('whole', table)).equals(readFileSync(place.path('one', table))), table).toBe(true);
    }
    const spreadOf = (folder: string) => JSON.parse(readFileSync(place.path(folder, 'summary.json'), 'utf8')).spread;
    expect(spreadOf('whole')).toEqual(spreadOf('one'));
  });
});
