/** Where in a band a name stands clear of the lines. Pure. */
import type { ChartLine } from './chartLine.ts';

export interface Box {
  readonly left: number;
  readonly right: number;
  readonly low: number;
  readonly high: number;
}

export interface Corner {
  readonly side: 'left' | 'right';
  readonly edge: 'top' | 'bottom';
}

const corners: readonly Corner[] = [
  { side: 'left', edge: 'top' },
  { side: 'left', edge: 'bottom' },
  { side: 'right', edge: 'top' },
  { side: 'right', edge: 'bottom' },
];

/** The corner of `band` in which a label of this width and height, in data units, meets the fewest line points. */
export function freeCorner(lines: readonly ChartLine[], band: Box, width: number, height: number): Corner {
  const crowds = corners.map((corner) => crowd(lines, cornerBox(corner, band, width, height)));
  return corners[crowds.indexOf(Math.min(...crowds))]!;
}

function cornerBox({ side, edge }: Corner, band: Box, width: number, height: number): Box {
  return {
    left: side === 'left' ? band.left : band.right - width,
    right: side === 'left' ? band.left + width : band.right,
    low: edge === 'bottom' ? band.low : band.high - height,
    high: edge === 'bottom' ? band.low + height : band.high,
  };
}

/** Line points inside the box, and steps that cross it from one point to the next. */
function crowd(lines: readonly ChartLine[], box: Box): number {
  return lines.reduce((sum, { x, y }) => {
    const touched = x.slice(1).filter((end, at) => {
      if (end < box.left || x[at]! > box.right) return false;
      return Math.max(y[at]!, y[at + 1]!) >= box.low && Math.min(y[at]!, y[at + 1]!) <= box.high;
    });
    return sum + touched.length;
  }, 0);
}
