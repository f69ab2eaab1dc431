/** `perilag trace`: the climates of each case as one input changes, as a table and as files. */
import { resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { originOf } from '../../sim/origin.ts';
import { formatNumber } from '../../sim/quantity/index.ts';
import { type Along, readAlong } from '../../sim/scenario/along.ts';
import { type CaseAlong, casesAlong } from '../../sim/scenario/caseAlong.ts';
import { reportedAlong, traceAlong } from '../../sim/studies/traceAlong.ts';
import type { TraceReport, TraceReportCase } from '../../sim/studies/traceReport.ts';
import { exitCode } from '../exit.ts';
import { type FigureOptions, figureRequest } from '../figures/request.ts';
import { writeFigures } from '../figures/write.ts';
import type { Io } from '../io.ts';
import { writeFolder } from '../output/folder.ts';
import { jsonText } from '../output/json.ts';
import { type Progress, progressOf } from '../output/progress.ts';
import { pagePieces } from '../output/report.ts';
import { scenarioYamlText } from '../output/scenarioYaml.ts';
import { terminalOf } from '../output/terminal.ts';
import { printable } from '../output/text.ts';
import { traceCsvText, traceSummary } from '../output/traceFiles.ts';
import { traceLines } from '../output/traceTable.ts';
import { writtenText } from '../output/written.ts';
import { samplesFrom } from '../posteriorFile.ts';
import { readScenarioFile, type ScenarioFile } from '../scenarioFile.ts';
import { onlyCases } from './only.ts';
import { outputFolder } from './outputFolder.ts';
import type { Program } from './run.ts';

export interface TraceCommandOptions extends FigureOptions {
  readonly along: readonly string[];
  readonly out?: string;
  readonly only?: readonly string[];
  readonly json?: boolean;
  readonly quiet?: boolean;
}

/** Gives the exit code. Errors: SimError and ScenarioError for the input's faults. */
export async function trace(file: string, options: TraceCommandOptions, program: Program, io: Io): Promise<number> {
  const along = readAlong(onlyRange(options.along));
  const [item] = onlyCases([readScenarioFile(file, io.cwd)], options.only ?? []);
  const folder = outputFolder(file, 'trace', options.out);
  const figures = figureRequest(options, io);
  const names = item!.scenario.cases.map(({ name }) => name);
  const cases = casesAlong(item!.text, file, along, names);
  const progress = progressOf(io, options.quiet);
  const followed = cases.map((one) => follow(one, along, progress));
  const report = reportOf(item!, along, followed, program);
  const place = resolve(io.cwd, folder);
  await writeFolder(place, filesOf(report, item!, place, io));
  show(report, folder, options, io);
  const isUnfinished = tellUnfinished(report, io);
  const figuresCode = await writeFigures([folder], figures, options, io);
  return isUnfinished ? exitCode.notWithinTolerance : figuresCode;
}

/** Errors: SimError for several: a trace follows one input. */
function onlyRange(ranges: readonly string[]): string {
  const [range, ...more] = ranges;
  if (more.length === 0) return range!;
  const what = `${ranges.length} ranges are given, and climates are followed along one input`;
  throw new SimError('--along', what, 'Keep one of them; `perilag grid` takes two');
}

function follow(one: CaseAlong, along: Along, progress: Progress): TraceReportCase {
  progress.milestone(`${one.name}: following its climates`);
  return traceAlong(one, along, ({ branch, points, value, finished }) => {
    const counted = `${one.name}: branch ${branch}, ${points} ${points === 1 ? 'point' : 'points'}`;
    if (finished) progress.milestone(counted);
    else progress.beat(() => `${counted}, at ${formatNumber(value)}${along.unit === '1' ? '' : ` ${along.unit}`}`);
  });
}

function reportOf(
  { scenario, file, sha256 }: ScenarioFile,
  along: Along,
  cases: readonly TraceReportCase[],
  { version }: Program,
): TraceReport {
  return { ...originOf({ ...scenario, file }, { sha256, version }), along: reportedAlong(along), cases };
}

/** The report is the last: it is what the others stand beside. */
function filesOf(report: TraceReport, item: ScenarioFile, folder: string, { reportTemplate, cwd }: Io) {
  return [
    { name: 'summary.json', pieces: [`${jsonText(traceSummary(report))}\n`] },
    { name: 'trace.csv', pieces: [traceCsvText(report)] },
    { name: 'scenario.yaml', pieces: [scenarioYamlText(item.scenario, samplesFrom(folder, item, cwd))] },
    { name: 'report.html', pieces: pagePieces({ trace: report }, reportTemplate) },
  ];
}

function show(report: TraceReport, folder: string, { json, quiet }: TraceCommandOptions, io: Io): void {
  if (json) io.stdout.write(`${jsonText(traceSummary(report))}\n`);
  if (quiet) return;
  const terminal = terminalOf(io);
  if (!json) io.stdout.write(`${traceLines(report, terminal).join('\n')}\n`);
  io.stderr.write(writtenText(folder, ['summary.json', 'trace.csv', 'scenario.yaml'], terminal));
}

/** Says which cases could not be followed to the ends of the range; true when there are some. */
function tellUnfinished({ cases }: TraceReport, io: Io): boolean {
  const unfinished = cases.filter(({ branches }) => branches.some(({ ended }) => ended !== 'left'));
  const names = unfinished.map(({ name }) => name);
  if (names.length > 0) io.stderr.write(`not followed to the end: ${printable(names.join(', '))}\n`);
  return names.length > 0;
}
