/** A NetCDF file as readers that are not ours see it: netCDF4-python and xarray. */
import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { toolPath } from '../../support/require.ts';

export interface FoundVariable {
  readonly dims: readonly string[];
  readonly dtype: string;
  readonly attributes: Readonly<Record<string, string | number>>;
  /** Base64 of the float64 values: see `bits`. */
  readonly data: string;
  readonly chunks: 'contiguous' | readonly number[] | null;
  readonly gzip: number;
}

export interface FoundGroup {
  readonly attributes: Readonly<Record<string, string | number>>;
  readonly dimensions: Readonly<Record<string, number>>;
  readonly variables: Readonly<Record<string, FoundVariable>>;
  readonly groups: Readonly<Record<string, FoundGroup>>;
}

export interface Found {
  readonly format: string;
  readonly netcdf4: FoundGroup;
  /** By group path; '' is the root. */
  readonly xarray: Readonly<
    Record<
      string,
      {
        readonly variables: Readonly<Record<string, Pick<FoundVariable, 'dims' | 'data'>>>;
        readonly coordinates: readonly string[];
        /** The first two, decoded. */
        readonly times: readonly string[];
      }
    >
  >;
}

const quiet = { encoding: 'utf8', stdio: 'pipe' } as const;
const script = fileURLToPath(new URL('readNetcdf.py', import.meta.url));

export function readNetcdf(path: string): Found {
  const printed = execFileSync(toolPath('xarray')!, [script, path], { ...quiet, maxBuffer: 1e9 });
  return JSON.parse(printed) as Found;
}

/** Runs a line of Python in which `path` is the file's. */
export function python(path: string, code: string): string {
  const program = `import sys, numpy, netCDF4, xarray\npath = sys.argv[1]\n${code}`;
  return execFileSync(toolPath('xarray')!, ['-c', program, path], quiet).trim();
}

export function bits(data: Float64Array): string {
  return Buffer.from(data.buffer, data.byteOffset, data.byteLength).toString('base64');
}
