/** From the finished tables of a spread to what stands beside them: summary, scenario, report, and the table of the terminal. */
import { basename, resolve } from 'node:path';
import { setImmediate } from 'node:timers/promises';
import { originOf } from '../../sim/origin.ts';
import { runScenario } from '../../sim/run.ts';
import type { SpreadPlan } from '../../sim/studies/spread/plan.ts';
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { summariseSpread } from '../../sim/studies/spread/summariseSpread.ts';
import { clearEarlier } from '../engine/earlier.ts';
import type { Settings } from '../engine/job.ts';
import { discardWaiting, madeBefore, type TableFiles } from '../engine/table.ts';
import { exitCode } from '../exit.ts';
import type { Io } from '../io.ts';
import { writeFolder } from '../output/folder.ts';
import { jsonText } from '../output/json.ts';
import { pagePieces } from '../output/report.ts';
import { scenarioYamlText } from '../output/scenarioYaml.ts';
import { spreadSummary } from '../output/spreadSummary.ts';
import { spreadLines } from '../output/spreadTable.ts';
import { summaryOf } from '../output/summary.ts';
import { terminalOf } from '../output/terminal.ts';
import { printable } from '../output/text.ts';
import { writtenText } from '../output/written.ts';
import { samplesFrom } from '../posteriorFile.ts';
import type { ScenarioFile } from '../scenarioFile.ts';
import type { SpreadContext } from './spreadContext.ts';
import { bandDrawsOf, indexRowsOf, spreadTables } from './spreadJobs.ts';

export interface SpreadTableFiles {
  readonly draws: TableFiles;
  readonly bands?: TableFiles;
  readonly indices?: TableFiles;
}

export interface FinishedSpread {
  readonly plan: SpreadPlan;
  readonly context: SpreadContext;
  readonly files: SpreadTableFiles;
  /** Of the tables: all have the same. */
  readonly settings: Settings;
  /** As the user named it. */
  readonly out: string;
  readonly item: ScenarioFile;
}

/** More failed draws than this share are no longer a few odd ones. */
const tolerableFailures = 0.01;

/** Writes the files and shows the table; gives the exit code. `checkpoint` is called before the first is written, and may throw. */
export async function finishSpread(
  finished: FinishedSpread,
  options: { readonly json?: boolean; readonly quiet?: boolean },
  io: Io,
  checkpoint: () => void,
): Promise<number> {
  const { plan, context, item, out } = finished;
  const report = await reportOf(finished);
  await setImmediate(); // a signal is heard
  checkpoint();
  const folder = resolve(io.cwd, out);
  const run = runScenario(item.scenario, { sha256: context.sha256, version: context.version });
  const summary = { ...summaryOf(run), spread: spreadSummary(report) };
  const own = [
    { name: 'summary.json', pieces: [`${jsonText(summary)}\n`] },
    { name: 'scenario.yaml', pieces: [scenarioYamlText(item.scenario, samplesFrom(folder, item, io.cwd))] },
    { name: 'report.html', pieces: pagePieces({ spread: report }, io.reportTemplate) },
  ];
  await writeFolder(folder, own, madeBefore(folder, tablesOf(finished.files)));
  await discardWaiting(folder);
  await tellEarlier(folder, finished, io);
  if (options.json) io.stdout.write(`${jsonText(summary)}\n`);
  if (!options.quiet) show(report, finished, options.json ?? false, io);
  return tellFailures(report, plan.setup.draws, finished.files.draws, io);
}

async function reportOf({ plan, context, files, item }: FinishedSpread): Promise<SpreadReport> {
  const { openParquet } = await import('../output/parquetReader.ts');
  const open = async (table: TableFiles | undefined) => (table === undefined ? null : openParquet(table.path));
  const [draws, bands, indices] = [
    await openParquet(files.draws.path),
    await open(files.bands),
    await open(files.indices),
  ];
  try {
    return await summariseSpread(plan, originOf({ ...item.scenario, file: item.file }, context), {
      draws: draws.column,
      bands: bands?.column ?? null,
      indices: indices?.column ?? null,
      failed: files.draws.failed,
      bandDraws: bandDrawsOf(plan),
      indexRows: indexRowsOf(plan),
    });
  } finally {
    for (const table of [draws, bands, indices]) await table?.close();
  }
}

function tablesOf({ draws, bands, indices }: SpreadTableFiles): TableFiles[] {
  return [draws, bands, indices].filter((one) => one !== undefined);
}

function show(report: SpreadReport, { files, out }: FinishedSpread, json: boolean, io: Io): void {
  const terminal = terminalOf(io);
  if (!json) io.stdout.write(`${spreadLines(report, terminal).join('\n')}\n`);
  const paths = tablesOf(files).flatMap(({ path, failedPath }) => [path, ...(failedPath === null ? [] : [failedPath])]);
  const beside = ['summary.json', ...paths.map((path) => basename(path)), 'scenario.yaml'];
  io.stderr.write(writtenText(out, beside, terminal));
}

/** Tables of another run that this one did not replace would be taken for its own: they go, and that is said. */
async function tellEarlier(folder: string, { files, settings, out }: FinishedSpread, io: Io): Promise<void> {
  const absent = spreadTables.filter((table) => files[table] === undefined);
  const { removed, unfinished } = await clearEarlier(folder, absent, settings);
  if (removed.length > 0)
    io.stderr.write(
      `removed from ${printable(out)}, as of an earlier spread with other settings: ${removed.join(', ')}\n`,
    );
  if (unfinished.length > 0)
    io.stderr.write(`${unfinished.join(', ')} in ${printable(out)}: rows of this spread, to go on with by --resume\n`);
}

function tellFailures({ failed }: SpreadReport, draws: number, { failedPath }: TableFiles, io: Io): number {
  if (failed === 0) return exitCode.done;
  const share = `${failed} of ${draws} draws`;
  io.stderr.write(
    `${share} failed: they are no sound planets, or not known to the tolerance; ${failedPath} lists them\n`,
  );
  return failed > tolerableFailures * draws ? exitCode.notWithinTolerance : exitCode.done;
}
