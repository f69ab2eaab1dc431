/** The kinds of job that workers know. A new one is a line: its name, and an import of its calculator. */
import type { Kinds } from './job.ts';

export const kinds: Kinds = {};
