/**
 * How far each band is from ice: 0 all ice, 1 ice-free. The ramp w(T) of the albedo is averaged over the band on the line
 * through its own temperature and its neighbours': T runs linearly from the lower edge, where it is the mean with the band
 * below, to the middle and on to the upper edge; at a pole the last slope runs on to the edge. With W the primitive of w, the mean of w between temperatures a and b is
 * (W(b) − W(a))/(b − a). So the ice edge of a step or a narrow ramp moves through a band continuously, and a solution branch
 * has no staircase of false folds.
 */
import type { Kelvin } from '../../si.ts';
import type { Law } from '../../world.ts';

export interface WarmShare {
  /** Shares for band temperatures `temperature`. */
  into(temperature: Float64Array, share: Float64Array): void;
  /** The same with ∂share_i/∂T of the band below, the band itself and the band above. */
  slopesInto(
    temperature: Float64Array,
    share: Float64Array,
    below: Float64Array,
    here: Float64Array,
    above: Float64Array,
  ): void;
}

/** Between temperatures closer than this the mean is taken at their middle: the difference quotient would lose digits. */
const narrow: Kelvin = 1e-4;

/** The ramp itself, at one temperature: cubic smoothstep from 0 to 1; a step where its ends meet; 1 where there is none. */
export function rampWeight(ramp: { readonly from: Kelvin; readonly to: Kelvin } | null): Law {
  if (ramp === null) return { at: () => 1, slopeAt: () => 0 };
  const { from, to } = ramp;
  const width = to - from;
  return {
    at(t) {
      if (t >= to) return 1;
      if (t <= from) return 0;
      const u = (t - from) / width;
      return u * u * (3 - 2 * u);
    },
    slopeAt(t) {
      if (t >= to || t <= from) return 0;
      const u = (t - from) / width;
      return (6 * u * (1 - u)) / width;
    },
  };
}

/** `ramp` null: everything is warm. */
export function warmShare(ramp: { readonly from: Kelvin; readonly to: Kelvin } | null): WarmShare {
  if (ramp === null) {
    return {
      into: (_, share) => void share.fill(1),
      slopesInto: (_, share, below, here, above) => {
        share.fill(1);
        below.fill(0);
        here.fill(0);
        above.fill(0);
      },
    };
  }
  const { from, to } = ramp;
  const width = to - from;

  const { at: weight, slopeAt: weightSlope } = rampWeight(ramp);
  /** ∫ w dT from far below. */
  function primitive(t: Kelvin): number {
    if (t <= from) return 0;
    if (t >= to) return width / 2 + (t - to);
    const u = (t - from) / width;
    return width * u * u * u * (1 - u / 2);
  }
  /** A whole band on one side of the ramp: nothing to average. */
  function allBeyond(low: Kelvin, middle: Kelvin, high: Kelvin): boolean {
    return (low >= to && middle >= to && high >= to) || (low <= from && middle <= from && high <= from);
  }
  function mean(a: Kelvin, b: Kelvin): number {
    const step = b - a;
    return Math.abs(step) < narrow ? weight((a + b) / 2) : (primitive(b) - primitive(a)) / step;
  }

  return {
    into(temperature, share) {
      const last = temperature.length - 1;
      for (let i = 0; i <= last; i++) {
        const t = temperature[i];
        const low = i > 0 ? (temperature[i - 1] + t) / 2 : 1.5 * t - temperature[1] / 2;
        const high = i < last ? (t + temperature[i + 1]) / 2 : 1.5 * t - temperature[last - 1] / 2;
        share[i] = allBeyond(low, t, high) ? weight(t) : (mean(low, t) + mean(t, high)) / 2;
      }
    },
    slopesInto(temperature, share, below, here, above) {
      const last = temperature.length - 1;
      for (let i = 0; i <= last; i++) {
        const t = temperature[i];
        const low = i > 0 ? (temperature[i - 1] + t) / 2 : 1.5 * t - temperature[1] / 2;
        const high = i < last ? (t + temperature[i + 1]) / 2 : 1.5 * t - temperature[last - 1] / 2;
        if (allBeyond(low, t, high)) {
          share[i] = weight(t);
          below[i] = 0;
          here[i] = 0;
          above[i] = 0;
          continue;
        }
        const left = mean(low, t);
        const right = mean(t, high);
        share[i] = (left + right) / 2;
        // Slopes of the two half-band means by their outer end and by the middle.
        const leftOuter = slope(low, t, left, low);
        const leftMiddle = slope(low, t, left, t);
        const rightOuter = slope(t, high, right, high);
        const rightMiddle = slope(t, high, right, t);
        // An inner edge is half this band, half its neighbour; a pole is 3/2 of the last band less half of the one before.
        const ownLeft = i > 0 ? 0.5 : 1.5;
        const ownRight = i < last ? 0.5 : 1.5;
        here[i] = (leftMiddle + rightMiddle + ownLeft * leftOuter + ownRight * rightOuter) / 2;
        below[i] = ((i > 0 ? leftOuter : 0) - (i < last ? 0 : rightOuter)) / 4;
        above[i] = ((i < last ? rightOuter : 0) - (i > 0 ? 0 : leftOuter)) / 4;
      }
    },
  };

  /** ∂mean(a, b)/∂a or ∂b, whichever `end` is. */
  function slope(a: Kelvin, b: Kelvin, average: number, end: Kelvin): number {
    const step = b - a;
    if (Math.abs(step) < narrow) return weightSlope((a + b) / 2) / 2;
    return end === b ? (weight(b) - average) / step : (average - weight(a)) / step;
  }
}
