/** Killed outright, a run leaves no half-written file under a final name, and the next run tidies up. */
import { spawn } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { threeCasesText, workplace } from './support.ts';

const program = fileURLToPath(new URL('../../dist/perilag.mjs', import.meta.url));
const rounds = 30;

test('kill -9 at many moments: each file that is there is whole', async () => {
  const place = workplace();
  place.write('corvane.yaml', threeCasesText.replace('cases:', 'solve: { samples: 20000 }\ncases:'));
  const run = (folder: string, killAfter: number | null) =>
    new Promise<void>((resolve) => {
      const child = spawn(process.execPath, [program, 'run', 'corvane.yaml', '-o', folder, '--quiet'], {
        cwd: place.folder,
      });
      const timer = killAfter === null ? undefined : setTimeout(() => child.kill('SIGKILL'), killAfter);
      child.on('exit', () => {
        clearTimeout(timer);
        resolve();
      });
    });
  const start = performance.now();
  await run('whole', null);
  const duration = performance.now() - start;
  const sizes = Object.fromEntries(
    readdirSync(place.path('whole')).map((name) => [name, readFileSync(place.path('whole', name)).length]),
  );
  let killedWhileWriting = 0;
  for (let round = 0; round < rounds; round++) {
    await run('killed', duration * (0.5 + (0.6 * round) / rounds));
    const found = existsSync(place.path('killed')) ? readdirSync(place.path('killed')) : [];
    if (found.some((name) => name.startsWith('.'))) killedWhileWriting++;
    for (const name of found.filter((file) => !file.startsWith('.'))) {
      expect(readFileSync(place.path('killed', name)).length, name).toBe(sizes[name]);
    }
  }
  expect(killedWhileWriting).toBeGreaterThan(0);
  await run('killed', null);
  expect(readdirSync(place.path('killed')).sort()).toEqual(Object.keys(sizes).sort());
  place.remove();
});
