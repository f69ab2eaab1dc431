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
import type { FigureBuilder } from '../figureList.ts';

type Builder = (style: FigureStyle) => Figure;

/** `originals` are columns as they were before a reader moved them: thin lines beside the others. */
export function figureBuilders(columns: readonly Column[], originals: readonly Column[]): FigureBuilder[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  return [
    ...(periodic.length > 0
      ? [
          figure('temperature', (style) =>
            temperatureThroughOrbit(
              periodic,
              style,
              originals.filter(({ isForwardRun }) => !isForwardRun),
            ),
          ),
        ]
      : []),
    ...latitudeFigures(periodic.filter(hasLatitude)),
    ...(forward.length > 0 ? [figure('run', (style) => temperatureAfterStart(forward, style))] : []),
  ];
}

function figure(id: string, build: Builder): FigureBuilder {
  return { id, build };
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
