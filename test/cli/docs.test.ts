/** What README.md shows is what the program does. */
import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { requireTool, toolPath } from '../support/require.ts';
import { workplace, zonalText } from './support.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
const readme = readFileSync(`${root}README.md`, 'utf8');
const example = readFileSync(`${root}configs/three-inertias.yaml`, 'utf8');
const blockAfter = (mark: string) => new RegExp(`${mark}[^]*?\`\`\`\\w+\\n([^]*?)\`\`\``).exec(readme)![1]!;

test('the table of the tour is printed by the example; the scenario shown gives the same', async () => {
  const place = workplace();
  place.write('example.yaml', example);
  place.write('shown.yaml', blockAfter('the file reads'));
  const shown = blockAfter('the output of: perilag run configs/three-inertias.yaml');
  // The last digits of the accounts are rounding errors; the numbers above them are results.
  const results = (text: string) => text.split('\naccounts')[0];
  expect(results((await place.perilag('run', 'example.yaml')).stdout)).toBe(results(shown));
  expect(results((await place.perilag('run', 'shown.yaml')).stdout)).toBe(results(shown));
  place.remove();
});

test.skipIf(!requireTool('xarray'))('the lines for xarray give the annual mean at each latitude', async () => {
  const place = workplace();
  place.write('ice-line.yaml', readFileSync(`${root}configs/ice-line.yaml`, 'utf8'));
  await place.perilag('run', 'ice-line.yaml', '--quiet');
  const [load, open, mean] = /( {4}import xarray.*\n)( {4}.*\n)( {4}.*?) *#/
    .exec(readme)!
    .slice(1)
    .map((line) => line.trim());
  const code = `${load}\n${open}\nprint((${mean}).sizes["latitude"], float((${mean}).mean()))`;
  const printed = execFileSync(toolPath('xarray')!, ['-c', code], { cwd: place.folder, encoding: 'utf8' });
  const [bands, found] = printed.trim().split(' ').map(Number);
  const { cases } = JSON.parse(readFileSync(place.path('out/ice-line/summary.json'), 'utf8'));
  expect(bands).toBe(90);
  // Rows stand 720 to the orbit and the finding is an integral: equal to a few parts in a million.
  expect(Math.abs(found! / cases[0].findings.temperatureMean.value - 1)).toBeLessThan(1e-5);
  place.remove();
});

test('every finding, command and option is named', async () => {
  const place = workplace();
  place.write('example.yaml', example);
  place.write('zonal.yaml', zonalText);
  const { stdout } = await place.perilag('run', 'example.yaml', 'zonal.yaml', '--json', '--quiet');
  const findings = JSON.parse(stdout).flatMap((summary: { cases: [{ findings: object }] }) =>
    Object.keys(summary.cases[0].findings).map((name) => name.split('.')[0]!),
  );
  for (const name of findings) expect(readme).toMatch(new RegExp(`\`${name}[\`.]`));
  const commands = [...(await place.perilag('--help')).stdout.matchAll(/^ {2}(\w+) /gm)].map(([, name]) => name!);
  for (const name of commands.filter((word) => word !== 'help')) expect(readme).toContain(`perilag ${name} `);
  const options: string[] = [];
  for (const command of ['run', 'spread', 'grid', 'trace']) {
    const { stdout: help } = await place.perilag(command, '--help');
    options.push(...[...help.matchAll(/--[a-z]+(?:-[a-z]+)?/g)].map(([option]) => option));
  }
  for (const option of options.filter((word) => word !== '--help')) expect(readme).toContain(`\`${option}`);
  expect(findings.length * commands.length * options.length).toBeGreaterThan(0);
  place.remove();
});
