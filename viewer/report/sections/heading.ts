/** Title, notes, and the orbit to scale beside them. */

import type { RunResult } from '../../../sim/run.ts';
import { type OrbitOutline, orbitOutline } from '../../figures/orbitOutline.ts';
import { extremes } from '../../figures/variables.ts';
import { type Column, periodOf } from '../../words/columns.ts';
import { duration } from '../../words/number.ts';
import { element, svgElement } from '../element.ts';

export function heading(result: RunResult, columns: readonly Column[]): HTMLElement {
  const { title, notes, file } = result.scenario;
  return element(
    'header',
    { class: 'grid' },
    element('div', {}, element('h1', { dir: 'auto' }, title ?? file), ...(notes === null ? [] : paragraphs(notes))),
    orbitPicture(columns),
  );
}

export function paragraphs(notes: string): HTMLElement[] {
  return notes
    .split(/\n\s*\n/)
    .filter((text) => text.trim() !== '')
    .map((text) => element('p', { class: 'notes', dir: 'auto' }, text.trim()));
}

const dotCount = 24;

/** The first periodic state's orbit; nothing for a run that has none. */
function orbitPicture(columns: readonly Column[]): HTMLElement | null {
  const column = columns.find(({ isForwardRun }) => !isForwardRun);
  if (!column) return null;
  const whose = columns.every((other) => sameOrbit(other, column)) ? 'The orbit' : `The orbit of “${column.caseName}”`;
  return element(
    'figure',
    { class: 'orbit' },
    orbitDrawing(orbitOutline(column.dataset, dotCount)),
    element('figcaption', {}, `${whose}, to scale, with a dot every ${duration(periodOf(column) / dotCount)}.`),
  );
}

/** Same period, and the same distances at its ends. */
function sameOrbit(a: Column, b: Column): boolean {
  const [one, other] = [a, b].map((column) => [periodOf(column), ...extremes(column.dataset, 'distance')]);
  return one!.every((value, index) => Math.abs(value - other![index]!) <= 1e-4 * value);
}

function orbitDrawing({ path, dots }: OrbitOutline): SVGSVGElement {
  const xs = path.map(({ x }) => x);
  const ys = path.map(({ y }) => y);
  const [left, right, low] = [Math.min(...xs), Math.max(...xs), Math.min(...ys)];
  const edge = 0.12;
  const outline = path.map(({ x, y }) => `${x.toFixed(4)} ${(-y).toFixed(4)}`).join('L');
  return svgElement(
    'svg',
    {
      viewBox: `${left - edge} ${low - edge} ${right - left + 2 * edge} ${2 * (edge - low)}`,
      role: 'img',
      'aria-label': 'The orbit from above, periapsis to the right',
    },
    svgElement('path', { d: `M${outline}Z`, class: 'orbit-path' }),
    svgElement('path', { d: `M0 0H${right}`, class: 'orbit-periapsis' }),
    ...dots.map(({ x, y }, dot) =>
      svgElement('circle', { cx: String(x), cy: String(-y), r: dot === 0 ? '0.06' : '0.03', class: 'orbit-dot' }),
    ),
    svgElement('circle', { cx: '0', cy: '0', r: '0.075', class: 'orbit-star' }),
  );
}
