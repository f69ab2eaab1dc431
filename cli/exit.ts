/** Exit codes, and how each kind of error is told. */
import { SimError } from '../sim/error.ts';
import type { Io } from './io.ts';
import { printable } from './output/text.ts';

export const exitCode = { done: 0, ourFault: 1, inputFault: 2, notWithinTolerance: 3, interrupted: 130 } as const;

/** Thrown when the user stops a run; everything temporary is gone by then. The message is what the user is told. */
export class Interrupted extends Error {
  override readonly name = 'Interrupted';

  constructor(message = 'Interrupted: nothing half-written is left.') {
    super(message);
  }
}

/** Tells the error on standard error and gives the exit code that goes with it. A ScenarioError has a line for each problem. */
export function tellError(error: unknown, io: Io): number {
  if (error instanceof AggregateError) return Math.min(...error.errors.map((one) => tellError(one, io)));
  if (error instanceof Interrupted) return tell(io, printable(error.message), exitCode.interrupted);
  if (error instanceof SimError) return tell(io, printable(error.message), exitCode.inputFault);
  const stack = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return tell(io, `${stack}\nThis is a fault of perilag: please report it with the scenario file.`, exitCode.ourFault);
}

function tell(io: Io, text: string, code: number): number {
  io.stderr.write(`${text}\n`);
  return code;
}
