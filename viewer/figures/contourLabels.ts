/** Where the number of a contour stands: on its line, inside the map, and clear of the numbers already there. Pure. */

export interface Mesh {
  /** Places of columns and rows, ascending; logarithms on a logarithmic axis. */
  readonly x: readonly number[];
  readonly y: readonly number[];
  /** Rows of values; null where there is none. */
  readonly z: readonly (readonly (number | null)[])[];
}

export interface Spot {
  readonly x: number;
  readonly y: number;
}

/** The part that is shown, as places, and its size on the page in pixels. */
export interface Window {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly width: number;
  readonly height: number;
}

/** Less room than this to an edge or another number, in pixels, and a level stays without a number. */
const least = { edge: 14, number: 34 };

/** The roomiest crossing for each level, in order; null where a line has none that is roomy enough. `taken` are spots to keep clear of. */
export function contourLabels(
  mesh: Mesh,
  levels: readonly number[],
  window: Window,
  taken: readonly Spot[] = [],
): (Spot | null)[] {
  const used = taken.map((spot) => pixels(spot, window));
  return levels.map((level) => {
    let best: { spot: Spot; at: Spot; room: number } | null = null;
    for (const spot of crossings(mesh, level)) {
      const at = pixels(spot, window);
      const edge = Math.min(at.x / 2, (window.width - at.x) / 2, at.y, window.height - at.y);
      const others = Math.min(...used.map((other) => Math.hypot((at.x - other.x) / 1.6, at.y - other.y)));
      if (edge < least.edge || others < least.number) continue;
      const room = Math.min(3 * edge, others);
      if (best === null || room > best.room) best = { spot, at, room };
    }
    if (best === null) return null;
    used.push(best.at);
    return best.spot;
  });
}

function pixels({ x, y }: Spot, window: Window): Spot {
  return {
    x: ((x - window.x[0]) / (window.x[1] - window.x[0])) * window.width,
    y: ((y - window.y[0]) / (window.y[1] - window.y[0])) * window.height,
  };
}

/** Where the level is passed between two neighbouring nodes. */
export function crossings({ x, y, z }: Mesh, level: number): Spot[] {
  const found: Spot[] = [];
  for (let row = 0; row < y.length; row++) {
    for (let column = 0; column < x.length; column++) {
      const here = z[row]![column] ?? null;
      const right = z[row]![column + 1] ?? null;
      const above = z[row + 1]?.[column] ?? null;
      const across = shareOf(here, right, level);
      if (across !== null) found.push({ x: between(x[column]!, x[column + 1]!, across), y: y[row]! });
      const up = shareOf(here, above, level);
      if (up !== null) found.push({ x: x[column]!, y: between(y[row]!, y[row + 1]!, up) });
    }
  }
  return found;
}

function shareOf(from: number | null, to: number | null, level: number): number | null {
  if (from === null || to === null || from < level === to < level) return null;
  return (level - from) / (to - from);
}

function between(from: number, to: number, share: number): number {
  return from + share * (to - from);
}
