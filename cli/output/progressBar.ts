/** How far a table of rows has come, how fast, and how long it will take: a bar on a terminal, a line every ten seconds elsewhere. */
import type { Io } from '../io.ts';
import { progressOf } from './progress.ts';
import { printable } from './text.ts';

export interface RowProgress {
  /** So many more rows are there. */
  landed(rows: number): void;
  /** Takes the bar away: something else is printed now, or all is done. */
  clear(): void;
}

export interface RowProgressOptions {
  readonly label: string;
  readonly total: number;
  /** Rows that an earlier run computed. */
  readonly already: number;
  readonly quiet: boolean;
}

type BarIo = Pick<Io, 'stderr' | 'stderrIsTTY' | 'stderrColumns' | 'now'>;

const barWidth = 24;
const secondsPerDraw = 0.1;
/** A run that ends sooner shows no bar. */
const patience = 0.5;
const eraseLine = '\r\u001b[2K';

export function showProgress({ label, total, already, quiet }: RowProgressOptions, io: BarIo): RowProgress {
  const start = io.now();
  const seconds = () => (io.now() - start) / 1000;
  let rows = already;
  const words = () => progressWords(rows, total, (rows - already) / seconds());
  const shown = quiet || !io.stderrIsTTY ? null : lineOnTerminal(io, seconds);
  const lines = progressOf(io, quiet || shown !== null);
  return {
    landed: (more) => {
      rows += more;
      shown?.draw(() => `${printable(label)} ${bar(rows / total)} ${words()}`);
      lines.beat(() => `${label}: ${words()}`);
    },
    clear: () => shown?.clear(),
  };
}

/** A line that is drawn over itself, not too often. */
function lineOnTerminal({ stderr, stderrColumns }: BarIo, seconds: () => number) {
  let next = patience;
  let drawn = false;
  return {
    draw: (text: () => string) => {
      if (seconds() < next) return;
      next = seconds() + secondsPerDraw;
      drawn = true;
      stderr.write(`${eraseLine}${text().slice(0, stderrColumns - 1)}`);
    },
    clear: () => {
      if (drawn) stderr.write(eraseLine);
      drawn = false;
    },
  };
}

function bar(share: number): string {
  const full = Math.floor(barWidth * share);
  return `[${'='.repeat(full)}${full < barWidth ? '>' : ''}${' '.repeat(Math.max(0, barWidth - full - 1))}]`;
}

function progressWords(rows: number, total: number, rate: number): string {
  const percent = Math.floor((100 * rows) / total);
  const left = rate > 0 ? `, ${duration((total - rows) / rate)} left` : '';
  return `${percent} %, ${grouped(rows)} of ${grouped(total)}, ${rateWords(rate)}${left}`;
}

function rateWords(rate: number): string {
  return rate >= 10 ? `${grouped(Math.round(rate))}/s` : `${(60 * rate).toPrecision(2)}/min`;
}

/** 12,345,678. */
export function grouped(count: number): string {
  return String(count).replace(/\B(?=(\d{3})+$)/g, ',');
}

/** Two figures are enough: `45 s`, `12 min`, `3 h 20 min`, `2 d 5 h`. */
export function duration(seconds: number): string {
  const whole = Math.ceil(seconds);
  if (whole < 100) return `${whole} s`;
  const minutes = Math.ceil(seconds / 60);
  if (minutes < 100) return `${minutes} min`;
  const hours = Math.floor(minutes / 60);
  return hours < 48 ? `${hours} h ${minutes % 60} min` : `${Math.floor(hours / 24)} d ${hours % 24} h`;
}
