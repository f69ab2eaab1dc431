/** What the figure of time in windows shows, in words. Pure. */
import { duration, list, percent, type TimeUnit } from '../words/number.ts';
import type { WindowBlock, WindowRow } from './windowShares.ts';

/** One or two sentences about a window. */
export function windowSentence({ window, rows }: WindowBlock, unit: TimeUnit): string {
  const known = rows.filter(({ share }) => share !== null);
  const unknown = rows.filter(({ share }) => share === null);
  return [
    ...(known.length === 0 ? [] : [knownSentence(window.name, known, unit)]),
    ...(unknown.length === 0 ? [] : [`“${window.name}” cannot be told${of(unknown, rows)}: ${unknown[0]!.reason}.`]),
    ...meanSentence(rows),
  ].join(' ');
}

function knownSentence(name: string, rows: readonly WindowRow[], unit: TimeUnit): string {
  if (rows.every(({ share }) => share === 0)) return `Never within “${name}”.`;
  if (rows.length === 1) return `Within “${name}” ${shareWords(rows[0]!, unit)}.`;
  return `Within “${name}”: ${list(rows.map((row) => `${row.name} ${shareWords(row, unit)}`))}.`;
}

function shareWords({ share, whole }: WindowRow, unit: TimeUnit): string {
  if (share === 0) return 'never';
  if (share === 1) return 'all the time';
  return `${percent(share!)} of the time (${duration(share! * whole, unit)})`;
}

function of(some: readonly WindowRow[], all: readonly WindowRow[]): string {
  return some.length === all.length ? '' : ` of ${list(some.map(({ name }) => name))}`;
}

/** The orbit mean is what a slow climate feels. */
function meanSentence(rows: readonly WindowRow[]): string[] {
  const told = rows.filter(({ meanInside }) => meanInside !== null);
  if (told.length === 0) return [];
  const inside = told.filter(({ meanInside }) => meanInside);
  if (inside.length === told.length) return ['Its orbit-mean instellation lies inside.'];
  if (inside.length === 0) return ['Its orbit-mean instellation lies outside.'];
  return [`The orbit-mean instellation lies inside for ${list(inside.map(({ name }) => name))} only.`];
}
