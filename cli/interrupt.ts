/** Ctrl-C while files are written: finish nothing, leave nothing half done. Elsewhere the process simply ends. */
import { Interrupted } from './exit.ts';

const stopSignals = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/** Runs `work`, which calls `checkpoint` wherever it may stop; that throws Interrupted once a signal has come. */
export async function interruptible<T>(work: (checkpoint: () => void) => Promise<T>): Promise<T> {
  let stopped = false;
  const stop = () => {
    stopped = true;
  };
  for (const signal of stopSignals) process.on(signal, stop);
  try {
    return await work(() => {
      if (stopped) throw new Interrupted();
    });
  } finally {
    for (const signal of stopSignals) process.off(signal, stop);
  }
}
