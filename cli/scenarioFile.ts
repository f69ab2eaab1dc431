/** Reads scenario files from disk: bytes, text, then the Scenario. */
import { createHash } from 'node:crypto';
import { resolve } from 'node:path';
import { readScenario } from '../sim/scenario/read.ts';
import type { Scenario } from '../sim/scenario/types.ts';
import { bytesOf, textOf } from './bytes.ts';

export interface ScenarioFile {
  /** As the user named it. */
  readonly file: string;
  readonly text: string;
  /** Of the file's bytes, hexadecimal. */
  readonly sha256: string;
  readonly scenario: Scenario;
}

/** Errors: SimError when the file cannot be read as text; ScenarioError with every problem in it. */
export function readScenarioFile(file: string, cwd: string): ScenarioFile {
  const bytes = bytesOf(file, resolve(cwd, file), 'a scenario file');
  const text = textOf(bytes, file, 'Save the scenario as plain UTF-8 text');
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  return { file, text, sha256, scenario: readScenario(text, file) };
}

/** All of them. Errors: every fault of every file at once, as an AggregateError where more than one file has some. */
export function readScenarioFiles(files: readonly string[], cwd: string): readonly ScenarioFile[] {
  const read: ScenarioFile[] = [];
  const faults: unknown[] = [];
  for (const file of files) {
    try {
      read.push(readScenarioFile(file, cwd));
    } catch (error) {
      faults.push(error);
    }
  }
  if (faults.length > 0) throw faults.length === 1 ? faults[0] : new AggregateError(faults);
  return read;
}
