/** The command line: which commands there are. Each loads what it needs only when it is called. */
import { Command, CommanderError, InvalidArgumentError } from 'commander';
import packageJson from '../package.json' with { type: 'json' };
import { exitCode, tellError } from './exit.ts';
import type { Io } from './io.ts';

/** Runs one command line, without the program's name. Gives the exit code; throws nothing. */
export async function main(argv: readonly string[], io: Io): Promise<number> {
  const outcome = { code: exitCode.done as number };
  try {
    await program(argv, io, outcome).parseAsync(argv, { from: 'user' });
    return outcome.code;
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? exitCode.done : exitCode.inputFault;
    return tellError(error, io);
  }
}

function program(words: readonly string[], io: Io, outcome: { code: number }): Command {
  const perilag = new Command('perilag')
    .description('How hot a planet on an eccentric orbit gets, when, and how late behind periapsis.')
    .version(packageJson.version)
    .exitOverride()
    .configureOutput({
      writeOut: (text) => io.stdout.write(text),
      writeErr: (text) => io.stderr.write(text),
      outputError: (text, write) => write(ownWords(text, words)),
    })
    .configureHelp({ helpWidth: Math.min(io.columns, 120) })
    .addHelpText('after', '\nStart with `perilag new planet.yaml`, then `perilag run planet.yaml`.');
  perilag
    .command('run')
    .description('compute every case; print the table; write the report and the data files')
    .argument('<scenario...>', 'scenario files, YAML or JSON')
    .option('-o, --out <dir>', 'output folder (default: out/<file name without extension>)')
    .option('--only <case>', 'compute only this case; may be given several times', collect)
    .option('--fractions', 'show the textbook value for other absorbing fractions as well')
    .option('--json', 'print the summary as JSON on standard output, and nothing else there')
    .option('--quiet', 'print nothing but errors')
    .action(async (files: string[], options) => {
      const { run } = await import('./commands/run.ts');
      outcome.code = await run(files, options, { version: packageJson.version, words }, io);
    });
  perilag
    .command('check')
    .description('explain each scenario: derived values, defaults used, what run would do; computes nothing')
    .argument('<scenario...>', 'scenario files, YAML or JSON')
    .action(async (files: string[]) => {
      const { check } = await import('./commands/check.ts');
      outcome.code = await check(files, io);
    });
  perilag
    .command('trace')
    .description('follow the climates of each case as one input changes: where they end, and where there are two')
    .argument('<scenario>', 'scenario file, YAML or JSON')
    .requiredOption('--along <key=range>', "the input and its range, e.g. 'star.luminosity=0.8 to 1.3 Lsun'", collect)
    .option('-o, --out <dir>', 'output folder (default: out/<file name without extension>/trace)')
    .option('--only <case>', 'follow only this case; may be given several times', collect)
    .option('--json', 'print the summary as JSON on standard output, and nothing else there')
    .option('--quiet', 'print nothing but errors')
    .action(async (file: string, options) => {
      const { trace } = await import('./commands/trace.ts');
      outcome.code = await trace(file, options, { version: packageJson.version, words }, io);
    });
  perilag
    .command('spread')
    .description('draw the uncertain inputs many times: percentiles of every finding, and which input matters most')
    .argument('<scenario>', 'scenario file, YAML or JSON')
    .option('--draws <n>', 'how many draws', wholeNumber('--draws', 2, 2 ** 31), 4096)
    .option('--seed <n>', 'of the draws (default: solve.seed, or 1)', wholeNumber('--seed', 0, 2 ** 32 - 1))
    .option('--random', "pseudo-random draws instead of scrambled Sobol' points")
    .option('--no-indices', 'leave out which input matters, and the runs that it needs')
    .option(
      '--workers <n>',
      'threads (default: as the work asks for); the numbers do not depend on it',
      wholeNumber('--workers', 1, 512),
    )
    .option('--shard <i/n>', 'compute one part of n only, to be joined by gather', shardOf)
    .option('--resume', 'go on with what an interrupted run has left')
    .option('-o, --out <dir>', 'output folder (default: out/<file name without extension>/spread)')
    .option('--only <case>', 'draw only this case; may be given several times', collect)
    .option('--json', 'print the summary as JSON on standard output, and nothing else there')
    .option('--quiet', 'print nothing but errors')
    .action(async (file: string, options) => {
      const { spread } = await import('./commands/spread.ts');
      outcome.code = await spread(file, options, { version: packageJson.version, words }, io);
    });
  perilag
    .command('grid')
    .description('one or two inputs over ranges: curves or maps of every finding')
    .argument('<scenario>', 'scenario file, YAML or JSON')
    .requiredOption(
      '--along <key=range>',
      "an input and its range, e.g. 'orbit.eccentricity=0 to 0.9'; may be given twice",
      collect,
    )
    .option('--steps <n>', 'values of each range', wholeNumber('--steps', 2, 1000), 40)
    .option('--of <names>', 'findings, separated by commas (default: all)')
    .option('--hold <what>', 'orbitMeanInstellation: the orbit widens as the eccentricity grows, so that it stays')
    .option(
      '--workers <n>',
      'threads (default: as the work asks for); the numbers do not depend on it',
      wholeNumber('--workers', 1, 512),
    )
    .option('--resume', 'go on with what an interrupted run has left')
    .option('-o, --out <dir>', 'output folder (default: out/<file name without extension>/grid)')
    .option('--only <case>', 'compute only this case; may be given several times', collect)
    .option('--json', 'print the summary as JSON on standard output, and nothing else there')
    .option('--quiet', 'print nothing but errors')
    .action(async (file: string, options) => {
      const { grid } = await import('./commands/grid.ts');
      outcome.code = await grid(file, options, { version: packageJson.version, words }, io);
    });
  perilag
    .command('gather')
    .description('join the parts of a spread that were computed apart, to the same bytes as one run')
    .argument('<dir...>', 'output folders of the shards')
    .requiredOption('-o, --out <dir>', 'folder of the whole')
    .option('--json', 'print the summary as JSON on standard output, and nothing else there')
    .option('--quiet', 'print nothing but errors')
    .action(async (folders: string[], options) => {
      const { gather } = await import('./commands/gather.ts');
      outcome.code = await gather(folders, options, { version: packageJson.version }, io);
    });
  perilag
    .command('new')
    .description('write a commented scenario to start from')
    .argument('[file]', 'file to write (default: scenario.yaml)')
    .action(async (file: string | undefined) => {
      const { newScenario } = await import('./commands/new.ts');
      outcome.code = await newScenario(file, io);
    });
  perilag
    .command('schema')
    .description('print the JSON Schema of scenario files, for editors')
    .action(async () => {
      const { schema } = await import('./commands/schema.ts');
      outcome.code = schema(io);
    });
  for (const command of perilag.commands) if (withReport.has(command.name())) offerFigures(command);
  return perilag;
}

