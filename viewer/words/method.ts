/** How this run was computed: the equations that it used, each with its source; and what its numbers are not. Pure. */
import type { RunResult } from '../../sim/run.ts';
import type { CaseInput } from '../../sim/scenario/types.ts';
import { hasLatitude } from './latitude.ts';
import { latitudeRules, latitudeSolutionRules } from './latitudeMethod.ts';
import type { Rule, Step, Used } from './rule.ts';

const always = (): boolean => true;
const having =
  (key: string) =>
  (used: Used): boolean =>
    used.has(key);

const rules: readonly Rule[] = [
  {
    when: always,
    step: {
      words: 'What arrives from the star, at the distance that Kepler’s laws give.',
      equation: 'S(r) = L / (4πr²),  r = a(1 − e²) / (1 + e cos ν)',
      source: 'Meeus (1998), Astronomical Algorithms, 2nd ed., eq. 25.5 and ch. 30',
    },
  },
  {
    when: ({ asOne }) => asOne,
    step: {
      words:
        'One heat store per square metre of surface takes up what is absorbed, and q from inside; it loses what is emitted.',
      equation: 'C dT/dt = f (1 − A) S(r) + q − E(T)',
    },
  },
  ...latitudeRules,
  {
    when: (used) => !used.has('planet.emission'),
    step: { words: 'A grey body emits.', equation: 'E(T) = ε σ T⁴', source: 'Stefan–Boltzmann law; σ: CODATA 2018' },
  },
  {
    when: having('planet.emission.opticalDepth'),
    step: {
      words: 'The surface emits through a grey atmosphere of infrared optical depth τ.',
      equation: 'E(T) = σ T⁴ / (1 + ¾ τ)',
      source: 'Eddington approximation; Goody & Yung (1989), Atmospheric Radiation, 2nd ed., ch. 9',
    },
  },
  {
    when: having('planet.emission.linear'),
    step: {
      words: 'Emission is linear in temperature, T in °C.',
      equation: 'E(T) = a + b T',
      source: 'Budyko (1969), Tellus 21, 611; North, Cahalan & Coakley (1981), Rev. Geophys. 19, 91',
    },
  },
  {
    when: having('planet.albedo'),
    step: {
      words: 'Ice brightens the surface: the albedo falls from its ice value to its warm one between two temperatures.',
      equation:
        'A(T) = A_{ice} + (A_{warm} − A_{ice}) x² (3 − 2x),  x = (T − T_{from}) / (T_{to} − T_{from}), held in 0…1',
      source: 'Ice–albedo feedback: Budyko (1969), Tellus 21, 611; Sellers (1969), J. Appl. Meteorol. 8, 392',
    },
  },
  {
    when: having('planet.heatStore.mixedLayer'),
    step: {
      words: 'A stirred ocean of depth d stores heat as a whole.',
      equation: 'C = ρ c d',
      source: 'Sea water: Gill (1982), Atmosphere–Ocean Dynamics, app. 3',
    },
  },
  {
    when: having('planet.heatStore.atmosphere'),
    step: {
      words: 'A column of air with surface pressure p stores heat as a whole.',
      equation: 'C = p c_{p} / g',
      source: 'Pierrehumbert (2010), Principles of Planetary Climate',
    },
  },
  {
    when: having('planet.heatStore.ground'),
    step: {
      words:
        'Ground of thermal inertia Γ is one store with the quadrature part of a half-space’s response in a cycle of length P.',
      equation: 'C = Γ √(P / 4π)',
      source: 'Half-space: Carslaw & Jaeger (1959), Conduction of Heat in Solids, 2nd ed., § 2.6',
    },
  },
  {
    when: ({ asOne }) => asOne,
    step: {
      words:
        'The steady value balances absorption and emission at every moment; the textbook has one number for the whole orbit.',
      equation: 'E(T_{steady}) = f (1 − A) S(r) + q,  T_{eq} = [L (1 − A) / (16πσa²)]^{¼}',
    },
  },
  ...latitudeSolutionRules,
  {
    when: ({ periodic, asOne }) => periodic && asOne,
    step: {
      words:
        'The orbit that repeats itself is solved for directly, all its steps at once; no start has to fade. The tolerance bounds the relative error of every temperature.',
    },
  },
  {
    when: ({ forward }) => forward,
    step: { words: 'A run from a start follows the temperature step by step, to the same tolerance.' },
  },
  {
    when: ({ accounts }) => accounts,
    step: {
      words: 'The first account compares the orbit-mean instellation with its closed form.',
      equation: '⟨S⟩ = L / (4πa² √(1 − e²))',
      source: 'Williams & Pollard (2002), Int. J. Astrobiology 1, 61',
    },
  },
  {
    when: ({ habitableLimits }) => habitableLimits,
    step: {
      words:
        'Habitable limits, where a window names them, are those for planets of one Earth mass under stars of 2600 to 7200 K.',
      source: 'Kopparapu et al. (2014), ApJ 787, L29',
    },
  },
];

export function methodSteps(result: RunResult): Step[] {
  return stepsFor(usedBy(result));
}

export function stepsFor(used: Used): Step[] {
  return rules.filter(({ when }) => when(used)).map(({ step }) => step);
}

function usedBy({ cases }: RunResult): Used {
  const states = cases.flatMap(({ states: own }) => own);
  const labels = states.map(({ label }) => label);
  return {
    ...usedInputs(cases.flatMap(({ inputs }) => inputs)),
    byLatitude: states.some(hasLatitude),
    asOne: !states.every(hasLatitude),
    periodic: labels.some((label) => label !== 'forward'),
    forward: labels.includes('forward'),
    accounts: true,
  };
}

export function usedInputs(given: readonly CaseInput[]): Pick<Used, 'has' | 'says' | 'habitableLimits'> {
  const inputs = given.map(({ key, text }) => ({ key: key.replace(/\.\d+(?=\.|$)/g, ''), text }));
  return {
    has: (wanted) => inputs.some(({ key }) => key === wanted || key.startsWith(`${wanted}.`)),
    says: (wanted, text) => inputs.some((input) => input.key === wanted && input.text === text),
    habitableLimits: inputs.some(({ key }) => /^windows\..*\.habitable$/.test(key)),
  };
}

/** The usual cautions: they stand beside every page of numbers. */
export function cautions(result: RunResult): string[] {
  return [...modelCautions(usedBy(result)), ...alwaysSaid];
}

/** What the models leave out. */
export function modelCautions({ asOne, byLatitude }: Pick<Used, 'asOne' | 'byLatitude'>): string[] {
  return [
    ...(asOne
      ? [
          'No clouds, no winds or currents, no chemistry: one temperature stands for the whole surface, and real worlds move heat, cover themselves and change what they are made of.',
        ]
      : []),
    ...(byLatitude
      ? [
          'By latitude, one temperature stands for the whole circle and the whole day: no clouds, no mountains, no weather; winds and currents are a single number D that spreads heat as if it diffused.',
        ]
      : []),
  ];
}

/** Stands beside every page of numbers. */
export const planningCaution =
  'These are planning figures. They are no basis for qualifying hardware or for anyone’s safety: that is for licensed practice and test.';

const alwaysSaid: readonly string[] = [
  planningCaution,
  'Times for observing come from the observatory’s own tools; a date here is as good as the orbit it was made from.',
  'A “±” is the numerical error of the solution and says nothing of how well the inputs are known.',
];

export const argumentOfPeriapsisNote =
  'The argument of periapsis ω follows the radial-velocity convention: it is that of the star’s orbit, so a transit falls at true anomaly 90° − ω.';
