/** `grid.csv`, `grid.nc` and the `summary.json` of `grid`. */
import { fromUnit } from '../../sim/quantity/index.ts';
import { siUnit } from '../../sim/scenario/inputs.ts';
import type { GridAxis, GridCase, GridFinding, GridReport } from '../../sim/studies/grid/gridReport.ts';
import { nodePlaces } from '../../sim/studies/grid/nodePlaces.ts';
import { snakeCase } from './cfAttributes.ts';
import { cfUnit } from './cfUnit.ts';
import { csvField, csvHeader, csvNumber } from './csv.ts';
import { groupNames } from './groupNames.ts';
import type { NetcdfFile, NetcdfGroup, NetcdfVariable } from './netcdf.ts';

/** A row for each node of each case; axes in the units in which they were typed, findings SI, empty where undefined. */
export function gridCsvText({ axes, cases }: GridReport): string {
  const findings = [...new Map(cases.flatMap((one) => one.findings.map((finding) => [finding.name, finding.unit])))];
  const header = [
    'case',
    ...axes.map(({ key, unit }) => csvHeader(key, unit)),
    ...findings.map(([name, unit]) => csvHeader(name, unit)),
  ];
  const lines = [header.map(csvField).join(',')];
  for (const one of cases) {
    const columns = findings.map(([name]) => one.findings.find((finding) => finding.name === name)?.values);
    for (let node = 0; node < nodeCount(axes); node++) {
      const places = placesOf(axes, node).map((place, k) => csvNumber(axes[k]!.nodes[place]!, axes[k]!.key));
      const values = columns.map((values, f) => {
        const value = values?.[node] ?? null;
        return value === null ? '' : csvNumber(value, findings[f]![0]);
      });
      lines.push([csvField(one.name), ...places, ...values].join(','));
    }
  }
  return `${lines.join('\n')}\n`;
}

function nodeCount(axes: readonly GridAxis[]): number {
  return axes.reduce((product, { nodes }) => product * nodes.length, 1);
}

function placesOf(axes: readonly GridAxis[], node: number): number[] {
  return nodePlaces(
    axes.map(({ nodes }) => nodes.length),
    node,
  );
}

/** NetCDF's own mark of a number that is not there (netcdf.h, NC_FILL_DOUBLE). */
const missing = 9.969209968386869e36;

/** CF: a group for each case, with its own axes in SI; the same numbers as `grid.csv`. */
export function gridNetcdf(report: GridReport, scenario: string, history: string): NetcdfFile {
  const { program, axes, cases } = report;
  const names = groupNames(cases.map(({ name }) => name));
  const held = report.hold === null ? [] : [`${report.hold} is held as the eccentricity varies`];
  const comment = [...held, ...report.notes].join('\n');
  return {
    attributes: {
      Conventions: 'CF-1.11',
      title: report.scenario.title ?? report.scenario.file,
      history,
      source: `${program.name} ${program.version}`,
      groups: names.join(' '),
      ...(comment === '' ? {} : { comment }),
      scenario,
    },
    dimensions: {},
    variables: {},
    groups: Object.fromEntries(cases.map((one, index) => [names[index]!, caseGroup(one, axes)])),
  };
}

function caseGroup({ name, model, findings, warnings, notes }: GridCase, axes: readonly GridAxis[]): NetcdfGroup {
  const dimensions = axes.map(axisName);
  const variables = groupNames(findings.map((finding) => snakeCase(finding.name)));
  const comment = [...warnings, ...notes].join('\n');
  return {
    attributes: { case: name, model, ...(comment === '' ? {} : { comment }) },
    dimensions: Object.fromEntries(axes.map(({ nodes }, k) => [dimensions[k]!, nodes.length])),
    variables: Object.fromEntries([
      ...axes.map((axis, k) => [dimensions[k]!, axisVariable(axis, dimensions[k]!)]),
      ...findings.map((finding, f) => [variables[f]!, findingVariable(finding, dimensions)]),
    ]),
    groups: {},
  };
}

/** `orbit.eccentricity` → `orbit_eccentricity`. */
function axisName({ key }: GridAxis): string {
  return snakeCase(key.replaceAll('.', '_'));
}

function axisVariable({ key, label, unit, nodes }: GridAxis, dimension: string): NetcdfVariable {
  const { text, size } = cfUnit(siUnit(unit));
  return {
    data: nodes.map((value) => fromUnit(value, unit) / size),
    dims: [dimension],
    attributes: { long_name: label, units: text, key },
  };
}

function findingVariable({ label, unit, values }: GridFinding, dims: readonly string[]): NetcdfVariable {
  const { text, size } = cfUnit(unit);
  return {
    data: Float64Array.from(values, (value) => (value === null ? missing : value / size)),
    dims,
    attributes: { long_name: label, units: text, _FillValue: missing },
  };
}

/** Extremes of each finding over the grid, and where. */
export function gridSummary({ program, scenario, axes, hold, cases, notes }: GridReport) {
  const { title, file, sha256 } = scenario;
  return {
    program,
    scenario: { title, file, sha256 },
    grid: {
      axes: axes.map(({ nodes, ...axis }) => ({ ...axis, from: nodes[0]!, to: nodes.at(-1)!, nodes: nodes.length })),
      hold,
      cases: cases.map((one) => ({
        name: one.name,
        model: one.model,
        members: one.members.map(({ name, own, universal }) => ({ name, own, universal })),
        failed: one.failed.length,
        findings: Object.fromEntries(one.findings.map((finding) => [finding.name, extremesOf(finding, axes)])),
        warnings: one.warnings,
        notes: one.notes,
      })),
      notes,
    },
  };
}

/** The least and the greatest value with their nodes in the axes' units; null where no node has one. */
export function extremesOf({ unit, label, values }: GridFinding, axes: readonly GridAxis[]) {
  const at = (sign: 1 | -1) => {
    let best: number | null = null;
    for (const [node, value] of values.entries()) {
      if (value !== null && (best === null || sign * (value - values[best]!) > 0)) best = node;
    }
    if (best === null) return null;
    return { value: values[best]!, at: placesOf(axes, best).map((place, k) => axes[k]!.nodes[place]!) };
  };
  const defined = values.filter((value) => value !== null).length / values.length;
  return { unit, label, defined, least: at(-1), greatest: at(1) };
}
