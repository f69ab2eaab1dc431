/** What a command may touch of the process around it. Tests hand in their own. */

export interface Writer {
  write(text: string): unknown;
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
  /** A clock that only runs forwards, ms. */
  readonly now: () => number;
  /** Path of the page that `npm run build` makes, to be filled with results. */
  readonly reportTemplate: string;
}

const defaultColumns = 80;

/** The process as it is. A closed pipe (`perilag run … | head`) ends quietly; a full one is an error. */
export function processIo(reportTemplate: string): Io {
  process.stdout.on('error', endOfOutput);
  process.stderr.on('error', () => undefined); // nobody is left to tell
  return {
    stdout: process.stdout,
    stderr: process.stderr,
    isTTY: process.stdout.isTTY === true,
    columns: process.stdout.columns || Number(process.env.COLUMNS) || defaultColumns,
    env: process.env,
    cwd: process.cwd(),
    now: () => performance.now(),
    reportTemplate,
  };
}

function endOfOutput(error: NodeJS.ErrnoException): void {
  if (error.code === 'EPIPE') process.exit();
  process.stderr.write(`standard output: ${error.message}. Make room for it, or use --quiet.\n`);
  process.exit(2);
}
