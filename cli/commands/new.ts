/** `perilag new`: a commented scenario to start from. */
import { writeFile } from 'node:fs/promises';
import { resolve } from 'node:path';
import { SimError } from '../../sim/error.ts';
import { exitCode } from '../exit.ts';
import type { Io } from '../io.ts';

const defaultFile = 'scenario.yaml';

/** Writes the starter and says so. Gives the exit code. Errors: SimError when the file exists or cannot be written. */
export async function newScenario(file: string | undefined, io: Io): Promise<number> {
  const name = file ?? defaultFile;
  if (/\.json$/i.test(name)) {
    const mend = `Name it ${name.replace(/\.json$/i, '.yaml')}: run reads both`;
    throw new SimError(name, 'the starter explains itself in comments, which JSON has not', mend);
  }
  try {
    await writeFile(resolve(io.cwd, name), starterScenario(), { flag: 'wx' });
  } catch (error) {
    throw new SimError(name, ...writingFault(error as NodeJS.ErrnoException), error);
  }
  io.stderr.write(`wrote ${name}; now: perilag run ${name}\n`);
  return exitCode.done;
}

function writingFault({ code, message }: NodeJS.ErrnoException): [what: string, mend: string] {
  if (code === 'EEXIST') return ['the file is there already', 'Name another file, or remove it first'];
  if (code === 'ENOENT') return ['there is no such folder', 'Make the folder first'];
  if (code === 'EISDIR') return ['this is a folder', 'Name a file'];
  return [`the file cannot be written (${code ?? message})`, 'Check the path and its permissions'];
}

/** A scenario that runs as it stands; every line says what else could stand there. */
export function starterScenario(): string {
  return starter;
}

const starter = `# A planet on an eccentric orbit: how hot does it get, when, and how late behind periapsis?
# Every number with a dimension carries its unit. perilag check explains what follows from these inputs.
# For help while typing: perilag schema > scenario.schema.json, and this line at the top of the file:
#   yaml-language-server: $schema=./scenario.schema.json    (with a # before it)

title: Ismene b under two assumptions about its heat store
model: lumped                      # one temperature for the whole planet

star:                              # Ismene is invented
  luminosity: 0.4 Lsun             # or temperature and radius
  temperature: 4900 K              # places the habitable limits below
  mass: 0.78 Msun                  # gives the period; or write orbit.period

orbit:
  semiMajorAxis: 0.55 au           # or period, scaledSemiMajorAxis (a/R*), or instellation: 1.3 S0
  eccentricity: 0.45               # uncertain values may stand here: 0.45 ± 0.03
  # periapsisTime: 2026-03-04T05:00Z   # puts dates on the figures; or epoch and meanAnomaly, or
  # transitTime: 2461103.71 TDB        # with argumentOfPeriapsis: 70 deg (radial-velocity convention)

planet:
  bondAlbedo: 0.3                  # or albedo: { warm: 0.3, ice: 0.62, from: 258 K, to: 273 K }
  # emission: { opticalDepth: 0.83 }   # a grey atmosphere; without it a grey surface that sees space
  heatStore: { mixedLayer: 30 m }  # an ocean stirred to 30 m

cases:                             # exactly these run; each lays its changes over the scenario above
  ocean: {}
  rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }

windows:                           # share of the orbit's time in each
  liquid water at 1 bar: 273.15 K to 373.15 K
  temperate: { habitable: [runawayGreenhouse, maximumGreenhouse] }

solve:
  tolerance: 1e-6                  # relative error of temperature, as a promise
`;
