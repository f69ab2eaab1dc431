/** The figures of a run, in order. A new figure is a builder in `viewer/figures/` and a line here. */

import { chartNodes, type UniversalChart, universalChart } from '../../../sim/studies/grid/universalChart.ts';
import { annualProfile } from '../../figures/annualProfile.ts';
import type { Figure, FigureStyle } from '../../figures/figure.ts';
import { insolationGroups, insolationMap } from '../../figures/insolationMap.ts';
import { lagLoop } from '../../figures/lagLoop.ts';
import { localLag } from '../../figures/localLag.ts';
import { hasFluxSwing } from '../../figures/loopOpening.ts';
import { availableAxes } from '../../figures/orbitAxis.ts';
import { orbitFromAbove } from '../../figures/orbitFromAbove.ts';
import { placedColumns, plainWorldChart } from '../../figures/plainWorldChart.ts';
import { temperatureAfterStart } from '../../figures/temperatureAfterStart.ts';
import { temperatureDifference } from '../../figures/temperatureDifference.ts';
import { temperatureMap } from '../../figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../figures/temperatureThroughOrbit.ts';
import { hasWindows, windowBars } from '../../figures/windowBars.ts';
import { type Column, columnName } from '../../words/columns.ts';
import { hasLatitude } from '../../words/latitude.ts';
import type { FigureBuilder, FigureChoices } from '../figureList.ts';

/** `originals` are columns as they were before a reader moved them: thin lines beside the others. */
export function figureBuilders(columns: readonly Column[], originals: readonly Column[]): FigureBuilder[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  return [
    ...(periodic.length > 0 ? [figure('temperature', (style) => throughOrbit(periodic, originals, style))] : []),
    ...(periodic.length > 0 ? [orbit(periodic)] : []),
    ...(periodic.some(hasFluxSwing) ? [figure('lagLoop', (style) => lagLoop(periodic, style))] : []),
    ...latitudeFigures(periodic.filter(hasLatitude)),
    ...(periodic.some(hasWindows) ? [figure('windows', (style) => windowBars(periodic, style))] : []),
    ...plainWorlds(periodic),
    ...(forward.length > 0 ? [figure('run', (style) => temperatureAfterStart(forward, style))] : []),
    ...(forward.some(hasWindows) ? [figure('runWindows', (style) => windowBars(forward, style))] : []),
  ];
}

/** The temperatures themselves, or how far they are from one case. */
function throughOrbit(columns: readonly Column[], originals: readonly Column[], style: FigureStyle): Figure {
  const reference = columns.find(({ caseName }) => caseName === style.reading?.against);
  if (reference !== undefined && columns.length > 1) return temperatureDifference(columns, reference, style);
  return temperatureThroughOrbit(
    columns,
    style,
    originals.filter(({ isForwardRun }) => !isForwardRun),
  );
}

/** What a reader may choose for the figures of these columns. */
export function figureChoices(columns: readonly Column[]): FigureChoices {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  if (periodic.length === 0) return { axes: ['time'], cases: [], columns: [] };
  const cases = periodic.filter(({ stateIndex }) => stateIndex === 0).map(({ caseName }) => caseName);
  return { axes: availableAxes(periodic), cases, columns: periodic };
}

function figure(id: string, build: (style: FigureStyle) => Figure): FigureBuilder {
  return { id, build };
}

/** One case at a time. */
function orbit(columns: readonly Column[]): FigureBuilder {
  return {
    id: 'orbit',
    build: (style, shown) => orbitFromAbove(columns, Math.min(shown, columns.length - 1), style),
    choice: { label: 'Case', options: columns.map(columnName) },
  };
}

function plainWorlds(columns: readonly Column[]): FigureBuilder[] {
  const placed = placedColumns(columns);
  if (placed.length === 0) return [];
  const chart = () => chartOver(chartNodes(placed.map(({ place }) => place)));
  return [figure('plainWorlds', (style) => plainWorldChart(columns, chart(), style))];
}

/** The chart of all plain worlds takes tenths of a second, and is the same until a case leaves it: the last one is kept. */
let lastChart: { readonly nodes: string; readonly chart: UniversalChart } | null = null;

function chartOver(nodes: Parameters<typeof universalChart>[0]): UniversalChart {
  const key = JSON.stringify(nodes);
  if (lastChart?.nodes !== key) lastChart = { nodes: key, chart: universalChart(nodes) };
  return lastChart.chart;
}

/** Of the columns that tell latitudes apart. */
function latitudeFigures(columns: readonly Column[]): FigureBuilder[] {
  if (columns.length === 0) return [];
  const groups = insolationGroups(columns);
  return [
    ...columns.map((_, shown) => figure(`map${shown}`, (style) => temperatureMap(columns, shown, style))),
    ...groups.map((_, shown) => figure(`insolation${shown}`, (style) => insolationMap(groups, shown, style))),
    figure('profile', (style) => annualProfile(columns, style)),
    figure('localLag', (style) => localLag(columns, style)),
  ];
}
