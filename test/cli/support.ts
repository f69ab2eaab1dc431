/** Runs command lines in this process, in a folder of their own. */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { Io } from '../../cli/io.ts';
import { main } from '../../cli/program.ts';

export const threeCasesText = `title: Corvane b under three ground assumptions
star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.62 }
planet:
  bondAlbedo: 0.3
  heatStore: { mixedLayer: 20 m }
cases:
  shallow sea: {}
  bare rock: { planet: { heatStore: { ground: { thermalInertia: 2200 J/m2/K/s^0.5, cycle: orbit } } } }
  thick air: { planet: { heatStore: { atmosphere: { surfacePressure: 5 bar, specificHeat: 1004 J/kg/K, gravity: 11 m/s2 } } } }
windows:
  liquid water at 1 bar: 273.15 K to 373.15 K
`;

/** By latitude, coarse enough to be quick: a planet with a warm and a frozen climate. */
export const zonalText = `title: Chione b, with polar caps or frozen over
model: zonal
star: { luminosity: 0.48 Lsun, mass: 0.82 Msun }
orbit: { instellation: 0.95 S0, eccentricity: 0.05, periapsisTime: 2026-03-04T05:00Z }
planet:
  albedo: { warm: 0.3, ice: 0.6, from: 258 K, to: 272 K }
  emission: { opticalDepth: 0.83 }
  heatStore: { mixedLayer: 12 m }
  heatTransport: 0.5 W/m2/K
  obliquity: 24 deg
  rotationPeriod: 22 h
  solarLongitudeOfPeriapsis: 120 deg
  bands: 36
windows:
  liquid water at 1 bar: 273.15 K to 373.15 K
solve: { samples: 48, tolerance: 1e-5 }
`;

export const emptyPage =
  '<!doctype html><title>page</title><script type="application/json" id="perilag-data"></script>';

/** What most tests do not care about: no terminal on standard error, no signals, the program's own worker. */
export const undisturbed: Pick<Io, 'stderrIsTTY' | 'stderrColumns' | 'now' | 'signals' | 'worker'> = {
  stderrIsTTY: false,
  stderrColumns: 80,
  now: () => performance.now(),
  signals: { on: () => () => undefined },
  worker: fileURLToPath(new URL('../../cli/engine/workerFromSource.mjs', import.meta.url)),
};

export interface Workplace {
  readonly folder: string;
  path(...names: string[]): string;
  write(name: string, text: string | Uint8Array): void;
  remove(): void;
  /** One command line; what it printed and its exit code. */
  perilag(...words: string[]): Promise<{ readonly code: number; readonly stdout: string; readonly stderr: string }>;
}

export function workplace(env: Record<string, string> = { LANG: 'C.UTF-8' }): Workplace {
  const folder = mkdtempSync(join(tmpdir(), 'perilag-cli-'));
  const path = (...names: string[]) => join(folder, ...names);
  writeFileSync(path('page.html'), emptyPage);
  return {
    folder,
    path,
    write: (name, text) => writeFileSync(path(name), text),
    remove: () => rmSync(folder, { recursive: true, force: true }),
    perilag: async (...words) => {
      const printed = { stdout: '', stderr: '' };
      const io = {
        stdout: { write: (text: string) => (printed.stdout += text) },
        stderr: { write: (text: string) => (printed.stderr += text) },
        isTTY: false,
        columns: 80,
        ...undisturbed,
        env,
        cwd: folder,
        now: () => 0,
        reportTemplate: path('page.html'),
      };
      return { code: await main(words, io), ...printed };
    },
  };
}
