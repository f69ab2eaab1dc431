/** The chart that holds every plain lumped world: damping and lag over eccentricity and heat-store number. */
import { largestEccentricity, plainResponder } from './plainResponse.ts';
import type { UniversalPlace } from './storeNumber.ts';

export interface UniversalChart {
  readonly eccentricities: Float64Array;
  readonly storeNumbers: Float64Array;
  /** (eccentricities, storeNumbers) row-major. */
  readonly damping: Float64Array;
  /** The same; share of the orbit. */
  readonly lag: Float64Array;
}

/** Of what a chart can show, a hundredth of a line's width. */
const tolerance = 1e-6;
const usual = { eccentricity: 0.95, decades: [-2, 2] } as const;
const rows = 41;
const columnsPerDecade = 15;

/** Nodes of a chart with room for these places: 0 to 0.95 by 0.01 to 100, and more where a place lies beyond. */
export function chartNodes(places: readonly Pick<UniversalPlace, 'eccentricity' | 'storeNumber'>[]): {
  eccentricities: Float64Array;
  storeNumbers: Float64Array;
} {
  const decades = places.map(({ storeNumber }) => Math.log10(storeNumber));
  const low = Math.min(usual.decades[0], ...decades.map((at) => Math.floor(at - 0.1)));
  const high = Math.max(usual.decades[1], ...decades.map((at) => Math.ceil(at + 0.1)));
  const isBeyond = places.some(({ eccentricity }) => eccentricity > 0.99 * usual.eccentricity);
  const most = isBeyond ? largestEccentricity : usual.eccentricity;
  const columns = (high - low) * columnsPerDecade;
  return {
    eccentricities: Float64Array.from({ length: rows }, (_, row) => (most * row) / (rows - 1)),
    storeNumbers: Float64Array.from({ length: columns + 1 }, (_, at) => 10 ** (low + at / columnsPerDecade)),
  };
}

/**
 * Every node by the lumped model's solver; a chart of 41 × 61 takes about as long as a screen takes to be drawn.
 * Errors: SimError where a node is none that `plainResponder` takes.
 */
export function universalChart(nodes: {
  readonly eccentricities: Float64Array;
  readonly storeNumbers: Float64Array;
}): UniversalChart {
  const { eccentricities, storeNumbers } = nodes;
  const respond = plainResponder();
  const damping = new Float64Array(eccentricities.length * storeNumbers.length);
  const lag = new Float64Array(damping.length);
  eccentricities.forEach((eccentricity, row) => {
    storeNumbers.forEach((storeNumber, column) => {
      const at = row * storeNumbers.length + column;
      const response = respond(eccentricity, storeNumber, tolerance);
      damping[at] = response.damping;
      lag[at] = response.lag;
    });
  });
  return { eccentricities, storeNumbers, damping, lag };
}
