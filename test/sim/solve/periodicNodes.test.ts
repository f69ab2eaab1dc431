import { describe, expect, test } from 'vitest';
import { curveValue, emptyPiece, periodicCurve, pieceValue } from '../../../sim/solve/curve.ts';
import { extremes } from '../../../sim/solve/features.ts';
import {
  loadNodePiece,
  midpointValue,
  type Nodes,
  placeOfLevel,
  type Turn,
  turnInto,
  turnsInto,
} from '../../../sim/solve/periodicNodes.ts';

// f(s) = cos(s − 1) + 0.1 sin 2s with its derivatives: one maximum and one minimum.
const f = (s: number) => Math.cos(s - 1) + 0.1 * Math.sin(2 * s);
const slope = (s: number) => -Math.sin(s - 1) + 0.2 * Math.cos(2 * s);
const curvature = (s: number) => -Math.cos(s - 1) - 0.4 * Math.sin(2 * s);

function nodesOf(size: number): Nodes {
  const at = (g: (s: number) => number) =>
    Float64Array.from({ length: 2 * size }, (_, i) => g((2 * Math.PI * i) / size)); // longer than size, as buffers are
  return { size, value: at(f), slope: at(slope), curvature: at(curvature) };
}

describe.each([16, 64])('%i nodes', (size) => {
  const nodes = nodesOf(size);
  const curve = periodicCurve(size, nodes.value, nodes.slope, nodes.curvature, 1);
  const piece = emptyPiece();
  const turns = { maxima: 0, minima: 0, maximumIn: 0, minimumIn: 0 };
  const turn: Turn = { index: 0, x: 0, position: 0, value: 0, curvature: 0 };

  test('the pieces are those of the curve', () => {
    for (let index = 0; index < size; index++) {
      loadNodePiece(nodes, index, piece);
      const s = (2 * Math.PI * (index + 0.3)) / size;
      expect(pieceValue(piece, 0.3)).toBeCloseTo(curveValue(curve, s), 13);
      expect(midpointValue(nodes, index)).toBeCloseTo(curveValue(curve, (2 * Math.PI * (index + 0.5)) / size), 13);
    }
  });

  test('the turning points are those of the curve, and close to those of the function', () => {
    turnsInto(nodes, turns);
    expect([turns.maxima, turns.minima]).toEqual([1, 1]);
    const { highest, lowest } = extremes(curve);
    for (const [index, found] of [
      [turns.maximumIn, highest],
      [turns.minimumIn, lowest],
    ] as const) {
      turnInto(nodes, index, piece, turn);
      expect(turn.position).toBeCloseTo(found.position, 12);
      expect(turn.value).toBeCloseTo(found.value, 13);
      expect(turn.curvature).toBeCloseTo(found.curvature, 10);
      // Quintic pieces: slopes err by h⁵ times a sixth derivative of about 6, over 720.
      expect(Math.abs(slope(turn.position))).toBeLessThan(((2 * Math.PI) / size) ** 5 * 0.1);
    }
  });

  test('a level is passed where the piece has it', () => {
    loadNodePiece(nodes, 3, piece);
    const level = 0.7 * pieceValue(piece, 0) + 0.3 * pieceValue(piece, 1);
    expect(pieceValue(piece, placeOfLevel(piece, level, 0, 1))).toBeCloseTo(level, 14);
    expect(placeOfLevel(piece, pieceValue(piece, 0.25), 0.2, 0.9)).toBeCloseTo(0.25, 12);
  });
});

test('the last piece ends where the first begins', () => {
  // A maximum between the last node and the first: cos, seen half a step late.
  const size = 16;
  const late = Math.PI / size;
  const at = (g: (s: number) => number) =>
    Float64Array.from({ length: size }, (_, i) => g((2 * Math.PI * i) / size + late));
  const nodes = { size, value: at(Math.cos), slope: at((s) => -Math.sin(s)), curvature: at((s) => -Math.cos(s)) };
  const turns = { maxima: 0, minima: 0, maximumIn: 0, minimumIn: 0 };
  turnsInto(nodes, turns);
  expect(turns).toEqual({ maxima: 1, minima: 1, maximumIn: size - 1, minimumIn: size / 2 - 1 });
});
