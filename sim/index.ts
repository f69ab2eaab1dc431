/** The library's public face: read a scenario, run it, and what comes out. Pure: runs in Node, a browser or a worker. */
export type { Dataset, Variable } from './dataset/dataset.ts';
export { fromPortable, toPortable } from './dataset/portable.ts';
export { SimError } from './error.ts';
export type { Finding, FindingColumn } from './findings/finding.ts';
export { batchOf } from './models/batchOf.ts';
export { models } from './models/index.ts';
export type { Batch, EnergyBalance, Model, Solution, State } from './models/model.ts';
export { type CaseResult, type RunResult, runCase, runScenario } from './run.ts';
export { ScenarioError } from './scenario/problem.ts';
export { readScenario } from './scenario/read.ts';
export type { Problem, Scenario, ScenarioCase } from './scenario/types.ts';
export { type TraceResult, traceClimates } from './studies/trace.ts';
export type { Globe, SolveOptions, Window, World } from './world.ts';
