/** The figures of a run, in order. A new figure is a builder in `viewer/figures/` and a line here. */

import { chartNodes, type UniversalChart, universalChart } from '../../../sim/studies/grid/universalChart.ts';
import { annualProfile } from '../../figures/annualProfile.ts';
import type { Figure, FigureStyle } from '../../figures/figure.ts';
import { insolationGroups, insolationMap } from '../../figures/insolationMap.ts';
import { lagLoop } from '../../figures/lagLoop.ts';
import { localLag } from '../../figures/localLag.ts';
import { hasFluxSwing } from '../../figures/loopOpening.ts';
import { placedColumns, plainWorldChart } from '../../figures/plainWorldChart.ts';
import { temperatureAfterStart } from '../../figures/temperatureAfterStart.ts';
import { temperatureMap } from '../../figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../figures/temperatureThroughOrbit.ts';
import { hasWindows, windowBars } from '../../figures/windowBars.ts';
import type { Column } from '../../words/columns.ts';
import { hasLatitude } from '../../words/latitude.ts';
import { type FigureView, figureView } from '../figureView.ts';
import { orbitView } from './orbitView.ts';

type Builder = (style: FigureStyle) => Figure;
/** From its place on the page. */
type Maker = (number: number) => FigureView;

export function figureViews(columns: readonly Column[]): FigureView[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  const makers: Maker[] = [
    ...(periodic.length > 0 ? [plain((style) => temperatureThroughOrbit(periodic, style))] : []),
    ...(periodic.length > 0 ? [(number: number) => orbitView(number, periodic)] : []),
    ...(periodic.some(hasFluxSwing) ? [plain((style) => lagLoop(periodic, style))] : []),
    ...latitudeFigures(periodic.filter(hasLatitude)).map(plain),
    ...(periodic.some(hasWindows) ? [plain((style) => windowBars(periodic, style))] : []),
    ...plainWorlds(periodic),
    ...(forward.length > 0 ? [plain((style) => temperatureAfterStart(forward, style))] : []),
    ...(forward.some(hasWindows) ? [plain((style) => windowBars(forward, style))] : []),
  ];
  return makers.map((make, index) => make(index + 1));
}

function plain(build: Builder): Maker {
  return (number) => figureView(number, build);
}

/** The chart is computed once, when it is first drawn. */
function plainWorlds(columns: readonly Column[]): Maker[] {
  const placed = placedColumns(columns);
  if (placed.length === 0) return [];
  let chart: UniversalChart | null = null;
  return [
    plain((style) => {
      chart ??= universalChart(chartNodes(placed.map(({ place }) => place)));
      return plainWorldChart(columns, chart, style);
    }),
  ];
}

/** Of the columns that tell latitudes apart. */
function latitudeFigures(columns: readonly Column[]): Builder[] {
  if (columns.length === 0) return [];
  const groups = insolationGroups(columns);
  return [
    ...columns.map(
      (_, shown): Builder =>
        (style) =>
          temperatureMap(columns, shown, style),
    ),
    ...groups.map(
      (_, shown): Builder =>
        (style) =>
          insolationMap(groups, shown, style),
    ),
    (style) => annualProfile(columns, style),
    (style) => localLag(columns, style),
  ];
}
