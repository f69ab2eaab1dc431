/** The kinds of job that workers know. A new one is a line: its name, and an import of its calculator. */
import type { Kinds } from './job.ts';

export const kinds: Kinds = {
  spreadDraws: async () => (await import('../../sim/studies/spread/calculate.ts')).drawsCalculator,
  spreadBands: async () => (await import('../../sim/studies/spread/calculate.ts')).bandsCalculator,
  gridNodes: async () => (await import('../../sim/studies/grid/calculate.ts')).nodesCalculator,
  spreadIndices: async () => (await import('../../sim/studies/spread/calculate.ts')).indicesCalculator,
};
