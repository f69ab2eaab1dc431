import { expect, test } from 'vitest';
import { spreadSummary } from '../../../../cli/output/spreadSummary.ts';
import { SimError } from '../../../../sim/error.ts';
import { originOf } from '../../../../sim/origin.ts';
import { readScenario } from '../../../../sim/scenario/read.ts';
import { designPlace, furtherRuns } from '../../../../sim/studies/spread/indexDesign.ts';
import { planSpread, type SpreadPlan } from '../../../../sim/studies/spread/plan.ts';
import { type SpreadTables, summariseSpread } from '../../../../sim/studies/spread/summariseSpread.ts';

const text = `star: { luminosity: 0.52 Lsun, mass: 0.85 Msun }
orbit: { semiMajorAxis: 0.48 au, eccentricity: 0.3 to 0.6 }
planet: { bondAlbedo: 0.1 to 0.5, heatStore: { mixedLayer: 20 m } }
`;
const draws = 512;
const plan = planSpread({ text, file: 'one.yaml', only: null, draws, seed: 1, sampling: 'sobol', samples: null });
const origin = originOf(readScenario(text, 'one.yaml'), { sha256: '', version: '1' });

/** Every column is 1, but for those that are told. */
function tables(told: Partial<SpreadTables>): SpreadTables {
  const ones = async () => new Float64Array(draws).fill(1);
  return { draws: ones, bands: null, indices: null, failed: 0, bandDraws: draws, indexRows: draws, ...told };
}

test('a centre that is not known, and curves that no draw has: the draws are told all the same', async () => {
  const one = plan.cases[0]!;
  const fault = () => {
    throw new SimError('solve.tolerance', 'the state is not known to it', 'Raise it');
  };
  const lost: SpreadPlan = {
    ...plan,
    cases: [{ ...one, drawn: { ...one.drawn, builtAt: fault }, batch: { ...one.batch, into: fault } }],
  };
  const ones = async () => new Float64Array(draws).fill(1);
  const [told] = (await summariseSpread(lost, origin, tables({ bands: ones }))).cases;
  expect(told!.findings.every(({ atCentre, summary }) => atCentre === null && summary.defined === 1)).toBe(true);
  expect(told!.findings.find(({ name }) => name === 'temperatureMean')!.summary.mean).toBe(1);
  expect(told!.bands).toEqual([]);
  const none = async () => new Float64Array(draws).fill(Number.NaN);
  expect((await summariseSpread(plan, origin, tables({ bands: none }))).cases[0]!.bands).toEqual([]);
  expect((await summariseSpread(plan, origin, tables({ bands: ones }))).cases[0]!.bands).toHaveLength(1);
});

test('times on both sides of periapsis lie on one line, those of the further runs too', async () => {
  const period = 400;
  // 10 s before periapsis to 10 s after, by the first input alone
  const timeAt = (share: number) => (period + 20 * (share - 0.5)) % period;
  const column = (rows: number, timeOf: (row: number) => number) => async (name: string) =>
    Float64Array.from({ length: rows }, (_, row) => (name === 'timeOfMax' ? timeOf(row) : period));
  const further = furtherRuns(draws, 2);
  const report = await summariseSpread(
    plan,
    origin,
    tables({
      draws: column(draws, (row) => timeAt(plan.draws.at(row, 0))),
      indices: column(further, (run) => {
        const { row, changed } = designPlace(run, 2);
        return timeAt(plan.draws.at(row, changed === 'all' || changed === 0 ? 2 : 0));
      }),
    }),
  );
  const { summary, circular, histogram, importance } = report.cases[0]!.findings.find(
    ({ name }) => name === 'timeOfMax',
  )!;
  expect(circular).toBe(true);
  const { '2.5': low, '50': median, '97.5': high } = summary.percentiles!;
  expect(Math.abs(summary.mean!)).toBeLessThan(0.1);
  expect(Math.abs(median)).toBeLessThan(0.1);
  expect(high - low).toBeCloseTo(19, 1); // 95 % of 20 s; 512 points in equal intervals
  expect(histogram!.to - histogram!.from).toBeLessThan(20);
  const [first, second] = importance.total!;
  expect(first!.value).toBeCloseTo(1, 1);
  expect(Math.abs(second!.value)).toBeLessThan(1e-9);
});

test('a run at the centre is told in the turn of the median, in its own seconds', async () => {
  const one = plan.cases[0]!;
  const at = (name: string) => one.findings.findIndex((finding) => finding.name === name);
  const told = async (centreTime: number, drawTime: number) => {
    const into = (_: unknown, row: Float64Array) => {
      row[at('period')] = 410;
      row[at('timeOfMax')] = centreTime;
      return true;
    };
    const moved: SpreadPlan = { ...plan, cases: [{ ...one, batch: { ...one.batch, into } }] };
    const column = async (name: string) => new Float64Array(draws).fill(name === 'timeOfMax' ? drawTime : 400);
    const [found] = (await summariseSpread(moved, origin, tables({ draws: column }))).cases;
    return found!.findings[at('timeOfMax')]!;
  };
  const after = await told(405, 2);
  expect([after.atCentre, after.summary.percentiles!['50']]).toEqual([-5, 2]);
  const before = await told(3, 398);
  expect(before.atCentre).toBe(3);
  expect(before.summary.mean).toBeCloseTo(-2, 9);
  const late = await told(3, 290); // below three quarters: the turn that has begun
  expect(late.summary.percentiles!['50']).toBeCloseTo(290, 9);
  expect(late.atCentre).toBe(413);
});

