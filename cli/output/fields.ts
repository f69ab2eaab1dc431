/**
 * `fields.nc`: what the models with latitude, depth or longitude computed, following the CF conventions.
 *
 * A group for each state of each case, `/shallow_sea/warm`, also where there is only one: cases differ in the length of their
 * orbit and may differ in their bands, so one dimension for all would need padding. Each group is complete, with its own
 * coordinates, because readers such as xarray do not look for them in the groups above: `xr.open_dataset('fields.nc',
 * group='shallow_sea/warm')`. The attribute `groups` of the file lists them.
 *
 * Time is elapsed time in `s`, without a calendar: CF 1.11 §4.4 asks for a date in the unit of a calendar time, and its
 * `calendar = "none"` is for a date of which only the season counts, which xarray refuses to decode. Where the scenario dates
 * the periapsis, time is `seconds since` that date in TDB; that scale has no leap seconds, so neither has the calendar.
 */
import type { Dataset, Variable } from '../../sim/dataset/dataset.ts';
import type { State } from '../../sim/models/model.ts';
import { j2000Milliseconds } from '../../sim/quantity/timeScale.ts';
import type { CaseResult, RunResult } from '../../sim/run.ts';
import type { Scenario } from '../../sim/scenario/types.ts';
import type { TdbSeconds } from '../../sim/si.ts';
import { boundsOf, cfAttributes, snakeCase } from './cfAttributes.ts';
import { cfUnit } from './cfUnit.ts';
import { isForward } from './columns.ts';
import { groupNames } from './groupNames.ts';
import type { NetcdfAttributes, NetcdfFile, NetcdfGroup, NetcdfVariable } from './netcdf.ts';

/** Is there anything for `fields.nc`: a variable on more than time? */
export function hasFields({ cases }: RunResult): boolean {
  const variables = cases.flatMap(({ states }) => states.flatMap(({ dataset }) => Object.values(dataset.variables)));
  return variables.some(({ dims }) => dims.length > 1);
}

/** `history` is when and how the file was made, which only the caller knows. */
export function fieldsFile(result: RunResult, scenario: Scenario, scenarioYaml: string, history: string): NetcdfFile {
  const names = groupNames(result.cases.map(({ name }) => name));
  const groups = result.cases.map((item, index) => {
    return [names[index]!, caseGroup(item, scenario.cases[index]!.world.orbit.periapsisTime)] as const;
  });
  return {
    attributes: {
      Conventions: 'CF-1.11',
      title: result.scenario.title ?? result.scenario.file,
      history,
      source: `${result.program.name} ${result.program.version}`,
      groups: groups.flatMap(([name, group]) => Object.keys(group.groups).map((state) => `${name}/${state}`)).join(' '),
      scenario: scenarioYaml,
    },
    dimensions: {},
    variables: {},
    groups: Object.fromEntries(groups),
  };
}

function caseGroup(item: CaseResult, periapsisTime: TdbSeconds | null): NetcdfGroup {
  const names = groupNames(item.states.map(({ label }) => label));
  const groups = item.states.map((state, index) => [names[index]!, stateGroup(item, state, periapsisTime)]);
  return { attributes: {}, dimensions: {}, variables: {}, groups: Object.fromEntries(groups) };
}

function stateGroup(item: CaseResult, state: State, periapsisTime: TdbSeconds | null): NetcdfGroup {
  const { variables } = state.dataset;
  const date = isForward(state) || periapsisTime === null ? null : dateText(periapsisTime);
  return {
    attributes: {
      case: item.name,
      state: state.label,
      ...(state.stable === null ? {} : { stable: String(state.stable) }),
      model: item.model,
      ...(item.warnings.length > 0 ? { comment: item.warnings.join('\n') } : {}),
    },
    dimensions: dimensionsOf(state.dataset),
    variables: Object.fromEntries(
      Object.keys(variables).map((name) => [snakeCase(name), netcdfVariable(name, variables, date)]),
    ),
    groups: {},
  };
}

function dimensionsOf({ variables }: Dataset): Record<string, number> {
  const lengths = Object.values(variables).flatMap(({ dims, shape }) =>
    dims.map((dim, i) => [snakeCase(dim), shape[i]!]),
  );
  return Object.fromEntries(lengths);
}

function netcdfVariable(name: string, variables: Dataset['variables'], date: string | null): NetcdfVariable {
  const variable = variables[name]!;
  const unit = cfUnit(variable.unit);
  const data = unit.size === 1 ? variable.data : variable.data.map((value) => value / unit.size);
  return { data, dims: variable.dims.map(snakeCase), attributes: attributesOf(name, variable, variables, date) };
}

/** Edges are described by the coordinate that they belong to. */
function attributesOf(
  name: string,
  { longName, unit }: Variable,
  variables: Dataset['variables'],
  date: string | null,
): NetcdfAttributes {
  if (Object.keys(variables).some((coordinate) => name === boundsOf(coordinate))) return {};
  const described = { long_name: longName, units: cfUnit(unit).text, ...cfAttributes(name, variables) };
  return name === 'time' && date !== null ? { ...described, ...calendarTime(date) } : described;
}

function calendarTime(date: string): NetcdfAttributes {
  return {
    standard_name: 'time',
    units: `seconds since ${date}`,
    calendar: 'proleptic_gregorian',
    comment: 'Barycentric dynamical time (TDB), ahead of UTC by about a minute',
  };
}

/** TDB to the millisecond; null outside the years that such a date can tell. */
function dateText(time: TdbSeconds): string | null {
  const found = /^(\d{4}-\d\d-\d\d)T([\d:.]+)Z$/.exec(
    new Date(j2000Milliseconds + Math.round(time * 1000)).toISOString(),
  );
  return found === null ? null : `${found[1]} ${found[2]}`;
}
