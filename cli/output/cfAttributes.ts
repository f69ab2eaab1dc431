/**
 * What the CF conventions (version 1.11, cfconventions.org) say beside a variable's name and unit. Standard names are from
 * the CF standard name table, from memory; a variable that is not listed here goes without.
 */
import type { Variable } from '../../sim/dataset/dataset.ts';
import type { NetcdfAttributes } from './netcdf.ts';

interface Naming {
  readonly standard_name?: string;
  readonly axis?: 'T' | 'X' | 'Y' | 'Z';
  readonly positive?: 'down';
  /** Where degrees have a direction. */
  readonly units?: string;
  /** Says where on its dimension a value stands, as the coordinate does. */
  readonly isAuxiliary?: true;
}

const namings: Readonly<Record<string, Naming>> = {
  time: { axis: 'T' },
  latitude: { standard_name: 'latitude', axis: 'Y', units: 'degrees_north' },
  longitude: { standard_name: 'longitude', axis: 'X', units: 'degrees_east' },
  depth: { standard_name: 'depth', axis: 'Z', positive: 'down' },
  meanAnomaly: { isAuxiliary: true },
  trueAnomaly: { isAuxiliary: true },
  solarLongitude: { isAuxiliary: true },
  temperature: { standard_name: 'surface_temperature' },
  insolation: { standard_name: 'toa_incoming_shortwave_flux' },
  absorbed: { standard_name: 'toa_net_downward_shortwave_flux' },
  emitted: { standard_name: 'toa_outgoing_longwave_flux' },
  albedo: { standard_name: 'planetary_albedo' },
  landFraction: { standard_name: 'land_area_fraction' },
};

type Variables = Readonly<Record<string, Variable>>;

/** All but long name and unit; `units` only where the general spelling does not do. */
export function cfAttributes(name: string, variables: Variables): NetcdfAttributes {
  const { naming, part } = namingOf(name);
  const { isAuxiliary, ...attributes } = naming;
  const more = {
    bounds: boundsOf(name) in variables ? snakeCase(boundsOf(name)) : '',
    cell_methods: cellMethods(name, variables, naming, part),
    coordinates: auxiliariesOf(name, variables).map(snakeCase).join(' '),
  };
  return { ...attributes, ...Object.fromEntries(Object.entries(more).filter(([, text]) => text !== '')) };
}

/** `bandTemperature` and `landTemperature` are temperatures; the latter of a part of the area. */
function namingOf(name: string): { readonly naming: Naming; readonly part?: string } {
  const [, part, first, rest] = /^(?:band)?(land|sea)?(\w)(\w*)$/i.exec(name)!;
  const quantity = first!.toLowerCase() + rest!;
  const naming = namings[name] ?? namings[quantity] ?? {};
  return name in namings || !(quantity in namings) || part === undefined
    ? { naming }
    : { naming, part: part.toLowerCase() };
}

/** The variable that holds the edges of `coordinate`'s cells, two by two. */
export function boundsOf(coordinate: string): string {
  return `${coordinate}Bounds`;
}

/** `solarLongitude` → `solar_longitude`, as in series.csv. */
export function snakeCase(name: string): string {
  return name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
}

/** Where there are bands, a value holds for a whole one, or the land or sea in it, or for the globe; and for an instant. */
function cellMethods(name: string, variables: Variables, naming: Naming, part: string | undefined): string {
  const { dims } = variables[name]!;
  const isOnBands = dims.includes('latitude');
  if (dims.includes(name) || !(isOnBands || naming.standard_name !== undefined)) return '';
  const area = part === undefined ? 'area: mean' : `area: mean where ${part}`;
  const hasBands = boundsOf('latitude') in variables;
  return [...(dims.includes('time') ? ['time: point'] : []), ...(hasBands ? [area] : [])].join(' ');
}

function auxiliariesOf(name: string, variables: Variables): string[] {
  const dims = variables[name]!.dims;
  if (dims.length < 2) return [];
  return Object.keys(variables).filter(
    (other) => namings[other]?.isAuxiliary && variables[other]!.dims.every((dim) => dims.includes(dim)),
  );
}