test.each([0.5, 0.3])(
  'opposite seasons, %s of the draws about periapsis: two groups with their own shares',
  async (share) => {
    const period = 400 * 86_400;
    // 8 d around periapsis, and around half an orbit after it
    const timeAt = (draw: number) => {
      const u = plan.draws.at(draw, 0);
      const days = u < share ? 8 * (u / share - 0.5) : 200 + 8 * ((u - share) / (1 - share) - 0.5);
      return ((days + 400) % 400) * 86_400;
    };
    const column = async (name: string) =>
      Float64Array.from({ length: draws }, (_, draw) => (name === 'timeOfMax' ? timeAt(draw) : period));
    const [told] = (await summariseSpread(plan, origin, tables({ draws: column }))).cases;
    const { groups } = told!.findings.find(({ name }) => name === 'timeOfMax')!;
    expect(groups!.map(({ share }) => share)).toEqual([expect.closeTo(share, 2), expect.closeTo(1 - share, 2)]);
    const ends = groups!.flatMap(({ from, to }) => [from / 86_400, to / 86_400]);
    for (const [i, end] of [-4, 4, 196, 204].entries()) expect(Math.abs(ends[i]! - end)).toBeLessThan(0.1);
    expect(told!.warnings.find((text) => text.startsWith('Time of maximum'))).toMatch(
      share === 0.5
        ? /two groups on the orbit, 50 % of them from −?-?[34]\.\d+ to [34]\.?\d* d and 50 % of them from 196/
        : /two groups on the orbit, 30 % of them from −?-?[34]\.\d+ to [34]\.?\d* d and 70 % of them from 196/,
    );
  },
);

test('what was cut away, and rows that indices lack, are among the warnings', async () => {
  const wide = planSpread({ ...plan.setup, text: text.replace('0.1 to 0.5', '0.1 ± 0.2') });
  // in a tenth of the rows the run of B lacks the damping
  const further = furtherRuns(draws, 2);
  const value = (row: number) => wide.draws.at(row, 0);
  const report = await summariseSpread(
    wide,
    origin,
    tables({
      draws: async () => Float64Array.from({ length: draws }, (_, row) => value(row)),
      indices: async (name) =>
        Float64Array.from({ length: further }, (_, run) => {
          const { row, changed } = designPlace(run, 2);
          if (name === 'damping' && changed === 'all' && row % 10 === 0) return Number.NaN;
          return wide.draws.at(row, changed === 'all' || changed === 0 ? 2 : 0);
        }),
    }),
  );
  const [told] = report.cases;
  const importance = (name: string) => told!.findings.find((one) => one.name === name)!.importance;
  expect(importance('damping').leftOut).toBeCloseTo(52 / 512, 12);
  expect(importance('temperatureMean').leftOut).toBe(0);
  expect(told!.warnings).toContainEqual(expect.stringMatching(/of planet\.bondAlbedo 0\.1 ± 0\.2 lies beyond what/));
  expect(told!.warnings).toContainEqual(expect.stringMatching(/indices of Damping.* leave out 10 % of the rows/));
  const summary = spreadSummary(report).cases[0]!;
  expect(summary.importance.damping).toMatchObject({ leftOut: 52 / 512 });
  expect(summary.warnings).toEqual(told!.warnings);
});

test('a finding that some draws lack: the share that has it, and why one lacks it, in the words of the model', async () => {
  const circle = text.replace('0.3 to 0.6', '0');
  const round = planSpread({
    text: circle,
    file: 'c.yaml',
    only: null,
    draws,
    seed: 1,
    sampling: 'sobol',
    samples: null,
  });
  // draw 3 failed; draws 7 and on lack the damping; all lack the lag
  const column = async (name: string) =>
    Float64Array.from({ length: draws }, (_, draw) => {
      const lacks = draw === 3 || (name === 'damping' && draw >= 7) || name === 'lagOfMax';
      return lacks ? Number.NaN : 1;
    });
  const [told] = (await summariseSpread(round, origin, tables({ draws: column }))).cases;
  const finding = (name: string) => told!.findings.find((one) => one.name === name)!;
  expect(told!.failed).toBe(1);
  expect(finding('damping').summary.defined).toBe(6 / draws);
  expect(finding('damping').missingBecause).toBe('the instellation does not vary on a circular orbit');
  expect(finding('lagOfMax').summary).toMatchObject({ mean: null, defined: 0, reason: 'no draw has a value' });
  expect(finding('lagOfMax').missingBecause).toBe('the temperature does not vary');
  // a failed draw lacks it, but not for a reason of its own
  expect(finding('temperatureMean').missingBecause).toBeNull();
});
