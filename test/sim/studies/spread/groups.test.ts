import { describe, expect, test } from 'vitest';
import { normalQuantile } from '../../../../sim/quantity/normalQuantile.ts';
import { goesInSteps, twoArcs, twoGroups } from '../../../../sim/studies/spread/groups.ts';
import { pseudoRandomDraws } from '../../../../sim/studies/spread/pseudoRandom.ts';

function drawn(draws: number, seed: number, quantile: (share: number) => number): Float64Array {
  const source = pseudoRandomDraws(seed);
  return Float64Array.from({ length: draws }, (_, draw) => quantile(source.at(draw, 0)));
}

/** A tenth frozen at 200 to 220 K, the others at 270 to 300 K. */
const frozenOrNot = (share: number) => (share < 0.1 ? 200 + 200 * share : 270 + ((share - 0.1) / 0.9) * 30);

describe('two groups', () => {
  test('their shares and ends, whatever the order and what is undefined', () => {
    const values = drawn(1000, 1, frozenOrNot);
    const below = values.filter((value) => value < 250);
    const above = values.filter((value) => value > 250);
    const groups = twoGroups(Float64Array.from([...values, Number.NaN, Number.NaN]));
    expect(groups).toEqual([
      { share: below.length / 1000, from: Math.min(...below), to: Math.max(...below) },
      { share: 1 - below.length / 1000, from: Math.min(...above), to: Math.max(...above) },
    ]);
    expect(twoGroups(values.toReversed())).toEqual(groups);
  });

  test('two values say yes or no; one value, or a few draws at the side, are no groups either', () => {
    const half = Float64Array.from({ length: 64 }, (_, draw) => draw % 2);
    expect(twoGroups(half)).toBeNull();
    expect(twoGroups(half.map((value, draw) => (value === 0 ? 0 : 1 + draw / 1000)))).toEqual([
      { share: 0.5, from: 0, to: 0 },
      { share: 0.5, from: 1.001, to: 1.063 },
    ]);
    expect(twoGroups(new Float64Array(64).fill(3))).toBeNull();
    expect(
      twoGroups(Float64Array.from({ length: 1000 }, (_, draw) => (draw < 24 ? 200 : 280 + draw / 1000))),
    ).toBeNull(); // 2.4 %
    expect(
      twoGroups(Float64Array.from({ length: 1000 }, (_, draw) => (draw < 25 ? 200 : 280 + draw / 1000))),
    ).not.toBeNull();
    expect(twoGroups(Float64Array.of(1, 2, 3))).toBeNull();
    expect(twoGroups(new Float64Array(100).fill(Number.NaN))).toBeNull();
  });

  test('a gap narrower than a fifth of the reach is none', () => {
    const apart = (gap: number) => (share: number) => (share < 0.5 ? share : share + gap);
    expect(twoGroups(drawn(4096, 1, apart(0.22)))).toBeNull(); // 0.22 of 1.22
    expect(twoGroups(drawn(4096, 1, apart(0.28)))).not.toBeNull(); // 0.28 of 1.28
  });

  // One in 50 would mean that a report of thirty findings is wrong every other time.
  test('no smooth distribution passes for two at 512 draws, not with tails over decades', () => {
    const smooth: Readonly<Record<string, (share: number) => number>> = {
      uniform: (share) => share,
      normal: normalQuantile,
      exponential: (share) => -Math.log1p(-share),
      logNormal: (share) => Math.exp(2 * normalQuantile(share)),
      fourDecades: (share) => 10 ** (4 * share),
      cauchy: (share) => Math.tan(Math.PI * (share - 0.5)),
      halfAtNothing: (share) => Math.max(0, share - 0.5),
    };
    for (const quantile of Object.values(smooth)) {
      for (let seed = 1; seed <= 50; seed++) expect(twoGroups(drawn(512, seed, quantile))).toBeNull();
    }
  });
});

describe('two groups on a circle', () => {
  /** Around 0 and around half a turn, 0.02 to either side. */
  const opposite = (share: number) =>
    drawn(1000, 1, (u) => (u < share ? u / share : 12.5 + (u - share) / (1 - share)) * 0.04 - 0.02);
  const wrapped = (turns: Float64Array) => turns.map((turn) => turn - Math.floor(turn));

  test.each([0.5, 0.3, 0.7])('opposite seasons: %s of the draws around the turn of the year are one group', (share) => {
    const turns = opposite(share);
    const early = turns.filter((turn) => turn < 0.25);
    const late = turns.filter((turn) => turn > 0.25);
    for (const mean of [null, 0.5, 0.7]) {
      const groups = twoArcs(Float64Array.from([...wrapped(turns), Number.NaN]), mean)!;
      for (const [i, part] of [early, late].entries()) {
        expect(groups[i]!.share).toBeCloseTo(part.length / 1000, 12);
        expect(groups[i]!.from).toBeCloseTo(Math.min(...part), 12);
        expect(groups[i]!.to).toBeCloseTo(Math.max(...part), 12);
      }
    }
    // the group that holds the mean stands where the mean does
    expect(twoArcs(wrapped(turns), 1.01)!.map(({ from }) => Math.round(from))).toEqual([0, 1]);
    expect(twoArcs(wrapped(turns), 1.01)![0].from).toBeCloseTo(Math.min(...late), 12);
  });

  test('exactly two times are two groups, which stand where they are; one time, and one time but for rounding, are none', () => {
    const two = Float64Array.from({ length: 100 }, (_, draw) => (draw < 30 ? 0 : 0.5));
    expect(twoArcs(two, 0.5)).toEqual([
      { share: expect.closeTo(0.3, 12), from: 0, to: 0 },
      { share: 0.7, from: 0.5, to: 0.5 },
    ]);
    expect(twoArcs(new Float64Array(100).fill(0.2), 0.2)).toBeNull();
    expect(
      twoArcs(
        two.map((turn) => (turn === 0 ? 1 - 1e-16 : 1e-16)),
        0,
      ),
    ).toBeNull();
    expect(twoArcs(new Float64Array(100).fill(Number.NaN), null)).toBeNull();
  });

  test('smooth distributions of a circle are one group, wherever they lie', () => {
    const smooth = {
      uniform: (share: number) => share,
      normal: (share: number) => 0.05 * normalQuantile(share),
      wide: (share: number) => 0.2 * normalQuantile(share),
      exponential: (share: number) => -0.1 * Math.log1p(-share),
    };
    for (const quantile of Object.values(smooth))
      for (let seed = 1; seed <= 50; seed++)
        expect(twoArcs(wrapped(drawn(512, seed, (share) => quantile(share) + seed / 50)), null)).toBeNull();
  });
});

test('what goes in steps whatever the planet is not looked at', () => {
  for (const name of [
    'climates',
    'hottestLatitude',
    'orbitMeanInWindow.temperate',
    'longestSeasonLatitude.sea',
    'alwaysFraction.sea',
  ])
    expect(goesInSteps(name)).toBe(true);
  for (const name of ['temperatureMean', 'iceFractionMean', 'iceEdgeNorthMin', 'fractionInWindow.sea'])
    expect(goesInSteps(name)).toBe(false);
});