const withReport: ReadonlySet<string> = new Set(['run', 'trace', 'spread', 'grid', 'gather']);

function offerFigures(command: Command): void {
  command
    .option('--figures <formats>', 'also every figure as a file for a paper, drawn in an installed Chromium: svg,png')
    .option('--figure-width <width>', "how wide these are, e.g. '9 cm' or '7 in' (default: 180 mm)")
    .option('--browser <path>', 'the Chromium or Chrome that draws them (default: $PERILAG_BROWSER, or the one found)');
}

const completeCommands: Readonly<Record<string, string>> = {
  trace: "perilag trace planet.yaml --along 'star.luminosity=0.8 to 1.3 Lsun'",
  grid: "perilag grid planet.yaml --along 'orbit.eccentricity=0 to 0.9'",
  gather: 'perilag gather part-1 part-2 -o whole',
};

/** What a user most often trips over, in the form of our own errors; everything else as Commander tells it. */
function ownWords(text: string, words: readonly string[]): string {
  const [command = ''] = words;
  const torn = /too many arguments/.test(text) ? tornRange(words) : null;
  if (torn !== null) return `--along: the range is not in quotes. Write --along '${torn}'.\n`;
  const [, flags] = /required option '([^']+)' not specified/.exec(text) ?? [];
  const complete = completeCommands[command];
  if (flags === undefined || complete === undefined) return text;
  return `${command}: ${flags} is missing. Write e.g. \`${complete}\`.\n`;
}

/** The range of an `--along` that the shell took apart at its spaces; null where there is none. */
function tornRange(words: readonly string[]): string | null {
  const ranges = words.flatMap((word, at) => {
    if (word !== '--along') return [];
    const rest = words.slice(at + 1);
    const end = rest.findIndex((one) => /^-\D/.test(one));
    return [(end < 0 ? rest : rest.slice(0, end)).join(' ').replace(/ ?= ?/, '=')];
  });
  return ranges.find((range) => / to /.test(range) && !words.includes(range)) ?? null;
}

/** Reads a whole number of an option. Errors: as Commander tells them. */
function wholeNumber(name: string, least: number, most: number): (text: string) => number {
  return (text) => {
    const value = Number(text);
    if (Number.isInteger(value) && value >= least && value <= most && /^\d/.test(text)) return value;
    throw new InvalidArgumentError(`${name} takes a whole number from ${least} to ${most}.`);
  };
}

function shardOf(text: string): { index: number; count: number } {
  const [, index, count] = /^(\d+)\/(\d+)$/.exec(text) ?? [];
  if (index === undefined || count === undefined) throw new InvalidArgumentError('Write it as part/parts, e.g. 3/64.');
  return { index: Number(index), count: Number(count) };
}

function collect(value: string, earlier: readonly string[] = []): readonly string[] {
  return [...earlier, value];
}
