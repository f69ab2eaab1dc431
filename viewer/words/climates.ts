/** Which climates a case has where, and what happens where one ends. Pure. */
import type { Along } from './along.ts';
import { type Arc, arcsOf, spanOf, type TraceCase, type TracePoint, temperatureAt } from './arcs.ts';

/** Inputs over which the number of stable climates stays the same. */
export interface Span {
  readonly from: number;
  readonly to: number;
  readonly climates: number;
}

/** A fold at which a stable climate ends. */
export interface ClimateEnd {
  readonly point: TracePoint;
  /** The climate exists on the side of higher inputs only, or of lower. */
  readonly liesAbove: boolean;
  /** Among the climates just inside the fold, warmest first. */
  readonly name: string;
  /** Mean temperature of the climate that is left, K: the next on the side of the unstable arc; null where none was found. */
  readonly next: number | null;
}

/** Two arcs so near to each other at the same input are one climate, followed twice. */
const sameClimate = 0.5;

export function spansOf(oneCase: TraceCase, along: Along): Span[] {
  const arcs = stableArcs(oneCase);
  const inside = arcs.flatMap(spanOf).filter((value) => value > along.from && value < along.to);
  const apart = 1e-6 * (along.to - along.from);
  const edges = [along.from, ...inside.toSorted((a, b) => a - b), along.to].filter(
    (edge, at, all) => at === 0 || edge - all[at - 1]! > apart,
  );
  const spans: Span[] = [];
  for (let at = 1; at < edges.length; at++) {
    const [from, to] = [edges[at - 1]!, edges[at]!];
    const climates = temperaturesAt(arcs, (from + to) / 2).length;
    const before = spans.at(-1);
    if (before?.climates === climates) spans[spans.length - 1] = { ...before, to };
    else spans.push({ from, to, climates });
  }
  return spans;
}

/** In ascending order of the input. */
export function climateEnds(oneCase: TraceCase, along: Along): ClimateEnd[] {
  const arcs = arcsOf(oneCase);
  return foldsOf(oneCase, along)
    .flatMap((point) => endAt(point, arcs) ?? [])
    .toSorted((a, b) => a.point.value - b.point.value);
}

/** Folds within the range, each once. */
export function foldsOf({ branches }: TraceCase, { from, to }: Along): TracePoint[] {
  const folds = branches.flatMap(({ points }) =>
    points.filter(({ fold, value }) => fold && value >= from && value <= to),
  );
  return folds.filter((fold, at) => folds.findIndex((other) => isSame(fold, other)) === at);
}

/** `warm`, `middle`, `cold`: the place of one climate among `count`, warmest first. */
export function climateName(place: number, count: number): string {
  if (count === 1) return 'only';
  if (place === 0) return 'warm';
  if (place === count - 1) return 'cold';
  return count === 3 ? 'middle' : `${['second', 'third', 'fourth'][place - 1] ?? `${place + 1}th`} warmest`;
}

/** Null where no stable climate ends: both arms unstable. */
function endAt(point: TracePoint, arcs: readonly Arc[]): ClimateEnd | null {
  const arms = arcs.filter(({ points }) => points[0] === point || points.at(-1) === point);
  const arm = arms.find(({ stable }) => stable);
  if (arm === undefined) return null;
  const [low, high] = spanOf(arm);
  const liesAbove = low === point.value;
  const others = arcs.filter((arc) => arc.stable && arc !== arm);
  const inside = point.value + (liesAbove ? 1 : -1) * 0.02 * (high - low);
  const own = temperatureAt(arm, inside) ?? point.temperatureMean;
  const around = temperaturesAt([...others, arm], inside);
  const place = around.filter((temperature) => temperature > own + sameClimate).length;
  const falls = isWarmer(
    arm,
    arms.find(({ stable }) => !stable),
    point,
  );
  const left = temperaturesAt(others, point.value).filter(
    (temperature) => temperature < point.temperatureMean === falls,
  );
  const next = (falls ? left[0] : left.at(-1)) ?? null;
  return { point, liesAbove, name: climateName(place, around.length), next };
}

/** Whether the stable arm leaves the fold on the warm side of the unstable one. */
function isWarmer(stable: Arc, unstable: Arc | undefined, point: TracePoint): boolean {
  const beside = (arc: Arc): number => (arc.points[0] === point ? arc.points[1]! : arc.points.at(-2)!).temperatureMean;
  return beside(stable) > (unstable === undefined ? point.temperatureMean : beside(unstable));
}

function stableArcs(oneCase: TraceCase): Arc[] {
  return arcsOf(oneCase).filter(({ stable }) => stable);
}

/** Distinct ones, warmest first. */
function temperaturesAt(arcs: readonly Arc[], value: number): number[] {
  const all = arcs.flatMap((arc) => temperatureAt(arc, value) ?? []).toSorted((a, b) => b - a);
  return all.filter((temperature, at) => at === 0 || all[at - 1]! - temperature > sameClimate);
}

function isSame(a: TracePoint, b: TracePoint): boolean {
  return (
    Math.abs(a.value - b.value) <= 1e-6 * Math.abs(a.value) &&
    Math.abs(a.temperatureMean - b.temperatureMean) < sameClimate
  );
}
