/** A small drawing of curves in characters: braille dots, or letters where the terminal has no braille. */

/** A curve that rises in x; `mark` is its letter where there are no dots. */
export interface Curve {
  readonly x: ArrayLike<number>;
  readonly y: ArrayLike<number>;
  readonly dotted: boolean;
  readonly mark: string;
}

export interface Canvas {
  readonly columns: number;
  readonly rows: number;
  /** Left and right edge of the drawing. */
  readonly x: readonly [number, number];
  /** Lower and upper edge. */
  readonly y: readonly [number, number];
  readonly braille: boolean;
}

/** One character of the drawing and the curve that it shows; -1 where there is none. */
export interface DrawnCell {
  readonly text: string;
  readonly curve: number;
}

/** Bits of a braille character (U+2800 on), by dot row and dot column. */
const brailleBits = [
  [0x01, 0x08],
  [0x02, 0x10],
  [0x04, 0x20],
  [0x40, 0x80],
] as const;
/** Of a dotted curve, every third dot is drawn. */
const dotSpacing = 3;

/** The drawing as rows of cells, top first. Later curves stand before earlier ones. */
export function draw(curves: readonly Curve[], canvas: Canvas): DrawnCell[][] {
  const [across, up] = canvas.braille ? [2, 4] : [1, 1];
  const bits = new Uint8Array(canvas.columns * canvas.rows);
  const owner = new Int16Array(bits.length).fill(-1);
  for (const [index, curve] of curves.entries()) {
    for (const [column, row] of dotsOf(curve, canvas, canvas.columns * across, canvas.rows * up)) {
      const cell = Math.floor(row / up) * canvas.columns + Math.floor(column / across);
      bits[cell]! |= brailleBits[row % up]![column % across]!;
      owner[cell] = index;
    }
  }
  const text = (cell: number) => {
    if (owner[cell]! < 0) return ' ';
    return canvas.braille ? String.fromCharCode(0x2800 + bits[cell]!) : curves[owner[cell]!]!.mark;
  };
  return Array.from({ length: canvas.rows }, (_, row) =>
    Array.from({ length: canvas.columns }, (_, column) => {
      const cell = row * canvas.columns + column;
      return { text: text(cell), curve: owner[cell]! };
    }),
  );
}

/** Dots [column, row from the top] that a curve covers, from left to right: in each column all that it passes. */
function* dotsOf(curve: Curve, canvas: Canvas, columns: number, rows: number): Generator<[number, number]> {
  const [left, right] = canvas.x;
  const [bottom, top] = canvas.y;
  const rowOf = (y: number) => Math.max(0, Math.min(rows - 1, Math.floor(((top - y) / (top - bottom)) * rows)));
  let count = 0;
  for (let column = 0; column < columns; column++) {
    const from = left + ((right - left) * column) / columns;
    const to = left + ((right - left) * (column + 1)) / columns;
    const passed = passedIn(curve, from, to);
    if (passed === null) continue;
    const [first, last] = [rowOf(passed.high), rowOf(passed.low)];
    for (let step = 0; step <= last - first; step++) {
      const row = passed.rises ? last - step : first + step;
      if (!curve.dotted || count++ % dotSpacing === 0) yield [column, row];
    }
  }
}

/** Lowest and highest value between two x, ends interpolated; null where the curve is not defined. */
function passedIn(curve: Curve, from: number, to: number): { low: number; high: number; rises: boolean } | null {
  const { x, y } = curve;
  const last = x.length - 1;
  if (to < x[0]! || from > x[last]!) return null;
  const [start, end] = [valueAt(curve, from), valueAt(curve, to)];
  let [low, high] = [Math.min(start, end), Math.max(start, end)];
  for (let at = firstAfter(x, from); at <= last && x[at]! < to; at++) {
    low = Math.min(low, y[at]!);
    high = Math.max(high, y[at]!);
  }
  return { low, high, rises: end > start };
}

/** Between samples on a straight line; beyond the ends, the end. */
export function valueAt({ x, y }: Pick<Curve, 'x' | 'y'>, at: number): number {
  const after = firstAfter(x, at);
  if (after === 0) return y[0]!;
  if (after === x.length) return y[after - 1]!;
  const share = (at - x[after - 1]!) / (x[after]! - x[after - 1]!);
  return y[after - 1]! + share * (y[after]! - y[after - 1]!);
}

/** Index of the first x beyond `at`; `x.length` when there is none. */
function firstAfter(x: ArrayLike<number>, at: number): number {
  let [low, high] = [0, x.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (x[middle]! > at) high = middle;
    else low = middle + 1;
  }
  return low;
}
