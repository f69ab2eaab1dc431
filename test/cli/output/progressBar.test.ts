import { describe, expect, test } from 'vitest';
import { duration, grouped, showProgress } from '../../../cli/output/progressBar.ts';

function watched(stderrIsTTY: boolean, options: Partial<Parameters<typeof showProgress>[0]> = {}, stderrColumns = 100) {
  const told = { text: '' };
  const clock = { now: 0 };
  const io = {
    stderr: { write: (text: string) => (told.text += text) },
    stderrIsTTY,
    stderrColumns,
    now: () => clock.now,
  };
  const progress = showProgress({ label: 'draws', total: 100_000, already: 0, quiet: false, ...options }, io);
  const landed = (seconds: number, rows: number) => {
    clock.now = seconds * 1000;
    progress.landed(rows);
  };
  return { told, progress, landed };
}

describe('showProgress', () => {
  test('elsewhere: a line every ten seconds, with rate and time left', () => {
    const { told, landed } = watched(false);
    for (let second = 1; second <= 25; second++) landed(second, 1000);
    expect(told.text).toBe(
      'draws: 10 %, 10,000 of 100,000, 1,000/s, 90 s left\ndraws: 20 %, 20,000 of 100,000, 1,000/s, 80 s left\n',
    );
  });

  test('on a terminal: a bar that stays on its line, and goes when it is done', () => {
    const { told, landed, progress } = watched(true);
    landed(0.2, 1000);
    expect(told.text).toBe('');
    landed(1, 49_000);
    expect(told.text).toBe('\r\u001b[2Kdraws [============>           ] 50 %, 50,000 of 100,000, 50,000/s, 1 s left');
    landed(1.05, 10);
    progress.clear();
    expect(told.text.endsWith('1 s left\r\u001b[2K')).toBe(true);
  });

  test('a narrow terminal gets a shorter line, never a second one', () => {
    const { told, landed } = watched(true, {}, 40);
    landed(1, 50_000);
    expect(told.text.replace('\r\u001b[2K', '')).toHaveLength(39);
  });

  test('rows of an earlier run count as done, not as speed', () => {
    const { told, landed } = watched(false, { already: 60_000 });
    landed(10, 20_000);
    expect(told.text).toBe('draws: 80 %, 80,000 of 100,000, 2,000/s, 10 s left\n');
  });

  test('slow rows are counted by the minute; quiet says nothing', () => {
    const slow = watched(false, { total: 100 });
    slow.landed(20, 10);
    expect(slow.told.text).toBe('draws: 10 %, 10 of 100, 30/min, 3 min left\n');
    const quiet = watched(false, { quiet: true });
    quiet.landed(20, 10);
    expect(quiet.told.text).toBe('');
  });
});

test('numbers of rows and durations, as people read them', () => {
  expect([7, 1234, 12345678].map(grouped)).toEqual(['7', '1,234', '12,345,678']);
  const times = [0.2, 45, 99.5, 150, 5940, 7230, 360000];
  expect(times.map(duration)).toEqual(['1 s', '45 s', '2 min', '3 min', '99 min', '2 h 1 min', '4 d 4 h']);
});
