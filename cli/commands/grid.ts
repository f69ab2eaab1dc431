/** `perilag grid`: every finding of each case over one or two inputs, as curves or maps and as files. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { setImmediate } from 'node:timers/promises';
import { originOf } from '../../sim/origin.ts';
import { findingColumns } from '../../sim/studies/columnName.ts';
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { type GridPlan, type GridSetup, planGrid } from '../../sim/studies/grid/plan.ts';
import { summariseGrid } from '../../sim/studies/grid/summariseGrid.ts';
import { csvRecords } from '../csvRecords.ts';
import { type ComputeOptions, computeTables } from '../engine/compute.ts';
import { whileListening, whileRowsAreKept } from '../engine/interruption.ts';
import type { Job } from '../engine/job.ts';
import { kinds } from '../engine/kinds.ts';
import { type Held, requireMemory } from '../engine/room.ts';
import { discardWaiting, madeBefore, type TableFiles, waitingFolder } from '../engine/table.ts';
import { type FigureOptions, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { type OutputFile, writeFolder } from '../output/folder.ts';
import { gridCsvText, gridNetcdf, gridSummary } from '../output/gridFiles.ts';
import { gridLines } from '../output/gridTable.ts';
import { historyLine } from '../output/history.ts';
import { jsonText } from '../output/json.ts';
import { pagePieces } from '../output/report.ts';
import { scenarioYamlText } from '../output/scenarioYaml.ts';
import { terminalOf } from '../output/terminal.ts';
import { writtenText } from '../output/written.ts';
import { samplesFrom } from '../posteriorFile.ts';
import { readScenarioFile, type ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { outputFolder } from './outputFolder.ts';
import type { Program } from './run.ts';

export interface GridOptions extends FigureOptions {
  readonly along: readonly string[];
  readonly steps: number;
  readonly of?: string;
  readonly hold?: string;
  readonly workers?: number;
  readonly resume?: boolean;
  readonly out?: string;
  readonly only?: readonly string[];
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** All columns; every number again as an object of the report, as a text of the page, and all of them in one text of the CSV. */
const heldByGrid: Held = { columns: Number.POSITIVE_INFINITY, heapANumber: 45, textANumber: 19 };

/** Gives the exit code. Errors: SimError and ScenarioError for the input's faults; Interrupted after a signal. */
export async function grid(file: string, options: GridOptions, program: Program, io: Io): Promise<number> {
  const [item] = onlyCases([readScenarioFile(file, io.cwd)], options.only ?? []);
  const setup = setupOf(item!, options);
  const plan = planGrid(setup);
  const out = outputFolder(file, 'grid', options.out);
  const figures = figureRequest(options, io);
  const folder = resolve(io.cwd, out);
  const job = jobOf(plan, item!, program);
  requireMemory('--steps', job, heldByGrid);
  const settled: ComputeOptions = {
    folder,
    tables: waitingFolder(folder),
    shard: null,
    resume: options.resume ?? false,
    workers: options.workers ?? null,
    quiet: options.quiet ?? false,
    words: program.words,
  };
  const report = await whileListening(io, settled, async (interruption) => {
    const [computed] = await computeTables([{ table: 'grid', job }], settled, kinds, io, interruption);
    const made = await whileRowsAreKept(settled, interruption, async (checkpoint) => {
      const summarised = await reportOf(plan, item!, computed!.files!, program);
      await setImmediate(); // a signal is heard
      checkpoint();
      const before = madeBefore(folder, [computed!.files!]);
      await writeFolder(folder, filesOf(summarised, item!, folder, program, io), before);
      await discardWaiting(folder);
      return summarised;
    });
    await computed!.discardWork();
    return made;
  });
  show(report, out, options, io);
  return writeFigures([out], figures, options, io);
}

function filesOf(report: GridReport, item: ScenarioFile, folder: string, program: Program, io: Io): OutputFile[] {
  const scenarioYaml = scenarioYamlText(item.scenario, samplesFrom(folder, item, io.cwd));
  return [
    { name: 'summary.json', pieces: [`${jsonText(gridSummary(report))}\n`] },
    { name: 'grid.csv', pieces: [gridCsvText(report)] },
    {
      name: 'grid.nc',
      write: async (path, checkpoint) => {
        const { writeNetcdf } = await import('../output/netcdf.ts');
        const history = historyLine(new Date(), program.version, program.words);
        await writeNetcdf(path, gridNetcdf(report, scenarioYaml, history), checkpoint);
      },
    },
    { name: 'scenario.yaml', pieces: [scenarioYaml] },
    { name: 'report.html', pieces: pagePieces({ grid: report }, io.reportTemplate) },
  ];
}

function setupOf({ text, file, scenario }: ScenarioFile, { along, hold, steps, of, only }: GridOptions): GridSetup {
  return {
    text,
    file,
    only: only && only.length > 0 ? scenario.cases.map(({ name }) => name) : null,
    alongs: along,
    hold: hold ?? null,
    steps,
    of: of === undefined ? null : [...new Set(of.split(',').map((name) => name.trim()))].filter((name) => name !== ''),
  };
}

function jobOf(plan: GridPlan, { sha256 }: ScenarioFile, { version }: Program): Job {
  const { setup, axes, cases, count } = plan;
  const { alongs, hold, steps, of, only } = setup;
  return {
    kind: 'gridNodes',
    setup,
    inputs: axes.map(({ along: { key, unit, label } }) => ({ name: key, unit, label })),
    findings: findingColumns(cases),
    rows: count,
    settings: {
      scenario: sha256,
      version,
      along: alongs.join('\n'),
      hold,
      steps,
      of: of?.join(',') ?? null,
      cases: only?.join('\n') ?? null,
    },
    context: { command: 'grid' },
  };
}

async function reportOf(
  plan: GridPlan,
  { scenario, file, sha256 }: ScenarioFile,
  files: TableFiles,
  { version }: Program,
): Promise<GridReport> {
  const { openParquet } = await import('../output/parquetReader.ts');
  const table = await openParquet(files.path);
  try {
    const findings: Float64Array[] = [];
    for (const name of table.names.slice(1 + plan.axes.length)) findings.push(await table.column(name));
    return summariseGrid(plan, scenario, originOf({ ...scenario, file }, { sha256, version }), {
      findings,
      failures: failuresOf(files.failedPath),
    });
  } finally {
    await table.close();
  }
}

function failuresOf(path: string | null): { node: number; message: string }[] {
  if (path === null) return [];
  const [, ...records] = csvRecords(readFileSync(path, 'utf8'), path);
  return records.map(({ fields }) => ({ node: Number(fields[0]), message: fields.at(-1)! }));
}

function show(report: GridReport, out: string, { json, quiet }: GridOptions, io: Io): void {
  if (json) io.stdout.write(`${jsonText(gridSummary(report))}\n`);
  if (quiet) return;
  const terminal = terminalOf(io);
  if (!json) io.stdout.write(`${gridLines(report, terminal).join('\n')}\n`);
  const failed = report.cases.some((one) => one.failed.length > 0) ? ['failed-grid.csv'] : [];
  const beside = ['summary.json', 'grid.csv', 'grid.nc', 'grid.parquet', ...failed, 'scenario.yaml'];
  io.stderr.write(writtenText(out, beside, terminal));
}
