/** `perilag gather`: the parts of a spread that were computed apart, joined to what one run would have written. */
import { resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { readScenario } from '../../sim/scenario/read.ts';
import { planSpread } from '../../sim/studies/spread/plan.ts';
import { gatherTable } from '../engine/gather.ts';
import { settingsApart } from '../engine/manifest.ts';
import { findStore, tablesIn, workFolder } from '../engine/store.ts';
import { type FigureOptions, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { readSamples } from '../posteriorFile.ts';
import type { ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { requireName } from './outputFolder.ts';
import type { Program } from './run.ts';
import type { SpreadContext } from './spreadContext.ts';
import { finishSpread, type SpreadTableFiles } from './spreadFiles.ts';

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
  const tables = tablesOf(paths[0]!, folders[0]!);
  refuseMixture(paths[0]!, tables, program);
  const out = resolve(io.cwd, options.out);
  const gathered = [];
  for (const table of tables) gathered.push({ table, ...(await gatherTable(paths, table, out)) });
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
  const code = await finishSpread({ plan, context, files, out: options.out, item }, options, io);
  const figuresCode = await writeFigures([options.out], figures, options, io);
  return code || figuresCode;
}

function tablesOf(path: string, named: string): readonly string[] {
  const tables = foundTables(path);
  if (tables.includes('draws')) return tables;
  throw new SimError(named, 'no rows of draws are kept there', 'Name the output folders of the shards');
}

/** The tables of one folder are of one run, and of this program: else what is told of the draws is not what made them. */
function refuseMixture(path: string, tables: readonly string[], { version }: Pick<Program, 'version'>): void {
  const stores = tables.map((table) => findStore(workFolder(path, table))!);
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

function foundTables(path: string): readonly string[] {
  try {
    return tablesIn(path);
  } catch {
    return [];
  }
}

function scenarioOf({ text, file, sha256, only }: SpreadContext): ScenarioFile {
  const item = { file, text, sha256, scenario: readScenario(text, file) };
  return onlyCases([item], only ?? [])[0]!;
}

/** The file of samples must be the one that the shards drew from. */
async function samplesOf({ scenario, file }: ScenarioFile, { samplesSha256 }: SpreadContext, io: Io) {
  if (!scenario.posterior) return null;
  const samples = await readSamples(scenario.posterior, file, io.cwd);
  if (samples.sha256 === samplesSha256) return samples;
  throw new SimError(scenario.posterior.file, 'it is not the file that the shards drew from', 'Put that file back');
}
