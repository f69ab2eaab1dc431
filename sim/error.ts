/**
 * The one error a user sees: where (a key, or file:line:column), what was found, how to mend it.
 * The command line prints its message and exits 2; anything else that is thrown is our own fault.
 */
export class SimError extends Error {
  override readonly name: string = 'SimError';
  readonly where: string;
  readonly what: string;
  readonly mend: string;

  constructor(where: string, what: string, mend: string, cause?: unknown) {
    super(`${where}: ${what}. ${sentence(mend)}`, { cause });
    this.where = where;
    this.what = what;
    this.mend = mend;
  }
}

/** A number that no writer may let pass: our own fault, since whatever computed it should have said why there is none. */
export function notAResult(where: string, value: number): Error {
  return new Error(`${where}: ${value} is not a result`);
}

/** Advice as it is printed: a question ends as one. */
export function sentence(mend: string): string {
  return `${mend}${mend.startsWith('Did you mean') ? '?' : '.'}`;
}

/** Throws SimError unless `value` is a finite number above zero. */
export function requirePositive(where: string, value: number, unit: string): void {
  if (!(value > 0 && Number.isFinite(value))) {
    throw new SimError(where, `${value} ${unit} is not above zero`, 'Give a finite number above zero');
  }
}

/** Throws SimError unless `value` is finite and not below zero. */
export function requireNotNegative(where: string, value: number, unit: string): void {
  if (!(value >= 0 && Number.isFinite(value))) {
    throw new SimError(where, `${value} ${unit} is below zero or not finite`, 'Give zero or more');
  }
}
