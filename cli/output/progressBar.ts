/** How far a table of rows has come, how fast, and how long it will take: a bar on a terminal, a line every ten seconds elsewhere. */
import type { Io } from '../io.ts';
import type { Phase } from './phases.ts';
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
  /** Where this table is one of several. */
  readonly phase?: Phase | undefined;
}

type BarIo = Pick<Io, 'stderr' | 'stderrIsTTY' | 'stderrColumns' | 'now'>;

const barWidth = 24;
const leastBarWidth = 8;
const secondsPerDraw = 0.1;
/** A run that ends sooner shows no bar. */
const patience = 0.5;
const eraseLine = '\r\u001b[2K';
/** From when on a rate is worth telling: counted from the first rows, which wait for threads to start; and rows differ. */
const telling = { seconds: 5, rows: 8, surelySeconds: 30 };

export function showProgress({ label, total, already, quiet, phase }: RowProgressOptions, io: BarIo): RowProgress {
  const start = io.now();
  const seconds = () => (io.now() - start) / 1000;
  let rows = already;
  const name = printable(
    phase === undefined || phase.count === 1 ? label : `${label} (${phase.number} of ${phase.count})`,
  );
  const words = () => progressWords(rows, total, (rows - already) / seconds(), phase?.rowsAfter ?? 0);
  const shown = quiet || !io.stderrIsTTY ? null : lineOnTerminal(io, seconds);
  const lines = progressOf(io, quiet || shown !== null);
  let first: { readonly seconds: number; readonly rows: number } | null = null;
  const warn = () => {
    if (quiet || phase === undefined) return;
    const spent = seconds();
    first ??= { seconds: spent, rows };
    const since = rows - first.rows;
    const isKnown = since >= telling.rows;
    if (!(isKnown ? spent > telling.seconds : spent > telling.surelySeconds)) return;
    const rate = isKnown ? since / (spent - first.seconds) : (rows - already) / spent;
    const text = phase.warning(total - rows, rate);
    if (text === null) return;
    shown?.clear();
    io.stderr.write(`${printable(text)}\n`);
  };
  return {
    landed: (more) => {
      rows += more;
      warn();
      shown?.draw(() => barLine(name, rows / total, words(), io.stderrColumns - 1));
      lines.beat(() => `${name}: ${words()}`);
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

/** The bar takes the room that the words leave it, for they are what people look for; a stub of a bar is none. */
function barLine(name: string, share: number, words: string, columns: number): string {
  const width = Math.min(barWidth, columns - name.length - words.length - 4);
  return width < leastBarWidth ? `${name} ${words}` : `${name} ${bar(share, width)} ${words}`;
}

function bar(share: number, width: number): string {
  const full = Math.floor(width * share);
  return `[${'='.repeat(full)}${full < width ? '>' : ''}${' '.repeat(Math.max(0, width - full - 1))}]`;
}

function progressWords(rows: number, total: number, rate: number, rowsAfter: number): string {
  const percent = Math.floor((100 * rows) / total);
  const here = rowsAfter > 0 ? `left here, ${duration((total - rows + rowsAfter) / rate)} in all` : 'left';
  const left = rate > 0 ? `, ${duration((total - rows) / rate)} ${here}` : '';
  return `${percent} %, ${grouped(rows)} of ${grouped(total)}, ${rateWords(rate)}${left}`;
}

/** Two digits where rows are slow: `450/s`, `100/min`, `3.5/min`, `12/h`. */
function rateWords(rate: number): string {
  if (rate >= 10) return `${grouped(Math.round(rate))}/s`;
  const [size, unit] = 60 * rate >= 1 || rate === 0 ? [60 * rate, 'min'] : [3600 * rate, 'h'];
  return `${Number(size.toPrecision(2))}/${unit}`;
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
