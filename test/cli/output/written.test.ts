import { expect, test } from 'vitest';
import { terminalOf } from '../../../cli/output/terminal.ts';
import { writtenText } from '../../../cli/output/written.ts';
import { undisturbed } from '../support.ts';

test('the path stays in one piece on a narrow terminal, the names wrap under each other', () => {
  const io = {
    ...undisturbed,
    stdout: { write: () => undefined },
    stderr: { write: () => undefined },
    isTTY: false,
    columns: 40,
    env: { LANG: 'C.UTF-8' },
    cwd: '/',
    reportTemplate: '',
  };
  const folder = 'a/folder/with/a/name/that/is/longer/than/the/terminal/is/wide/';
  const [report, ...files] = writtenText(folder, ['summary.json', 'series.csv', 'scenario.yaml'], terminalOf(io))
    .trimEnd()
    .split('\n');
  expect(report).toBe(`report  ${folder}report.html`);
  expect(files.join(' ').replace(/\s+/g, ' ')).toBe('files summary.json, series.csv, scenario.yaml beside it');
  expect(files.length).toBeGreaterThan(1);
  expect(files.every((line) => line.length <= 40)).toBe(true);
});
