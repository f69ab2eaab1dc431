/** The figures of a run, in order. A new figure is a builder in `viewer/figures/` and a line here. */
import type { Figure, FigureStyle } from '../../figures/figure.ts';
import { temperatureAfterStart } from '../../figures/temperatureAfterStart.ts';
import { temperatureThroughOrbit } from '../../figures/temperatureThroughOrbit.ts';
import type { Column } from '../../words/columns.ts';
import { type FigureView, figureView } from '../figureView.ts';

export function figureViews(columns: readonly Column[]): FigureView[] {
  const periodic = columns.filter(({ isForwardRun }) => !isForwardRun);
  const forward = columns.filter(({ isForwardRun }) => isForwardRun);
  const builders: ((style: FigureStyle) => Figure)[] = [
    ...(periodic.length > 0 ? [(style: FigureStyle) => temperatureThroughOrbit(periodic, style)] : []),
    ...(forward.length > 0 ? [(style: FigureStyle) => temperatureAfterStart(forward, style)] : []),
  ];
  return builders.map((build, index) => figureView(index + 1, build));
}
