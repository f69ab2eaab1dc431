/**
 * NetCDF-4: named arrays on named dimensions, in groups, with attributes. Knows the format, not what the numbers mean.
 * A NetCDF-4 file is an HDF5 file that keeps some rules (NetCDF User's Guide, "NetCDF-4 Format"): everything in creation
 * order, a dimension scale for each dimension, text attributes of fixed length.
 */
import { closeSync, openSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { setImmediate } from 'node:timers/promises';
import type { Dataset, Group } from 'h5wasm/node';
import { notAResult, SimError } from '../../sim/error.ts';
import { type Hdf5, loadHdf5, withoutClock } from './hdf5.ts';

export type NetcdfAttributes = Readonly<Record<string, string | number>>;

/** `data` is row-major over the lengths of `dims`; without dims it is one number. */
export interface NetcdfVariable {
  readonly data: Float64Array;
  readonly dims: readonly string[];
  readonly attributes: NetcdfAttributes;
}

/** Complete in itself: its variables use its own dimensions. A variable named as a dimension is that dimension's coordinate. */
export interface NetcdfGroup {
  readonly attributes: NetcdfAttributes;
  readonly dimensions: Readonly<Record<string, number>>;
  readonly variables: Readonly<Record<string, NetcdfVariable>>;
  readonly groups: Readonly<Record<string, NetcdfGroup>>;
}

/** The root group. */
export type NetcdfFile = NetcdfGroup;

/**
 * Values in a chunk, the unit of compression. A larger field is written one chunk after the other, so that memory stays small.
 * One that fits in a chunk is stored plain: gzip took an eighth off such numbers and five times as long.
 */
const chunkLength = 131_072;
const gzipLevel = 4;
/** The one underscore in front is the mark of missing numbers, which the format itself names so. */
const plainName = /^(?:_FillValue|[A-Za-z][A-Za-z0-9_]*)$/;

/**
 * Writes `file` as float64 to `path`, where nothing stands yet. Large fields (two dimensions or more) are compressed.
 * The same input gives the same bytes. `checkpoint` is called between chunks and may throw to stop.
 * Errors: one that names the variable when a number is not finite; SimError that names the path when it cannot be written;
 *         either way no file is left.
 */
export async function writeNetcdf(path: string, file: NetcdfFile, checkpoint = () => {}): Promise<void> {
  checkGroup(file, '');
  const hdf5 = await loadHdf5();
  try {
    closeSync(openSync(path, 'wx'));
  } catch (error) {
    throw diskFault(path, error);
  }
  try {
    await inSteps(fileSteps(hdf5, path, file), checkpoint);
  } catch (error) {
    await rm(path, { force: true });
    throw diskFault(path, error);
  }
}

/** A signal is heard between the steps. */
async function inSteps(steps: Generator<void>, checkpoint: () => void): Promise<void> {
  try {
    while (!withoutClock(() => steps.next()).done) {
      await setImmediate();
      checkpoint();
    }
  } finally {
    withoutClock(() => steps.return(undefined)); // closes a file that was left half-way
  }
}

function* fileSteps(hdf5: Hdf5, path: string, file: NetcdfFile): Generator<void> {
  const root = new hdf5.File(path, 'w', { track_order: true });
  try {
    yield* groupSteps(root, file);
  } finally {
    root.close();
  }
}

/** Dimensions are numbered through the whole file, here from `firstId`; gives the number after the last. */
function* groupSteps(group: Group, content: NetcdfGroup, firstId = 0): Generator<void, number> {
  const { attributes, dimensions, variables, groups } = content;
  setAttributes(group, attributes);
  let id = firstId;
  for (const [name, length] of Object.entries(dimensions)) addDimension(group, name, length, variables[name], id++);
  for (const [name, variable] of Object.entries(variables)) {
    if (!(name in dimensions)) yield* variableSteps(group, name, variable, dimensions);
  }
  for (const [name, inner] of Object.entries(groups)) id = yield* groupSteps(group.create_group(name, true), inner, id);
  return id;
}

/** A dimension is the scale that bears its name: its coordinate variable, or an empty one with this agreed text. */
function addDimension(
  group: Group,
  name: string,
  length: number,
  coordinate: NetcdfVariable | undefined,
  id: number,
): void {
  const data = coordinate?.data ?? new Float32Array(length);
  const dtype = coordinate === undefined ? '<f' : '<d';
  const scale = group.create_dataset({ name, data, shape: [length], dtype, track_order: true });
  const unnamed = `This is a netCDF dimension but not a netCDF variable.${String(length).padStart(10)}`;
  scale.make_scale(coordinate === undefined ? unnamed : name);
  scale.create_attribute('_Netcdf4Dimid', id, [], '<i'); // else numbers shift when a reader adds a dimension
  setAttributes(scale, coordinate?.attributes ?? {});
}

function* variableSteps(
  group: Group,
  name: string,
  { data, dims, attributes }: NetcdfVariable,
  dimensions: NetcdfGroup['dimensions'],
): Generator<void> {
  const shape = dims.map((dim) => dimensions[dim]!);
  const options = { name, dtype: '<d', track_order: true };
  const dataset =
    shape.length < 2 || data.length <= chunkLength
      ? group.create_dataset({ ...options, data, shape })
      : yield* fieldSteps(group, options, data, shape);
  setAttributes(dataset, attributes);
  for (const [index, dim] of dims.entries()) dataset.attach_scale(index, `${group.path}/${dim}`);
}

/** Chunks hold whole rows: all values at one place of the first dimension. */
function* fieldSteps(
  group: Group,
  options: { readonly name: string; readonly dtype: string; readonly track_order: boolean },
  data: Float64Array,
  shape: readonly number[],
): Generator<void, Dataset> {
  const [count, ...rowShape] = shape as [number, ...number[]];
  const rowLength = data.length / count;
  const step = Math.min(count, Math.max(1, Math.floor(chunkLength / rowLength)));
  const rows = (from: number) => data.subarray(from * rowLength, Math.min(from + step, count) * rowLength);
  const chunks = [step, ...rowShape];
  const maxshape = [...shape];
  const field = group.create_dataset({
    ...options,
    data: rows(0),
    shape: chunks,
    maxshape,
    chunks,
    compression: 'gzip',
    compression_opts: gzipLevel,
  });
  field.resize(maxshape);
  for (let from = step; from < count; from += step) {
    yield;
    field.write_slice([[from, Math.min(from + step, count)]], rows(from));
  }
  return field;
}

function setAttributes(object: Group | Dataset, attributes: NetcdfAttributes): void {
  for (const [name, value] of Object.entries(attributes)) {
    const type = typeof value === 'number' ? '<d' : `S${Math.max(1, Buffer.byteLength(value))}`;
    object.create_attribute(name, value, [], type);
  }
}

/** Before anything is written: all of it would be the caller's mistake. */
function checkGroup({ attributes, dimensions, variables, groups }: NetcdfGroup, path: string): void {
  for (const name of [attributes, dimensions, variables, groups].flatMap(Object.keys)) checkName(name, path);
  for (const [name, variable] of Object.entries(variables)) checkVariable(`${path}${name}`, name, variable, dimensions);
  for (const [name, inner] of Object.entries(groups)) checkGroup(inner, `${path}${name}/`);
}

function checkVariable(
  path: string,
  name: string,
  { data, dims, attributes }: NetcdfVariable,
  dimensions: NetcdfGroup['dimensions'],
): void {
  for (const attribute of Object.keys(attributes)) checkName(attribute, `${path}:`);
  const isCoordinate = name in dimensions;
  if (isCoordinate && dims.join() !== name) throw new Error(`${path}: a coordinate stands on its own dimension alone`);
  const length = dims.reduce((product, dim) => product * (dimensions[dim] ?? Number.NaN), 1);
  if (!(data.length === length && length > 0)) throw new Error(`${path}: ${data.length} values on [${dims}]`);
  const at = data.findIndex((value) => !Number.isFinite(value));
  if (at !== -1) throw notAResult(`${path} at index ${at}`, data[at]!);
}

function checkName(name: string, path: string): void {
  if (!plainName.test(name)) throw new Error(`${path}: "${name}" is not a plain name`);
}

/** What the operating system said, of Node or in HDF5's own report, is the user's to mend; other errors stay as they are. */
function diskFault(path: string, error: unknown): unknown {
  const { message } = error as Error;
  const found = /^E[A-Z]+: ([^,]+), \w+ '/.exec(message) ?? /errno = \d+, error message = '([^']+)'/.exec(message);
  if (error instanceof SimError || found === null) return error;
  return new SimError(path, `this file cannot be written: ${found[1]}`, 'Choose another folder with -o', error);
}
