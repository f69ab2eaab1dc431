/** What the terminal can show: its width, whether it knows Unicode, whether colour is welcome. */
import { styleText } from 'node:util';
import type { Io } from '../io.ts';
import { printable, toAscii } from './text.ts';

type Format = Parameters<typeof styleText>[0];

export interface Terminal {
  readonly width: number;
  readonly unicode: boolean;
  readonly colour: boolean;
  /** Text as this terminal can show it. */
  say(text: string): string;
  /** Styled where colour is welcome. Apply after padding: styles have no width. */
  paint(format: Format, text: string): string;
}

const narrowest = 40;

export function terminalOf(io: Pick<Io, 'columns' | 'env' | 'isTTY'>): Terminal {
  const unicode = knowsUnicode(io.env);
  const colour = wantsColour(io.env, io.isTTY);
  return {
    width: Math.max(narrowest, Math.floor(io.columns)),
    unicode,
    colour,
    say: (text) => (unicode ? printable(text) : toAscii(printable(text))),
    paint: (format, text) => (colour && text !== '' ? styleText(format, text, { validateStream: false }) : text),
  };
}

/** The locale says UTF-8, and the terminal has the letters: the Linux console has no braille. */
function knowsUnicode(env: Io['env']): boolean {
  if (/^(linux|dumb)$/.test(env.TERM ?? '')) return false;
  if (env.WT_SESSION !== undefined) return true;
  return /utf-?8/i.test(env.LC_ALL || env.LC_CTYPE || env.LANG || '');
}

/** As node:util decides: FORCE_COLOR before NO_COLOR before what the stream is. */
function wantsColour(env: Io['env'], isTTY: boolean): boolean {
  if (env.TERM === 'dumb') return false; // it would show the escapes
  if (env.FORCE_COLOR !== undefined) return !/^(0|false)$/.test(env.FORCE_COLOR);
  if ((env.NO_COLOR ?? '') !== '') return false;
  return isTTY;
}
