/** `perilag run`: every case of each scenario, as a table and as files. */
import { basename, extname, join, resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { type RunResult, runScenario } from '../../sim/run.ts';
import type { Scenario } from '../../sim/scenario/types.ts';
import { exitCode } from '../exit.ts';
import { type FigureOptions, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { accountLines } from '../output/accounts.ts';
import { fieldsFile, hasFields } from '../output/fields.ts';
import { type OutputFile, writeFolder } from '../output/folder.ts';
import { historyLine } from '../output/history.ts';
import { jsonText } from '../output/json.ts';
import { plotLines } from '../output/plot.ts';
import { reportPieces } from '../output/report.ts';
import { scenarioYamlText } from '../output/scenarioYaml.ts';
import { seriesText } from '../output/series.ts';
import { summaryOf, summaryText } from '../output/summary.ts';
import { tableLines } from '../output/table.ts';
import { type Terminal, terminalOf } from '../output/terminal.ts';
import { printable } from '../output/text.ts';
import { writtenText } from '../output/written.ts';
import { samplesFrom } from '../posteriorFile.ts';
import { readScenarioFiles, type ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { requireName } from './outputFolder.ts';

export interface RunOptions extends FigureOptions {
  readonly out?: string;
  readonly only?: readonly string[];
  readonly fractions?: boolean;
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** What runs, and the words with which it was called. */
export interface Program {
  readonly version: string;
  readonly words: readonly string[];
}

/** Gives the exit code. Errors: SimError and ScenarioError for the input's faults; nothing is computed unless all files read. */
export async function run(files: readonly string[], options: RunOptions, program: Program, io: Io): Promise<number> {
  const read = readScenarioFiles(files, io.cwd);
  const chosen = onlyCases(read, options.only ?? []);
  const folders = outputFolders(chosen, options.out);
  const figures = figureRequest(options, io);
  const results: RunResult[] = [];
  for (const [index, item] of chosen.entries()) {
    const result = runScenario(item.scenario, { sha256: item.sha256, version: program.version });
    const folder = resolve(io.cwd, folders[index]!);
    const products = filesOf(item, result, folder, program, io);
    await writeFolder(folder, products);
    show(result, { folder: folders[index]!, products, isLater: index > 0 }, options, io);
    results.push(result);
  }
  if (options.json) {
    const summaries = results.map(summaryOf);
    io.stdout.write(`${jsonText(summaries.length === 1 ? summaries[0] : summaries)}\n`);
  }
  const misses = results.map((result) => tellMisses(result, io));
  const figuresCode = await writeFigures(folders, figures, options, io);
  return misses.includes(true) ? exitCode.notWithinTolerance : figuresCode;
}

/** The report is the last: it is what the others stand beside. */
function filesOf(
  item: ScenarioFile,
  result: RunResult,
  folder: string,
  program: Program,
  io: Io,
): readonly OutputFile[] {
  const { scenario } = item;
  const scenarioYaml = scenarioYamlText(scenario, samplesFrom(folder, item, io.cwd));
  return [
    { name: 'summary.json', pieces: [summaryText(result)] },
    { name: 'series.csv', pieces: [seriesText(result)] },
    ...(hasFields(result) ? [fieldsOf(scenario, scenarioYaml, result, program)] : []),
    { name: 'scenario.yaml', pieces: [scenarioYaml] },
    { name: 'report.html', pieces: reportPieces({ result, tree: scenario.tree }, io.reportTemplate) },
  ];
}

/** What writes it is large, and loaded only when there is something to write. */
function fieldsOf(
  scenario: Scenario,
  scenarioYaml: string,
  result: RunResult,
  { version, words }: Program,
): OutputFile {
  return {
    name: 'fields.nc',
    write: async (path, checkpoint) => {
      const { writeNetcdf } = await import('../output/netcdf.ts');
      await writeNetcdf(
        path,
        fieldsFile(result, scenario, scenarioYaml, historyLine(new Date(), version, words)),
        checkpoint,
      );
    },
  };
}

/** `-o` itself for one scenario, a folder in it for each of several; without it, folders in `out/`. */
function outputFolders(items: readonly ScenarioFile[], out: string | undefined): readonly string[] {
  requireName(out);
  if (items.length === 1 && out !== undefined) return [out];
  const names = items.map(({ file }) => basename(file, extname(file)));
  const twice = names.find((name, index) => names.indexOf(name) !== index);
  if (twice !== undefined) {
    throw new SimError(
      '-o',
      `two scenarios would both write to the folder "${twice}"`,
      'Run them one at a time, each with its own -o',
    );
  }
  return names.map((name) => join(out ?? 'out', name));
}

interface Written {
  readonly folder: string;
  readonly products: readonly OutputFile[];
  /** Another scenario was shown before. */
  readonly isLater: boolean;
}

function show(result: RunResult, { folder, products, isLater }: Written, options: RunOptions, io: Io): void {
  if (options.quiet) return;
  const terminal = terminalOf(io);
  if (!options.json) io.stdout.write(`${isLater ? '\n' : ''}${textOf(result, terminal, options)}\n`);
  const beside = products.map(({ name }) => name).filter((name) => name !== 'report.html');
  io.stderr.write(writtenText(folder, beside, terminal));
}

function textOf(result: RunResult, terminal: Terminal, { fractions = false }: RunOptions): string {
  const parts = [tableLines(result, terminal, fractions), plotLines(result, terminal), accountLines(result, terminal)];
  return parts.map((lines) => lines.join('\n')).join('\n\n');
}

/** Says which cases were not computed within their tolerance; true when there are some. The table says how far off. */
function tellMisses({ cases }: RunResult, io: Io): boolean {
  const missed = cases.filter(({ passed }) => !passed).map(({ name }) => name);
  if (missed.length > 0) io.stderr.write(`not within tolerance: ${printable(missed.join(', '))}\n`);
  return missed.length > 0;
}
