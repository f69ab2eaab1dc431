/** The figures of a run, in order. A new figure is a builder in `viewer/figures/` and a line here. */

import { annualProfile } from '../../figures/annualProfile.ts';
import type { Figure, FigureStyle } from '../../figures/figure.ts';
import { insolationGroups, insolationMap } from '../../figures/insolationMap.ts';
import { localLag } from '../../figures/localLag.ts';
import { availableAxes } from '../../figures/orbitAxis.ts';
import { temperatureAfterStart } from '../../figures/temperatureAfterStart.ts';
import { temperatureDifference } from '../../figures/temperatureDifference.ts';
import { temperatureMap } from '../../figures/temperatureMap.ts';
import { temperatureThroughOrbit } from '../../figures/temperatureThroughOrbit.ts';
import type { Column } from '../../words/columns.ts';
import { hasLatitude } from '../../words/latitude.ts';
import type { FigureBuilder } from '../figureList.ts';
import type { ReadingChoices } from '../readingBar.ts';

type Builder = (style: FigureStyle) => Figure;

/** `originals` are columns as they were before a reader moved them: thin lines beside the others. */
export function figureBuilders(columns: readonly Column[], originals: readonly Column[]): FigureBuilder[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  return [
    ...(periodic.length > 0 ? [figure('temperature', (style) => throughOrbit(periodic, originals, style))] : []),
    ...latitudeFigures(periodic.filter(hasLatitude)),
    ...(forward.length > 0 ? [figure('run', (style) => temperatureAfterStart(forward, style))] : []),
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
export function readingChoices(columns: readonly Column[]): ReadingChoices {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  if (periodic.length === 0) return { axes: ['time'], cases: [] };
  const cases = periodic.filter(({ stateIndex }) => stateIndex === 0).map(({ caseName }) => caseName);
  return { axes: availableAxes(periodic), cases };
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
