/** The first signal asks a command to come to an end; the second ends the process, as the system has it. */
import { Interrupted } from '../exit.ts';
import type { Io } from '../io.ts';
import { commandLine } from '../output/history.ts';

export interface Interruption {
  /** Has a signal come? */
  readonly requested: boolean;
}

type ListeningIo = Pick<Io, 'signals' | 'stderr' | 'stderrIsTTY'>;

/**
 * Calls `work`, the whole of a command that keeps what it has done, and listens meanwhile. From the first signal on, which is
 * answered at once, nobody listens, so that the next is not ours to delay.
 */
export async function whileListening<T>(
  { signals, stderr, stderrIsTTY }: ListeningIo,
  { quiet }: { readonly quiet: boolean },
  work: (interruption: Interruption) => Promise<T>,
): Promise<T> {
  let requested = false;
  const off = signals.on(() => {
    requested = true;
    off();
    const line = stderrIsTTY ? '\n' : '';
    if (!quiet) stderr.write(`${line}Stopping: what is running is finished first. Another signal stops it at once.\n`);
  });
  try {
    return await work({
      get requested() {
        return requested;
      },
    });
  } finally {
    off();
  }
}

/**
 * Calls `work`, which makes the other files of a command whose tables are there, and calls `checkpoint` where it may stop.
 * Errors: Interrupted after a signal, saying where the rows are and how to go on; what `work` throws.
 */
export async function whileRowsAreKept<T>(
  { folder, words }: { readonly folder: string; readonly words: readonly string[] },
  interruption: Interruption,
  work: (checkpoint: () => void) => Promise<T>,
): Promise<T> {
  const checkpoint = () => {
    if (interruption.requested) throw new Interrupted();
  };
  try {
    checkpoint();
    return await work(checkpoint);
  } catch (error) {
    if (!(error instanceof Interrupted)) throw error;
    throw new Interrupted(`Interrupted: all rows are kept in ${folder}. To go on:\n  ${resumeLine(words)}`);
  }
}

/** The command line that goes on. */
export function resumeLine(words: readonly string[]): string {
  return commandLine(words.includes('--resume') ? words : [...words, '--resume']);
}
