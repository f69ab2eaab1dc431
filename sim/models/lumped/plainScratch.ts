/** Where one reading of a plain world's findings keeps its state: the present world, its extremes, and the present place on its curve. */
import { movableForcing } from '../../orbit/forcing.ts';
import type { Kelvin, Radians } from '../../si.ts';
import { circleCache } from '../../solve/circle.ts';
import { emptyPiece } from '../../solve/curve.ts';
import { loadNodePiece, type Turn, type Turns } from '../../solve/periodicNodes.ts';
import { forcingPoint } from '../../solve/separable.ts';
import { smallCosine, smallSine } from '../../solve/smallAngle.ts';
import type { World } from '../../world.ts';
import type { PlainState } from './plain.ts';

export const turn = 2 * Math.PI;

/** Where the state of one call is kept. */
export interface Scratch {
  readonly circle: ReturnType<typeof circleCache>;
  readonly forcing: ReturnType<typeof movableForcing>;
  readonly point: ReturnType<typeof forcingPoint>;
  readonly piece: ReturnType<typeof emptyPiece>;
  readonly turns: Turns;
  readonly highest: Turn;
  readonly lowest: Turn;
  readonly warming: Fastest;
  readonly cooling: Fastest;
  readonly evenWave: Wave;
  readonly oddWave: Wave;
  midpoints: Float64Array;
  /** Of the present mesh: cos(s/2) and sin(s/2) at its nodes. */
  size: number;
  halfCosines: Float64Array;
  halfSines: Float64Array;
  /** The present piece, −1 before one is loaded, and the place in it, 0 … 1. */
  index: number;
  x: number;
  world: World;
  state: PlainState;
  /** The balanced parameter. */
  b: number;
  mean: Kelvin;
  moving: boolean;
}

export function newScratch(): Scratch {
  return {
    circle: circleCache(),
    forcing: movableForcing(),
    point: forcingPoint(),
    piece: emptyPiece(),
    turns: { maxima: 0, minima: 0, maximumIn: 0, minimumIn: 0 },
    highest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    lowest: { index: 0, x: 0.5, position: 0.5, value: 0.5, curvature: 0.5 },
    warming: { rate: 0.5, apart: 0.5, position: 0.5, value: 0.5 },
    cooling: { rate: 0.5, apart: 0.5, position: 0.5, value: 0.5 },
    evenWave: { cosine: 0.5, sine: 0.5 },
    oddWave: { cosine: 0.5, sine: 0.5 },
    midpoints: new Float64Array(0),
    size: 0,
    halfCosines: new Float64Array(0),
    halfSines: new Float64Array(0),
    index: -1,
    x: 0.5,
    b: 0.5,
    world: null as unknown as World,
    state: null as unknown as PlainState,
    mean: 0.5,
    moving: false,
  };
}

export function begin(scratch: Scratch, world: World, state: PlainState): void {
  const { size } = state.solution;
  scratch.world = world;
  scratch.state = state;
  scratch.index = -1;
  scratch.forcing.moveTo(state.eccentricity);
  if (scratch.size === size) return;
  const { cosines, sines } = scratch.circle(2 * size);
  scratch.size = size;
  scratch.halfCosines = cosines;
  scratch.halfSines = sines;
}

/** Whether two halves of a trapezoidal sum agree well enough for the error of the whole, the square of their difference. */
export function isResolved(difference: number, size: number, tolerance: number): boolean {
  return Math.abs(difference) <= 0.1 * Math.sqrt(tolerance) * Math.abs(size);
}

/** Loads the piece that holds s in [0, 2π], and the forcing there. */
export function goTo(scratch: Scratch, s: Radians): void {
  const { size } = scratch.state.solution;
  const place = (s * size) / turn;
  const index = Math.min(size - 1, Math.floor(place));
  goToPiece(scratch, index);
  scratch.x = place - index;
  lookAround(scratch);
}

export function goToPiece(scratch: Scratch, index: number): void {
  if (scratch.index === index) return;
  scratch.index = index;
  loadNodePiece(scratch.state.solution, index, scratch.piece);
}

/** The forcing at the present place: the half-angle of the piece's left node is in the table of twice the size. */
export function lookAround({ halfCosines, halfSines, index, x, piece, forcing, point }: Scratch): void {
  const further = 0.5 * x * piece.width;
  const sine = smallSine(further);
  const cosine = smallCosine(further);
  const s = halfSines[index];
  const c = halfCosines[index];
  forcing.atHalfAngle(s * cosine + c * sine, c * cosine - s * sine, point);
}

/** φ(a/r)² + 1 − φ − y⁴ at the present point. */
export function heating({ state, point }: Scratch, y: number): number {
  const { share } = state;
  const squared = y * y;
  return (share * point.arrival) / point.clock + (1 - share) - squared * squared;
}

/** ∮ (y − ⟨y⟩) cos M dM and with sin M, up to a common factor. */
export interface Wave {
  cosine: number;
  sine: number;
}

export interface Fastest {
  /** |N|, dimensionless. */
  rate: number;
  /** How far it lies from the balance of fluxes there: what interpolation leaves in it. */
  apart: number;
  position: Radians;
  value: number;
}
