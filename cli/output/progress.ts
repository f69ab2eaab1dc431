/** How far a long computation is, on standard error: something is said before anyone wonders whether it still runs. */
import type { Io } from '../io.ts';
import { printable } from './text.ts';

export interface Progress {
  /** A part is done: said on a terminal. */
  milestone(text: string): void;
  /** To be called often: said where nothing was for ten seconds, terminal or not. */
  beat(text: () => string): void;
}

/** Between two lines, ms. */
const silence = 10_000;

/** `quiet` says nothing at all. The clock is the Io's: a beat costs one look at it. */
export function progressOf(
  { stderr, stderrIsTTY, now }: Pick<Io, 'stderr' | 'stderrIsTTY' | 'now'>,
  quiet = false,
): Progress {
  if (quiet) return { milestone: () => undefined, beat: () => undefined };
  let last = now();
  const say = (text: string) => {
    stderr.write(`${printable(text)}\n`);
    last = now();
  };
  return {
    milestone(text) {
      if (stderrIsTTY) say(text);
    },
    beat(text) {
      if (now() - last >= silence) say(text());
    },
  };
}
