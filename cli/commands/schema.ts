/** `perilag schema`: the JSON Schema of scenario files, for editors. */
import { scenarioJsonSchema } from '../../sim/scenario/schema/json.ts';
import { exitCode } from '../exit.ts';
import type { Io } from '../io.ts';

export function schemaText(): string {
  return `${JSON.stringify(scenarioJsonSchema(), null, 2)}\n`;
}

/** Prints it. Gives the exit code. */
export function schema(io: Io): number {
  io.stdout.write(schemaText());
  return exitCode.done;
}
