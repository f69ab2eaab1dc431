/** `perilag spread`: the uncertain inputs of a scenario drawn many times, as percentiles, as tables, and which of them matters most. */
import { resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { casesDrawn } from '../../sim/scenario/drawn.ts';
import { planSpread, type SpreadSetup } from '../../sim/studies/spread/plan.ts';
import { computeTables } from '../engine/compute.ts';
import { whileListening, whileRowsAreKept } from '../engine/interruption.ts';
import { kinds } from '../engine/kinds.ts';
import type { Shard } from '../engine/plan.ts';
import { requireMemory } from '../engine/room.ts';
import { waitingFolder } from '../engine/table.ts';
import { exitCode } from '../exit.ts';
import { type FigureOptions, type FigureRequest, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { commandLine } from '../output/history.ts';
import { jsonText } from '../output/json.ts';
import { spreadPhases } from '../output/spreadPhases.ts';
import { readSamples } from '../posteriorFile.ts';
import { readScenarioFile, type ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { outputFolder } from './outputFolder.ts';
import type { Program } from './run.ts';
import type { SpreadContext } from './spreadContext.ts';
import { finishSpread, type SpreadTableFiles } from './spreadFiles.ts';
import { heldBySpread, spreadJobs } from './spreadJobs.ts';

export interface SpreadOptions extends FigureOptions {
  readonly draws: number;
  readonly seed?: number;
  readonly workers?: number;
  readonly random?: boolean;
  /** Commander's `--no-indices`. */
  readonly indices: boolean;
  readonly shard?: Shard;
  readonly resume?: boolean;
  readonly out?: string;
  readonly only?: readonly string[];
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** Gives the exit code. Errors: SimError and ScenarioError for the input's faults; Interrupted after a signal. */
export async function spread(file: string, options: SpreadOptions, program: Program, io: Io): Promise<number> {
  const figures = figuresAskedFor(options, io);
  const [item] = onlyCases([readScenarioFile(file, io.cwd)], options.only ?? []);
  const { context, setup } = await whatToDraw(item!, options, program, io);
  const plan = planSpread(setup);
  const out = outputFolder(file, 'spread', options.out);
  const jobs = spreadJobs(plan, context);
  const hasLatitudes = plan.cases.some(({ drawn }) => drawn.model !== 'lumped');
  const phases = spreadPhases(jobs, options.shard ?? null, hasLatitudes);
  if (!options.shard) for (const { job } of jobs) requireMemory('--draws', job, heldBySpread);
  const settled = engineOptions(options, out, program, io);
  const tables = jobs.map((one, i) => ({ ...one, phase: phases[i] }));
  const code = await whileListening(io, settled, async (interruption) => {
    const computed = await computeTables(tables, settled, kinds, io, interruption);
    if (options.shard) return exitCode.done;
    const files = Object.fromEntries(
      jobs.map(({ table }, i) => [table, computed[i]!.files]),
    ) as unknown as SpreadTableFiles;
    const finished = { plan, context, files, settings: jobs[0]!.job.settings, out, item: item! };
    const found = await whileRowsAreKept(settled, interruption, (checkpoint) =>
      finishSpread(finished, options, io, checkpoint),
    );
    for (const one of computed) await one.discardWork();
    return found;
  });
  if (options.shard) {
    if (options.json)
      io.stdout.write(`${jsonText({ shard: options.shard, folder: out, tables: jobs.map(({ table }) => table) })}\n`);
    if (!options.quiet) tellShard(out, options.shard, io);
    return code;
  }
  const figuresCode = await writeFigures([out], figures, options, io);
  return code || figuresCode;
}

/** A part of a spread has no report yet. */
function figuresAskedFor(options: SpreadOptions, io: Io): FigureRequest | null {
  const figures = figureRequest(options, io);
  if (figures === null || !options.shard) return figures;
  throw new SimError('--figures', 'a shard writes no report to draw them from', 'Give it to `perilag gather`');
}

async function whatToDraw(
  item: ScenarioFile,
  { draws, seed, random = false, indices, only }: SpreadOptions,
  { version }: Program,
  io: Io,
): Promise<{ context: SpreadContext; setup: SpreadSetup }> {
  const { scenario, text, file, sha256 } = item;
  const chosen = only && only.length > 0 ? scenario.cases.map(({ name }) => name) : null;
  const samples = await samplesOf(item, chosen, io);
  const sampling = random ? 'random' : 'sobol';
  const settled = { draws, seed: seed ?? seedOf(item), sampling, only: chosen } as const;
  return {
    setup: { text, file, samples, ...settled },
    context: {
      command: 'spread',
      file,
      text,
      sha256,
      version,
      samplesSha256: samples?.sha256 ?? null,
      indices: indices && samples === null,
      ...settled,
    },
  };
}

/** Null where no chosen case draws from the posterior: its inputs are then drawn one by one, as without it. */
async function samplesOf({ scenario, text, file }: ScenarioFile, chosen: readonly string[] | null, io: Io) {
  if (!scenario.posterior) return null;
  const drawn = casesDrawn(text, file, chosen ?? undefined);
  const isUsed = drawn.some(({ inputs }) => inputs.some(({ column }) => column !== null));
  return isUsed ? readSamples(scenario.posterior, file, io.cwd) : null;
}

/** The scenario's own, or 1. Errors: SimError where cases have different ones: all take the same draws. */
function seedOf({ scenario }: ScenarioFile): number {
  const [seed, ...others] = new Set(
    scenario.cases.map(({ inputs }) => inputs.find(({ key }) => key === 'solve.seed')?.value ?? 1),
  );
  if (others.length === 0) return seed!;
  const what = `the cases have different ones (${[seed, ...others].join(', ')}), and all take the same draws`;
  throw new SimError('solve.seed', what, 'Write one for all, or give --seed');
}

function engineOptions(options: SpreadOptions, out: string, program: Program, io: Io) {
  const folder = resolve(io.cwd, out);
  return {
    folder,
    tables: waitingFolder(folder),
    shard: options.shard ?? null,
    resume: options.resume ?? false,
    workers: options.workers ?? null,
    quiet: options.quiet ?? false,
    words: program.words,
  };
}

function tellShard(out: string, { index, count }: Shard, io: Io): void {
  const gather = commandLine(['gather', '...', '-o', 'DIR']);
  io.stderr.write(`shard ${index} of ${count} is in ${out}. When all are there: ${gather}\n`);
}
