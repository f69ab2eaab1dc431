/** How a file came to be, in one line, as the `history` of NetCDF files tells it. */
import { printable } from './text.ts';

/** `2026-03-04T05:00:00Z: perilag 0.1.0: perilag run corvane.yaml`: time in UTC, program, command line as a shell takes it. */
export function historyLine(now: Date, version: string, words: readonly string[]): string {
  const time = now.toISOString().replace(/\.\d+Z$/, 'Z');
  return printable(`${time}: perilag ${version}: ${commandLine(words)}`.replace(/\n/g, '?'));
}

/** The command with these words, as a shell takes it. */
export function commandLine(words: readonly string[]): string {
  return ['perilag', ...words.map(quoted)].join(' ');
}

/** In single quotes where a shell would read more into it. */
function quoted(word: string): string {
  return /^[\w./:=@%+,-]+$/.test(word) ? word : `'${word.replaceAll("'", "'\\''")}'`;
}
