/** Reads scenario files from disk: bytes, text, then the Scenario. */
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { SimError } from '../sim/error.ts';
import { readScenario } from '../sim/scenario/read.ts';
import type { Scenario } from '../sim/scenario/types.ts';

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
  const bytes = bytesOf(file, cwd);
  const text = textOf(bytes, file);
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

function bytesOf(file: string, cwd: string): Uint8Array {
  try {
    return readFileSync(resolve(cwd, file));
  } catch (error) {
    throw new SimError(file, readingFault(error as NodeJS.ErrnoException), 'Check the path', error);
  }
}

function readingFault(error: NodeJS.ErrnoException): string {
  if (error.code === 'ENOENT') return 'there is no such file';
  if (error.code === 'EISDIR') return 'this is a folder, not a scenario file';
  if (error.code === 'EACCES') return 'the file may not be read';
  return `the file cannot be read (${error.code ?? error.message})`;
}

function textOf(bytes: Uint8Array, file: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    throw new SimError(file, 'this is not UTF-8 text', 'Save the scenario as plain UTF-8 text', error);
  }
}
