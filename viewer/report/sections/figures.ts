/** The figures of a run, in order. A new figure is a builder in `viewer/figures/` and a line here. */

import { annualProfile } from '../../figures/annualProfile.ts';
import type { Figure, FigureStyle } from '../../figures/figure.ts';
import { insolationGroups, insolationMap } from '../../figures/insolationMap.ts';
import { localLag } from '../../figures/localLag.ts';
import { temperatureAfterStart } from '../../figures/temperatureAfterStart.ts';
import { temperatureMap } from '../../figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../figures/temperatureThroughOrbit.ts';
import type { Column } from '../../words/columns.ts';
import { hasLatitude } from '../../words/latitude.ts';
import { type FigureView, figureView } from '../figureView.ts';

type Builder = (style: FigureStyle) => Figure;

export function figureViews(columns: readonly Column[]): FigureView[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  const builders: Builder[] = [
    ...(periodic.length > 0 ? [(style: FigureStyle) => temperatureThroughOrbit(periodic, style)] : []),
    ...latitudeFigures(periodic.filter(hasLatitude)),
    ...(forward.length > 0 ? [(style: FigureStyle) => temperatureAfterStart(forward, style)] : []),
  ];
  return builders.map((build, index) => figureView(index + 1, build));
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
