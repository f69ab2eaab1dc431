/** The lag of the first harmonic of a plain world, off the nodes. */
import { enter, enterUndefined, type Sheet } from '../../findings/sheet.ts';
import { balancedParameter } from '../../orbit/balanced.ts';
import { midpointValue } from '../../solve/periodicNodes.ts';
import { smallCosine, smallSine } from '../../solve/smallAngle.ts';
import { at } from './columns.ts';
import { still } from './entries.ts';
import { isResolved, type Scratch, turn, type Wave } from './plainScratch.ts';

/**
 * Phase of ⟨(T − ⟨T⟩) e^{iM}⟩; that of the steady value, even in s, is 0. e^{iM} is steeper than T near apoapsis of a long
 * orbit: where the nodes do not resolve it, the midpoints between them are taken in.
 */
export function enterHarmonicLag(scratch: Scratch, sheet: Sheet): boolean {
  const { world, state, moving, evenWave, oddWave } = scratch;
  if (!moving) {
    enterUndefined(sheet, at.lagOfFirstHarmonic, still);
    return true;
  }
  scratch.b = balancedParameter(state.eccentricity);
  addNodes(scratch);
  let isKnown = agree(evenWave, oddWave, state.tolerance);
  evenWave.cosine += oddWave.cosine;
  evenWave.sine += oddWave.sine;
  if (!isKnown) {
    addMidpoints(scratch);
    isKnown = agree(evenWave, oddWave, state.tolerance);
    evenWave.cosine += oddWave.cosine;
    evenWave.sine += oddWave.sine;
  }
  const phase = Math.atan2(evenWave.sine, evenWave.cosine);
  if (isKnown) enter(sheet, at.lagOfFirstHarmonic, (phase / turn) * world.orbit.period);
  return isKnown;
}

function agree(even: Wave, odd: Wave, tolerance: number): boolean {
  const difference = Math.abs(even.cosine - odd.cosine) + Math.abs(even.sine - odd.sine);
  return isResolved(difference, Math.abs(even.cosine + odd.cosine) + Math.abs(even.sine + odd.sine), tolerance);
}

/** The even nodes into one wave, the odd ones into the other. */
function addNodes(scratch: Scratch): void {
  const { state, evenWave, oddWave, b } = scratch;
  const { size, value } = state.solution;
  const mean = scratch.mean / state.scale;
  const squared = ((1 + b) / (1 - b)) ** 2;
  // Periapsis and apoapsis stand for themselves alone: e^{iM} = ±1, clock (1 ∓ b)²/(1 ± b)⁴.
  const periapsis = (value[0] - mean) / (squared * (1 + b) * (1 + b));
  const apoapsis = ((value[size / 2] - mean) * squared) / ((1 - b) * (1 - b));
  evenWave.cosine = periapsis - apoapsis;
  evenWave.sine = 0;
  oddWave.cosine = 0;
  oddWave.sine = 0;
  addPairs(scratch, value, size, 4, 4, evenWave);
  addPairs(scratch, value, size, 2, 4, oddWave);
}

/** The midpoints between the nodes into the odd wave. */
function addMidpoints(scratch: Scratch): void {
  const { state, oddWave } = scratch;
  const { solution } = state;
  const { size } = solution;
  if (scratch.midpoints.length < size) scratch.midpoints = new Float64Array(size);
  for (let i = 0; i < size; i++) scratch.midpoints[i] = midpointValue(solution, i);
  oddWave.cosine = 0;
  oddWave.sine = 0;
  addPairs(scratch, scratch.midpoints, size - 1, 1, 2, oddWave);
}

/**
 * Times s = πj/size, j = first, first + step … below size, with those mirrored in periapsis, which share cosine and clock;
 * ordinate j/2 stands there, and `mirror` − j/2 at the other. With z = e^{is}, e^{iE} = (z + b)/(1 + bz); the clock is D₋/D₊².
 */
function addPairs(
  scratch: Scratch,
  ordinate: Float64Array,
  mirror: number,
  first: number,
  step: number,
  wave: Wave,
): void {
  const { state, b, halfCosines, halfSines, size } = scratch;
  const { eccentricity } = state;
  const mean = scratch.mean / state.scale;
  const oneB2 = 1 + b * b;
  const oneMinusB2 = 1 - b * b;
  let cosineSum = wave.cosine;
  let sineSum = wave.sine;
  for (let j = first; j < size; j += step) {
    const i = j >> 1;
    const c = 2 * b * halfCosines[j];
    const inverse = 1 / (oneB2 + c);
    const sineE = oneMinusB2 * halfSines[j] * inverse;
    const cosineE = (oneB2 * halfCosines[j] + 2 * b) * inverse;
    // M = E − e sin E
    const sine = smallSine(eccentricity * sineE);
    const cosine = smallCosine(eccentricity * sineE);
    const clock = (oneB2 - c) * inverse * inverse;
    const there = ordinate[i] - mean;
    const back = ordinate[mirror - i] - mean;
    cosineSum += (there + back) * clock * (cosineE * cosine + sineE * sine);
    sineSum += (there - back) * clock * (sineE * cosine - cosineE * sine);
  }
  wave.cosine = cosineSum;
  wave.sine = sineSum;
}
