import { describe, expect, test } from 'vitest';
import { phasesOf } from '../../../cli/output/phases.ts';
import { duration, grouped, showProgress } from '../../../cli/output/progressBar.ts';
import { spreadPhases } from '../../../cli/output/spreadPhases.ts';

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
    const rates = [100 / 60, 9.9, 1 / 60, 1 / 300, 12.4].map((rate) => {
      const one = watched(false, { total: 1e6 });
      one.landed(1000, 1000 * rate);
      return one.told.text.split(', ')[2];
    });
    expect(rates).toEqual(['100/min', '590/min', '1/min', '12/h', '12/s']);
    const quiet = watched(false, { quiet: true });
    quiet.landed(20, 10);
    expect(quiet.told.text).toBe('');
  });
});

describe('tables one after the other', () => {
  const tables = [
    { name: 'draws', rows: 4096 },
    { name: 'bands', rows: 512 },
    { name: 'indices', rows: 24_576 },
  ];
  const phases = () => phasesOf(tables, 'Shorter: fewer --draws.', duration);

  test('a line says which it is, and what is left with those after it', () => {
    const { told, landed } = watched(false, { total: 512, label: 'bands', phase: phases()[1]! });
    landed(0, 0);
    landed(10, 256); // 256 and 24,576 more at 25.6/s
    expect(told.text).toBe(
      'This will take about 17 min more (bands 10 s, indices 16 min). Shorter: fewer --draws. Ctrl-C keeps what is done.\n' +
        'bands (2 of 3): 50 %, 256 of 512, 26/s, 10 s left here, 17 min in all\n',
    );
    const last = watched(false, { total: 100, label: 'indices', phase: phases()[2]! });
    last.landed(10, 50);
    expect(last.told.text).toBe('indices (3 of 3): 50 %, 50 of 100, 300/min, 10 s left\n');
  });

  test('a long run is told once, as soon as a rate is known, and not in the way of the bar', () => {
    const all = phases();
    const { told, landed } = watched(true, { total: 4096, phase: all[0]! }, 80);
    landed(0, 0);
    landed(4, 8); // too soon
    expect(told.text).not.toContain('This will take');
    landed(6, 2); // 10 in 6 s: 29,174 more in 4 h 51.7 min
    const [bar, said, next] = told.text.split('\n').join('\r').split('\r\u001b[2K').slice(1).join('|').split('|');
    expect(bar).toMatch(/^draws \(1 of 3\) 0 %/); // no room for a bar
    expect(said).toBe(
      'This will take about 4 h 52 min more (draws 41 min, bands 6 min, indices 4 h 6 min). Shorter: fewer --draws. Ctrl-C keeps what is done.\r',
    );
    expect(next).toContain('41 min left here, 4 h 52 min in all');
    expect(next!.length).toBeLessThan(80);
    landed(60, 90);
    const later = watched(false, { total: 512, label: 'bands', phase: all[1]! });
    later.landed(60, 10);
    expect((told.text + later.told.text).split('This will take')).toHaveLength(2);
  });

  test('the time until the first rows is not held against the others', () => {
    const late = watched(false, { total: 4096, phase: phases()[0]! });
    late.landed(6, 4);
    late.landed(9, 6); // 6 are too few
    expect(late.told.text).toBe('');
    late.landed(9.5, 1);
    late.landed(9.8, 6); // 13 in 3.8 s: 29,167 more in 2 h 22.1 min
    expect(late.told.text).toMatch(/^This will take about 2 h 23 min more/);
  });

  test('one slow row is enough in the end; short runs and quiet ones are told nothing', () => {
    const slow = watched(false, { total: 4096, phase: phases()[0]! });
    slow.landed(31, 1);
    expect(slow.told.text).toContain('This will take about 10 d');
    const short = watched(false, { total: 4096, phase: phases()[0]! });
    short.landed(9, 1000);
    expect(short.told.text).toBe('');
    const quiet = watched(false, { total: 4096, quiet: true, phase: phases()[0]! });
    quiet.landed(31, 1);
    expect(quiet.told.text).toBe('');
  });

  test('of a spread: rows of the shard, and what makes this one shorter', () => {
    const jobs = [
      { table: 'draws', job: { rows: 6400 } },
      { table: 'indices', job: { rows: 64_000 } },
    ];
    const [draws, indices] = spreadPhases(jobs, { index: 2, count: 64 }, true);
    expect([draws!.rowsAfter, indices!.rowsAfter]).toEqual([1000, 0]);
    expect(draws!.warning(100, 1)).toBe(
      'This will take about 19 min more (draws 2 min, indices 17 min). Shorter: --no-indices, fewer --draws, fewer planet.bands, more --workers, or a smaller --shard on several machines. Ctrl-C keeps what is done.',
    );
    const [alone] = spreadPhases(jobs.slice(0, 1), null, false);
    expect(alone!.warning(6400, 1)).toBe(
      'This will take about 1 h 47 min more. Shorter: fewer --draws, more --workers, or --shard on several machines. Ctrl-C keeps what is done.',
    );
  });
});

test('numbers of rows and durations, as people read them', () => {
  expect([7, 1234, 12345678].map(grouped)).toEqual(['7', '1,234', '12,345,678']);
  const times = [0.2, 45, 99.5, 150, 5940, 7230, 360000];
  expect(times.map(duration)).toEqual(['1 s', '45 s', '2 min', '3 min', '99 min', '2 h 1 min', '4 d 4 h']);
});
