/** Progress on standard error, by a clock that the test winds. */
import { expect, test } from 'vitest';
import { progressOf } from '../../../cli/output/progress.ts';

function told(stderrIsTTY: boolean, quiet = false) {
  const lines: string[] = [];
  const clock = { ms: 5_000_000 };
  const stderr = { write: (text: string) => lines.push(text) };
  return { lines, clock, progress: progressOf({ stderr, stderrIsTTY, now: () => clock.ms }, quiet) };
}

test.each([true, false])('a beat is said when nothing was for ten seconds; a terminal: %s', (isTTY) => {
  const { lines, clock, progress } = told(isTTY);
  for (let second = 0; second <= 30; second++) {
    clock.ms = 5_000_000 + 1000 * second;
    progress.beat(() => `at ${second} s`);
  }
  expect(lines).toEqual(['at 10 s\n', 'at 20 s\n', 'at 30 s\n']);
});

test('a milestone is said on a terminal, and puts off the next beat', () => {
  const { lines, clock, progress } = told(true);
  clock.ms += 9000;
  progress.milestone('branch 1');
  clock.ms += 9000;
  progress.beat(() => 'too soon');
  clock.ms += 1000;
  progress.beat(() => 'on');
  expect(lines).toEqual(['branch 1\n', 'on\n']);
});

test('without a terminal milestones stay unsaid, and a beat is due as if they were not', () => {
  const { lines, clock, progress } = told(false);
  clock.ms += 9000;
  progress.milestone('branch 1');
  clock.ms += 1000;
  progress.beat(() => 'on');
  expect(lines).toEqual(['on\n']);
});

test('quiet: nothing at all', () => {
  const { lines, clock, progress } = told(true, true);
  clock.ms += 60_000;
  progress.beat(() => 'on');
  progress.milestone('branch 1');
  expect(lines).toEqual([]);
});
