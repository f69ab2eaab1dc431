/** Grids of an invented planet whose numbers follow a formula: the first-order response, with the swing of an eccentric orbit. */

import type { CaseInput } from '../../sim/scenario/types.ts';
import type { GridAxis, GridCase, GridFinding, GridMember, GridReport } from '../../sim/studies/grid/gridReport.ts';

type Axis = GridAxis & { readonly at: 'eccentricity' | 'heatCapacity' };

const steps = (from: number, to: number, count: number): number[] =>
  Array.from({ length: count }, (_, at) => from + ((to - from) * at) / (count - 1));

export const eccentricityAxis = (count = 31): Axis => ({
  at: 'eccentricity',
  key: 'orbit.eccentricity',
  label: 'Eccentricity',
  unit: '1',
  log: false,
  nodes: Float64Array.from(steps(0, 0.9, count)),
});

export const heatCapacityAxis = (count = 41): Axis => ({
  at: 'heatCapacity',
  key: 'planet.heatStore.heatCapacity',
  label: 'Heat capacity',
  unit: 'J/m2/K',
  log: true,
  nodes: Float64Array.from(steps(4, 9, count), (power) => 10 ** power),
});

export const period = 120 * 86_400;
const textbook = 290;
/** J m⁻² K⁻¹ for a heat-store number of one. */
export const perNumber = 9.1e6;

interface Point {
  readonly eccentricity: number;
  readonly heatCapacity: number;
}

/** SI, at one node. */
export function formula({ eccentricity, heatCapacity }: Point): Record<string, number | null> {
  const n = heatCapacity / perNumber;
  const damping = 1 / Math.hypot(1, n);
  const [near, far] = [(1 - eccentricity) ** -0.5, (1 + eccentricity) ** -0.5];
  const mean = (1 - eccentricity ** 2) ** -0.125;
  const lag = (Math.atan(n) / (2 * Math.PI)) * (1 - eccentricity) ** 0.8;
  const isRound = eccentricity === 0;
  return {
    period,
    temperatureMean: textbook * mean,
    temperatureMax: textbook * (mean + damping * (near - mean)),
    temperatureMin: textbook * (mean - damping * (mean - far)),
    timeOfMax: isRound ? null : lag * period,
    // On both sides of periapsis.
    timeOfFastestWarming: isRound ? null : (1 + 0.06 * Math.log10(n) - 0.03) * period - (n > 1 ? period : 0),
    lagOfMax: isRound ? null : lag * period,
    lagOfMaxOrbits: isRound ? null : lag,
    damping: isRound ? null : damping,
    radiativeTimeConstant: (n * period) / (2 * Math.PI),
    fastestWarming: (textbook * damping * (near - far) * 8) / period,
    'fractionInWindow.mild': Math.max(0, Math.min(1, 1.6 - damping - eccentricity)),
  };
}

const about: readonly (readonly [name: string, label: string, unit: string, circular?: true])[] = [
  ['period', 'Orbital period', 's'],
  ['radiativeTimeConstant', 'Radiative time constant', 's'],
  ['temperatureMax', 'Maximum temperature', 'K'],
  ['temperatureMin', 'Minimum temperature', 'K'],
  ['temperatureMean', 'Mean temperature', 'K'],
  ['timeOfMax', 'Time of maximum, after periapsis', 's', true],
  ['timeOfFastestWarming', 'Time of fastest warming', 's', true],
  ['lagOfMax', 'Lag of the maximum behind the steady maximum', 's'],
  ['lagOfMaxOrbits', 'Lag of the maximum, in orbits', '1'],
  ['damping', 'Damping (swing over steady swing)', '1'],
  ['fastestWarming', 'Fastest warming', 'K/s'],
  ['fractionInWindow.mild', 'Time in “mild”', '1'],
];

export interface GridCaseOptions {
  readonly name?: string;
  readonly index?: number;
  readonly own?: Point;
  readonly failed?: readonly number[];
}

