import { expect, test } from 'vitest';
import { historyLine } from '../../../cli/output/history.ts';

const now = new Date(Date.UTC(2026, 2, 4, 5, 6, 7, 89));

test('time in UTC, program, and the command line as a shell would take it again', () => {
  expect(historyLine(now, '0.1.0', ['run', 'corvane.yaml', '-o', 'out/a b', "--only=it's"])).toBe(
    "2026-03-04T05:06:07Z: perilag 0.1.0: perilag run corvane.yaml -o 'out/a b' '--only=it'\\''s'",
  );
});

test('is one line that steers no terminal', () => {
  expect(historyLine(now, '0.1.0', ['run', 'a\n\u001b[31m.yaml'])).toBe(
    "2026-03-04T05:06:07Z: perilag 0.1.0: perilag run 'a??[31m.yaml'",
  );
});
