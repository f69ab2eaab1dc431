/** How temperatures by latitude were computed, for `method.ts`. Pure. */
import type { Rule } from './rule.ts';

/** The physics, after what arrives from the star. */
export const latitudeRules: readonly Rule[] = [
  {
    when: ({ byLatitude }) => byLatitude,
    step: {
      words:
        'Each latitude φ has its own temperature: it takes up what it absorbs, q from inside, and what transport brings; it loses what it emits.',
      equation: 'C ∂T/∂t = S(x, t) (1 − A) + q − E(T) + ∂/∂x [ D (1 − x²) ∂T/∂x ],  x = sin φ',
      source: 'North, Cahalan & Coakley (1981), Rev. Geophys. 19, 91; D: North (1975), J. Atmos. Sci. 32, 2033',
    },
  },
  {
    when: (used) => used.byLatitude && !isHeld(used),
    step: {
      words:
        'What arrives is the mean over a day, at solar longitude L_{s} and obliquity ε, with polar day and polar night, as its mean over each band.',
      equation:
        'S(φ) = S(r) (h sin φ sin δ + cos φ cos δ sin h) / π,  sin δ = sin ε sin L_{s},  cos h = −tan φ tan δ, held in −1…1',
      source: 'Berger (1978), J. Atmos. Sci. 35, 2362',
    },
  },
  {
    when: (used) => used.byLatitude && used.says('planet.insolation', 'annualMean'),
    step: {
      words: 'What arrives is the mean over the year of each latitude, held all year.',
      equation: 'S(φ) = ⟨S⟩ ∮ (h sin φ sin δ + cos φ cos δ sin h) dL_{s} / 2π²',
      source: 'Ward (1974), J. Geophys. Res. 79, 3375',
    },
  },
  {
    when: (used) => used.byLatitude && used.has('planet.insolation.legendre'),
    step: {
      words: 'What arrives is a series of Legendre polynomials in the sine of latitude, held all year.',
      equation: 'S(x) = ¼ ⟨S⟩ Σ s_{n} P_{n}(x)',
      source: 'North (1975), J. Atmos. Sci. 32, 2033',
    },
  },
  {
    when: (used) => used.byLatitude && used.has('planet.landFraction'),
    step: {
      words:
        'Land and sea share each latitude, each with a heat store and a temperature of its own; f is the share of one, T′ the temperature of the other. Transport moves the air that both share.',
      equation: 'C ∂T/∂t = … + (ν / f) (T′ − T)',
      source: 'North & Coakley (1979), J. Atmos. Sci. 36, 1189',
    },
  },
  {
    when: (used) => used.byLatitude && used.has('planet.frozenHeatStore'),
    step: {
      words: 'A frozen sea stores less heat, on the same ramp as its albedo.',
      equation: 'C(T) = C_{frozen} + (C − C_{frozen}) x² (3 − 2x)',
    },
  },
  {
    when: (used) => used.byLatitude && used.has('planet.albedo.p2'),
    step: {
      words: 'Ice-free ground is brighter towards the poles.',
      equation: 'A_{warm}(φ) = A_{warm} + p_{2} (3 sin² φ − 1) / 2',
      source: 'North (1975), J. Atmos. Sci. 32, 2033',
    },
  },
];

function isHeld(used: Parameters<Rule['when']>[0]): boolean {
  return used.says('planet.insolation', 'annualMean') || used.has('planet.insolation.legendre');
}

/** The solution, after the physics. */
export const latitudeSolutionRules: readonly Rule[] = [
  {
    when: ({ byLatitude }) => byLatitude,
    step: {
      words:
        'The steady value is the temperature that would emit at once what the whole area absorbs and what comes from inside; the textbook has one number for the whole orbit.',
      equation: 'E(T_{steady}) = ⟨S (1 − A)⟩_{area} + q,  T_{eq} = [L (1 − A) / (16πσa²)]^{¼}',
    },
  },
  {
    when: ({ byLatitude }) => byLatitude,
    step: {
      words:
        'The year is followed by a Rosenbrock method of order four, in equal steps of an anomaly halfway between the eccentric and the true, which are halved until two years agree to the tolerance.',
      source: 'Rodas: Hairer & Wanner (1996), Solving Ordinary Differential Equations II, 2nd ed., § IV.7',
    },
  },
  {
    when: ({ byLatitude, periodic }) => byLatitude && periodic,
    step: {
      words:
        'The year that repeats itself is solved for by Newton’s method on the map from one year to the next, its linear systems by Krylov vectors; from a warm and from a cold start where ice could make two climates.',
      equation: 'F(T) = year(T) − T = 0',
      source:
        'GMRES: Saad & Schultz (1986), SIAM J. Sci. Stat. Comput. 7, 856; Newton–Krylov: Knoll & Keyes (2004), J. Comput. Phys. 193, 357',
    },
  },
  {
    when: ({ byLatitude }) => byLatitude,
    step: {
      words:
        'The error of the bands is judged by the same run with half of them: bands of equal area are of second order, so that a third of the difference remains.',
      source: 'Richardson (1911), Phil. Trans. R. Soc. A 210, 307',
    },
  },
];
