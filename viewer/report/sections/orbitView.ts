/** The orbit from above, of the case that the reader chooses. */
import { orbitFromAbove } from '../../figures/orbitFromAbove.ts';
import { type Column, columnName } from '../../words/columns.ts';
import { choice } from '../choice.ts';
import { type FigureView, figureView } from '../figureView.ts';

export function orbitView(number: number, columns: readonly Column[]): FigureView {
  let shown = 0;
  const options = columns.map((column, at) => ({ value: String(at), label: columnName(column) }));
  const chooser = choice('Case', [{ title: 'Cases', options }], '0', (value) => {
    shown = Number(value);
    void view.refresh();
  });
  const view = figureView(
    number,
    (style) => orbitFromAbove(columns, shown, style),
    columns.length > 1 ? chooser : null,
  );
  return view;
}
