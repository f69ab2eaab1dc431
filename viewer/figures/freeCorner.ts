/** Where in a band a name stands clear of the lines. Pure. */
import type { ChartLine } from './chartLine.ts';

export interface Box {
  readonly left: number;
  readonly right: number;
  readonly low: number;
  readonly high: number;
}

/** Where something runs that a name must keep clear of. */
export type Course = Pick<ChartLine, 'x' | 'y'>;

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

/** The corner of `band` in which a label of this width and height, in data units, is crossed the least. */
export function freeCorner(lines: readonly Course[], band: Box, width: number, height: number): Corner {
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

/** How much of the box's width the lines in it cover, all together. */
function crowd(lines: readonly Course[], box: Box): number {
  return lines.reduce((sum, { x, y }) => {
    const covered = x.slice(1).map((end, at) => {
      const isBeside = Math.max(y[at]!, y[at + 1]!) < box.low || Math.min(y[at]!, y[at + 1]!) > box.high;
      return isBeside ? 0 : Math.max(0, Math.min(end, box.right) - Math.max(x[at]!, box.left));
    });
    return covered.reduce((a, b) => a + b, sum);
  }, 0);
}
