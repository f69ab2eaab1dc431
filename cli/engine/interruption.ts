/** The first signal asks a run to come to an end; the second ends the process, as the system has it. */
import type { Signals } from '../io.ts';

export interface Interruption {
  /** Has a signal come? */
  readonly requested: boolean;
  /** No longer listens. */
  off(): void;
}

/** `tell` is called at the first signal. From then on nobody listens, so that the next is not ours to delay. */
export function listen(signals: Signals, tell: () => void): Interruption {
  let requested = false;
  const off = signals.on(() => {
    requested = true;
    off();
    tell();
  });
  return {
    get requested() {
      return requested;
    },
    off,
  };
}