/** One case on the axes; what is not along an axis is as `own` has it. */
export function gridCase(axes: readonly Axis[], options: GridCaseOptions = {}): GridCase {
  const { name = 'shallow sea', index = 0, own = { eccentricity: 0.42, heatCapacity: 2.1e7 }, failed = [] } = options;
  const points = axes.reduce<Point[]>(
    (made, { at, nodes }) => made.flatMap((point) => Array.from(nodes, (node) => ({ ...point, [at]: node }))),
    [own],
  );
  const findings = about.map(([finding, label, unit, circular = false]): GridFinding => {
    const values = points.map((point, node) => (failed.includes(node) ? null : formula(point)[finding]!));
    return { name: finding, label, unit, circular, values };
  });
  return {
    name,
    model: 'lumped',
    findings,
    failed: failed.map((node) => ({ node, message: 'the periapsis lies inside the star' })),
    warnings: [],
    notes: [],
    members: [gridMember(axes, own, { name, index })],
  };
}

/** A case of the scenario at its own point. */
export function gridMember(
  axes: readonly Axis[],
  own: Point,
  { name, index }: Pick<GridMember, 'name' | 'index'>,
): GridMember {
  return {
    name,
    index,
    own: axes.map(({ at }) => own[at]),
    universal: {
      eccentricity: own.eccentricity,
      storeNumber: own.heatCapacity / perNumber,
      heatCapacityPerNumber: perNumber,
    },
    inputs: [
      input('star.luminosity', 'Luminosity', 0.31 * 3.828e26, 'W', '0.31 Lsun', 'Lsun'),
      input('orbit.semiMajorAxis', 'Semi-major axis', 0.41 * 149_597_870_700, 'm', '0.41 au', 'au'),
      input('orbit.eccentricity', 'Eccentricity', own.eccentricity, '1', String(own.eccentricity), '1'),
      input(
        'planet.heatStore.heatCapacity',
        'Heat capacity',
        own.heatCapacity,
        'J/m2/K',
        `${own.heatCapacity} J/m2/K`,
        'J/m2/K',
      ),
    ],
  };
}

function input(key: string, label: string, value: number, unit: string, text: string, writtenUnit: string): CaseInput {
  const distribution = { form: 'exact', value } as unknown as CaseInput['distribution'];
  return { key, label, value, unit, text, writtenUnit, distribution, isDefault: false, used: true };
}

export function gridOf(axes: readonly GridAxis[], cases: readonly GridCase[], hold: string | null = null): GridReport {
  return {
    program: { name: 'perilag', version: '0.0.0' },
    scenario: {
      title: 'How late is summer on Vessarine?',
      notes: 'An invented planet.',
      file: 'vessarine.yaml',
      sha256: 'cd'.repeat(32),
    },
    axes: axes.map(({ key, label, unit, log, nodes }) => ({ key, label, unit, log, nodes })),
    hold,
    cases,
    notes: [],
  };
}

/** Three cases over two inputs. */
export function mapGrid(): GridReport {
  const axes = [eccentricityAxis(), heatCapacityAxis()];
  return gridOf(axes, [
    gridCase(axes),
    gridCase(axes, {
      name: 'thin air',
      index: 1,
      own: { eccentricity: 0.42, heatCapacity: 6e5 },
      failed: [1268, 1269, 1270, 1227, 1228],
    }),
    gridCase(axes, { name: 'deep sea', index: 2, own: { eccentricity: 0.42, heatCapacity: 4e8 } }),
  ]);
}

/** Three cases along one input. */
export function curveGrid(axis = eccentricityAxis()): GridReport {
  return gridOf(
    [axis],
    [
      gridCase([axis]),
      gridCase([axis], {
        name: 'thin air',
        index: 1,
        own: { eccentricity: 0.42, heatCapacity: 6e5 },
        failed: [29, 30],
      }),
      gridCase([axis], { name: 'deep sea', index: 2, own: { eccentricity: 0.3, heatCapacity: 4e8 } }),
    ],
  );
}

/** Cases that are no plain worlds. */
export function unplaced(cases: readonly GridCase[]): GridCase[] {
  return cases.map((one) => ({ ...one, members: one.members.map((member) => ({ ...member, universal: null })) }));
}

/** The three cases as one, over their heat store: what sets them apart is replaced. */
export function togetherGrid(axis = heatCapacityAxis()): GridReport {
  const { cases, ...rest } = curveGrid(axis);
  const members = cases.flatMap((one) => one.members);
  return { ...rest, cases: [{ ...cases[0]!, name: members.map(({ name }) => name).join(' = '), members }] };
}
