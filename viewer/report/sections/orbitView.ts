/** The orbit from above, of the case that the reader chooses. */
import { orbitFromAbove } from '../../figures/orbitFromAbove.ts';
import { type Column, columnName } from '../../words/columns.ts';
import { choice } from '../choice.ts';
import { element } from '../element.ts';
import { type FigureView, figureView } from '../figureView.ts';

export function orbitView(number: number, columns: readonly Column[]): FigureView {
  let shown = 0;
  const options = columns.map((column, at) => ({ value: String(at), label: columnName(column) }));
  const chooser = choice('Case', [{ title: 'Cases', options }], '0', (value) => {
    shown = Number(value);
    void view.refresh();
  });
  const controls = columns.length > 1 ? element('p', { class: 'chooser' }, chooser) : null;
  const view = figureView(number, (style) => orbitFromAbove(columns, shown, style), controls);
  return view;
}
