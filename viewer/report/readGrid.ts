/** Checks a grid that the page carries. Pure. */
import type { GridAxis, GridCase, GridMember, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { damaged } from './readResult.ts';

/** Errors: PageError when the data are no grid that this page can show. */
export function checkedGrid(value: unknown): GridReport {
  if (!isGrid(value)) throw damaged('the data are not a grid');
  const nodes = value.axes.reduce((count, axis) => count * axis.nodes.length, 1);
  for (const one of value.cases) {
    if (!isWhole(one, value.axes.length, nodes)) throw damaged(`numbers of “${one.name}” are missing`);
  }
  return value;
}

function isGrid(value: unknown): value is GridReport {
  const grid = value as Partial<GridReport> | null;
  if (typeof grid !== 'object' || grid === null) return false;
  const { axes, cases, scenario, program } = grid;
  if (typeof scenario?.file !== 'string' || typeof program?.name !== 'string') return false;
  if (!Array.isArray(axes) || axes.length < 1 || axes.length > 2 || !axes.every(isAxis)) return false;
  return Array.isArray(grid.notes) && Array.isArray(cases) && cases.length > 0 && cases.every(isCase);
}

function isAxis(axis: Partial<GridAxis> | null): boolean {
  const { key, label, unit, nodes } = axis ?? {};
  if (typeof key !== 'string' || typeof label !== 'string' || typeof unit !== 'string') return false;
  if (!(nodes instanceof Float64Array) || nodes.length < 2) return false;
  return nodes.every((node, at) => at === 0 || node > nodes[at - 1]!) && !(axis?.log && !(nodes[0]! > 0));
}

function isCase(one: Partial<GridCase> | null): boolean {
  const { name, model, findings, members, failed, warnings, notes } = one ?? {};
  if (typeof name !== 'string' || typeof model !== 'string') return false;
  if (![findings, members, failed, warnings, notes].every(Array.isArray)) return false;
  return members!.length > 0 && members!.every(isMember);
}

function isMember({ name, index, own, inputs }: Partial<GridMember>): boolean {
  return typeof name === 'string' && Number.isInteger(index) && Array.isArray(own) && Array.isArray(inputs);
}

function isNumberOrNull(value: unknown): boolean {
  return value === null || Number.isFinite(value);
}

function isPlaced({ own, universal }: GridMember, axes: number): boolean {
  if (own.length !== axes || !own.every(isNumberOrNull)) return false;
  if (universal === null) return true;
  const { eccentricity, storeNumber, heatCapacityPerNumber } = universal ?? {};
  return eccentricity >= 0 && eccentricity < 1 && storeNumber > 0 && heatCapacityPerNumber > 0;
}

function isWhole({ findings, members, failed }: GridCase, axes: number, nodes: number): boolean {
  if (!members.every((member) => isPlaced(member, axes))) return false;
  if (!failed.every(({ node }) => Number.isInteger(node) && node >= 0 && node < nodes)) return false;
  return findings.every(({ name, values }) => {
    return typeof name === 'string' && values?.length === nodes && values.every(isNumberOrNull);
  });
}
