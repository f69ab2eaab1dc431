/** The HDF5 library as the built program has it: apart from the bundle, and whole. */
import { execFileSync, spawnSync } from 'node:child_process';
import { copyFileSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { threeCasesText } from '../support.ts';

const dist = (name: string) => fileURLToPath(new URL(`../../../dist/${name}`, import.meta.url));
let home = '';
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'perilag-hdf5-'));
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

test('a run without fields neither holds nor loads it', () => {
  expect(statSync(dist('perilag.cjs')).size).toBeLessThan(2e6); // the library's WebAssembly alone has 3.5 MB
  for (const name of ['perilag.mjs', 'perilag.cjs', 'perilag.v8', 'report.html'])
    copyFileSync(dist(name), join(home, name));
  for (const name of ['hdf5.cjs', 'hdf5.wasm']) writeFileSync(join(home, name), 'throw new Error("loaded")');
  writeFileSync(join(home, 'corvane.yaml'), threeCasesText);
  const { status, stderr } = spawnSync(process.execPath, ['perilag.mjs', 'run', 'corvane.yaml'], { cwd: home });
  expect({ status, stderr: stderr.toString() }).toMatchObject({ status: 0 });
});

test('it works from dist alone', () => {
  for (const name of ['hdf5.cjs', 'hdf5.wasm']) copyFileSync(dist(name), join(home, name));
  const code = `const hdf5 = require('./hdf5.cjs');
    hdf5.ready.then((library) => {
      library.activate_throwing_error_handler();
      const file = new hdf5.File('a.nc', 'w');
      file.create_dataset({ name: 'x', data: Float64Array.of(1, 2, 3), chunks: [3], compression: 'gzip' });
      file.close();
      console.log(new hdf5.File('a.nc', 'r').get('x').value.join());
    });`;
  expect(execFileSync(process.execPath, ['-e', code], { cwd: home, encoding: 'utf8' })).toBe('1,2,3\n');
});

test('its licence is told with the others, and what was changed', () => {
  const licences = readFileSync(dist('LICENSES.txt'), 'utf8');
  const [, own] = /=== h5wasm 0\.10\.3 ===\n([\s\S]*?)\n===/.exec(licences)!;
  expect(own).toContain('NIST-developed software is provided by NIST as a public service.');
  expect(own).toContain('Changed by the build of perilag, since December 2026');
  expect(own).toContain('Copyright 2006 by The HDF Group.');
  expect(licences).toContain('=== zod ');
});
