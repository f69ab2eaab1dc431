/**
 * Tools that some tests need and a machine may lack. `requireTool` is for `describe.skipIf(!requireTool('chromium'))`:
 * where the tool is missing it says so loudly, and under PERILAG_REQUIRE=all it fails instead of skipping.
 */
import { spawnSync } from 'node:child_process';
import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

export type Tool = 'chromium' | 'firefox' | 'python' | 'scipy' | 'xarray' | 'ncdump' | 'slurm';

const finders: Readonly<Record<Tool, () => string | null>> = {
  chromium: () => onPath(['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable']),
  firefox: () => onPath(['firefox-esr', 'firefox']),
  python: () => pythonWith('csv, json, xml.dom'),
  scipy: () => pythonWith('scipy.integrate'),
  xarray: () => pythonWith('xarray, netCDF4'),
  ncdump: () => onPath(['ncdump']),
  // its own daemons are started, which only root may
  slurm: () => (process.getuid?.() === 0 && onPath(['slurmctld', 'slurmd']) ? onPath(['sbatch']) : null),
};
const packages: Readonly<Record<Tool, string>> = {
  chromium: 'chromium',
  firefox: 'firefox-esr',
  python: 'python3',
  scipy: 'python3-scipy',
  xarray: 'python3-xarray python3-netcdf4',
  ncdump: 'netcdf-bin',
  slurm: 'slurm-wlm munge (and run as root)',
};

/** True when the tool is here. Errors: throws when it is not and PERILAG_REQUIRE=all. */
export function requireTool(tool: Tool): boolean {
  if (toolPath(tool) !== null) return true;
  const advice = `${tool} was not found: on Debian, apt-get install ${packages[tool]}`;
  if (process.env.PERILAG_REQUIRE === 'all') throw new Error(`${advice}. PERILAG_REQUIRE=all makes this a failure.`);
  process.stderr.write(`\n*** SKIPPED: ${advice}. The tests that need it did not run. ***\n`);
  return false;
}

/** The program to start: the tool itself, or a Python that can import it; null where there is none. */
export function toolPath(tool: Tool): string | null {
  return finders[tool]();
}

function pythonWith(modules: string): string | null {
  const pythons = ['/usr/bin/python3', onPath(['python3'])].filter((python) => python !== null);
  return pythons.find((python) => spawnSync(python, ['-c', `import ${modules}`]).status === 0) ?? null;
}

function onPath(names: readonly string[]): string | null {
  const folders = (process.env.PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  const candidates = names.flatMap((name) => folders.map((folder) => join(folder, name)));
  return candidates.find(isExecutable) ?? null;
}

function isExecutable(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}
