/** `perilag gather`: the parts of a spread that were computed apart, joined to what one run would have written. */
import { resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { readScenario } from '../../sim/scenario/read.ts';
import { planSpread } from '../../sim/studies/spread/plan.ts';
import { gatherTable, requireStore } from '../engine/gather.ts';
import { whileListening } from '../engine/interruption.ts';
import { settingsApart } from '../engine/manifest.ts';
import { requireMemory } from '../engine/room.ts';
import { tablesIn } from '../engine/store.ts';
import { discardWaiting, waitingFolder } from '../engine/table.ts';
import { Interrupted } from '../exit.ts';
import { type FigureOptions, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { removeEmpty } from '../output/folder.ts';
import { makeFolder } from '../output/makeFolder.ts';
import { readSamples } from '../posteriorFile.ts';
import type { ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { requireName } from './outputFolder.ts';
import type { Program } from './run.ts';
import type { SpreadContext } from './spreadContext.ts';
import { finishSpread, type SpreadTableFiles } from './spreadFiles.ts';
import { heldBySpread, spreadTables } from './spreadJobs.ts';

export interface GatherOptions extends FigureOptions {
  readonly out: string;
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** Gives the exit code. Errors: SimError that names the folders when parts are missing, stand twice, or are of different runs. */
export async function gather(
  folders: readonly string[],
  options: GatherOptions,
  program: Pick<Program, 'version'>,
  io: Io,
): Promise<number> {
  requireName(options.out, 'Name one, e.g. `-o results`');
  const figures = figureRequest(options, io);
  const paths = folders.map((folder) => resolve(io.cwd, folder));
  const tables = tablesOf(paths, folders);
  refuseMixture(paths[0]!, tables, program);
  const jobs = tables.map((table) => requireStore(paths[0]!, table).manifest.job);
  for (const [i, job] of jobs.entries()) requireMemory(tables[i]!, job, heldBySpread);
  const out = resolve(io.cwd, options.out);
  const code = await whileListening(io, { quiet: options.quiet ?? false }, (interruption) =>
    joinAndFinish(paths, tables, out, options, io, () => {
      if (interruption.requested) throw new Interrupted();
    }),
  );
  const figuresCode = await writeFigures([options.out], figures, options, io);
  return code || figuresCode;
}

/** Gives the exit code. */
async function joinAndFinish(
  paths: readonly string[],
  tables: readonly string[],
  out: string,
  options: GatherOptions,
  io: Io,
  checkpoint: () => void,
): Promise<number> {
  const gathered = await whole(out, async () => {
    const found = [];
    for (const table of tables)
      found.push({ table, ...(await gatherTable(paths, table, waitingFolder(out), checkpoint)) });
    return found;
  });
  const context = gathered[0]!.job.context as unknown as SpreadContext;
  const item = scenarioOf(context);
  const plan = planSpread({
    text: context.text,
    file: context.file,
    only: context.only,
    draws: context.draws,
    seed: context.seed,
    sampling: context.sampling,
    samples: await samplesOf(item, context, io),
  });
  const files = Object.fromEntries(
    gathered.map(({ table, files: made }) => [table, made]),
  ) as unknown as SpreadTableFiles;
  const finished = { plan, context, files, settings: gathered[0]!.job.settings, out: options.out, item };
  return finishSpread(finished, options, io, checkpoint);
}

/** Of tables that could not all be joined nothing is left. */
async function whole<T>(out: string, join: () => Promise<T>): Promise<T> {
  const firstMade = await makeFolder(out);
  try {
    return await join();
  } catch (error) {
    await discardWaiting(out);
    if (firstMade !== undefined) await removeEmpty(out, firstMade);
    throw error;
  }
}

/** The tables that all folders have. Errors: SimError where one has others than the first: nothing is left out unsaid. */
function tablesOf(paths: readonly string[], named: readonly string[]): readonly string[] {
  const found = paths.map(foundTables);
  const without = found.findIndex((tables) => !tables.includes('draws'));
  if (without >= 0)
    throw new SimError(named[without]!, 'no rows of draws are kept there', 'Name the output folders of the shards');
  const [first] = found as [readonly string[], ...(readonly string[])[]];
  for (const [i, tables] of found.entries()) {
    const apart = [...new Set([...first, ...tables])].find((table) => first.includes(table) !== tables.includes(table));
    if (apart === undefined) continue;
    const [has, lacks] = first.includes(apart) ? [named[0], named[i]] : [named[i], named[0]];
    const what = `${has} holds rows of ${apart}, ${lacks} holds none: they are parts of different runs`;
    const mend = apart === 'indices' ? ', all of them with --no-indices or none' : '';
    throw new SimError(`${named[0]} and ${named[i]}`, what, `Compute all shards with the same options${mend}`);
  }
  return first;
}

/** The tables of one folder are of one run, and of this program: else what is told of the draws is not what made them. */
function refuseMixture(path: string, tables: readonly string[], { version }: Pick<Program, 'version'>): void {
  const stores = tables.map((table) => requireStore(path, table));
  const { job } = stores[tables.indexOf('draws')]!.manifest;
  for (const { folder, manifest } of stores) {
    const found = settingsApart(job, manifest.job, ['in the draws', 'here']);
    if (found.length === 0) continue;
    const what = `these rows are of another run than the draws beside them (${found.join('; ')})`;
    throw new SimError(folder, what, 'Remove the rows that are not wanted, or compute them again');
  }
  if (job.settings.version === version) return;
  const what = `its rows are of perilag ${job.settings.version}, and this is ${version}`;
  throw new SimError(path, what, 'Gather them with the program that computed them');
}

/** What else is called `*.work` there is none of ours. */
function foundTables(path: string): readonly string[] {
  try {
    const found = tablesIn(path);
    return spreadTables.filter((table) => found.includes(table));
  } catch {
    return [];
  }
}

function scenarioOf({ text, file, sha256, only }: SpreadContext): ScenarioFile {
  const item = { file, text, sha256, scenario: readScenario(text, file) };
  return onlyCases([item], only ?? [])[0]!;
}

/** The file of samples must be the one that the shards drew from; null where they drew from none. */
async function samplesOf({ scenario, file }: ScenarioFile, { samplesSha256 }: SpreadContext, io: Io) {
  if (!scenario.posterior || samplesSha256 === null) return null;
  const samples = await readSamples(scenario.posterior, file, io.cwd);
  if (samples.sha256 === samplesSha256) return samples;
  throw new SimError(scenario.posterior.file, 'it is not the file that the shards drew from', 'Put that file back');
}
