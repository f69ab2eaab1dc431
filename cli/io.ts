/** What a command may touch of the process around it. Tests hand in their own. */

export interface Writer {
  write(text: string): unknown;
}

export interface Signals {
  /** Calls the listener when the user, or the system, asks the program to stop; gives what ends the listening. */
  on(listener: () => void): () => void;
}

export interface Io {
  /** The table, or JSON and nothing else. */
  readonly stdout: Writer;
  /** Progress, messages and errors. */
  readonly stderr: Writer;
  /** Is standard output a terminal? */
  readonly isTTY: boolean;
  /** Width of standard output in characters. */
  readonly columns: number;
  readonly env: Readonly<Record<string, string | undefined>>;
  readonly cwd: string;
  /** Is standard error a terminal? And its width in characters. */
  readonly stderrIsTTY: boolean;
  readonly stderrColumns: number;
  /** Milliseconds, from any start, never backwards. */
  readonly now: () => number;
  readonly signals: Signals;
  /** Path of the script that worker threads run. */
  readonly worker: string;
  /** Path of the page that `npm run build` makes, to be filled with results. */
  readonly reportTemplate: string;
}

const defaultColumns = 80;

const stopSignals = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/** The process as it is. A closed pipe (`perilag run … | head`) ends quietly; a full one is an error. */
export function processIo(reportTemplate: string, worker: string): Io {
  process.stdout.on('error', endOfOutput);
  process.stderr.on('error', () => undefined); // nobody is left to tell
  return {
    stdout: process.stdout,
    stderr: process.stderr,
    isTTY: process.stdout.isTTY === true,
    columns: process.stdout.columns || Number(process.env.COLUMNS) || defaultColumns,
    stderrIsTTY: process.stderr.isTTY === true,
    stderrColumns: process.stderr.columns || Number(process.env.COLUMNS) || defaultColumns,
    now: () => performance.now(),
    signals: { on: onStop },
    worker,
    env: process.env,
    cwd: process.cwd(),
    reportTemplate,
  };
}

/** Where nobody listens, a signal ends the process as the system has it. */
function onStop(listener: () => void): () => void {
  for (const signal of stopSignals) process.on(signal, listener);
  return () => {
    for (const signal of stopSignals) process.off(signal, listener);
  };
}

function endOfOutput(error: NodeJS.ErrnoException): void {
  if (error.code === 'EPIPE') process.exit();
  process.stderr.write(`standard output: ${error.message}. Make room for it, or use --quiet.\n`);
  process.exit(2);
}
