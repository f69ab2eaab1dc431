/** How a spread was computed, and what its numbers are not. Pure. */
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { nbsp } from './number.ts';
import type { Step } from './rule.ts';

export function spreadSteps(report: SpreadReport): Step[] {
  const has = (model: string): boolean => report.cases.some((oneCase) => oneCase.model === model);
  const findings = report.cases.flatMap((oneCase) => oneCase.findings);
  const ranked = findings.some(({ importance }) => importance.ranks !== null);
  return [
    ...samplingSteps[report.sampling],
    {
      words:
        'Each draw is a world of its own and goes through the model as in a plain run, whose report gives every equation.',
    },
    ...(has('lumped') ? [lumpedStep] : []),
    ...(has('zonal') ? [zonalStep] : []),
    percentilesStep,
    ...(findings.some(({ groups }) => groups !== null) ? [groupsStep] : []),
    ...(findings.some(({ circular }) => circular) ? [circularStep] : []),
    ...(report.cases.some(({ bands }) => bands.length > 0) ? [bandsStep(report)] : []),
    ...(report.indexRows > 0 ? indexSteps(report) : []),
    ...(ranked ? [rankStep] : []),
  ];
}

const quantileStep: Step = {
  words:
    'Each uncertain input is drawn by itself from the spread that the scenario states, by the inverse of its distribution. What lies beyond the physical is cut away and the rest scaled up; angles wrap.',
  equation: 'x_{k} = F^{−1}(u_{k}),  0 < u_{k} < 1',
};

const samplingSteps: Readonly<Record<SpreadReport['sampling'], readonly Step[]>> = {
  sobol: [
    {
      words:
        'The draws are Sobol’ points, which fill the cube of inputs more evenly than chance does, scrambled by a random matrix and a random shift from the seed. Draw k depends on nothing but k and the seed.',
      source:
        'Sobol’ (1967), USSR Comput. Math. Math. Phys. 7, 86; direction numbers: Joe & Kuo (2008), SIAM J. Sci. Comput. 30, 2635; scrambling: Matoušek (1998), J. Complexity 14, 527',
    },
    quantileStep,
  ],
  random: [
    {
      words:
        'The draws are pseudo-random, from a generator that counts: draw k depends on nothing but k, the input and the seed.',
      source: 'Salmon, Moraes, Dror & Shaw (2011), SC’11: Philox 4×32-10',
    },
    quantileStep,
  ],
  posterior: [
    {
      words:
        'The draws are rows of posterior samples from a fit made elsewhere, taken as often as their weights say. Inputs of one row stay together, and with them every correlation.',
    },
    {
      words: 'Uncertain inputs that the samples do not give are drawn by themselves from the spread that is stated.',
      equation: 'x_{k} = F^{−1}(u_{k}),  0 < u_{k} < 1',
    },
  ],
};

const lumpedStep: Step = {
  words:
    'One temperature for the whole surface: a heat store takes up what is absorbed, and q from inside; it loses what is emitted.',
  equation: 'C dT/dt = f (1 − A) S(r) + q − E(T),  S(r) = L / (4πr²)',
};

const zonalStep: Step = {
  words:
    'A temperature for each latitude φ: it takes up what it absorbs, q from inside, and what transport brings; it loses what it emits.',
  equation: 'C ∂T/∂t = S(x, t) (1 − A) + q − E(T) + ∂/∂x [ D (1 − x²) ∂T/∂x ],  x = sin φ',
  source: 'North, Cahalan & Coakley (1981), Rev. Geophys. 19, 91',
};

const percentilesStep: Step = {
  words: `The 68${nbsp}% interval goes from percentile 16 to 84, the 95${nbsp}% interval from 2.5 to 97.5, of the draws that have the number. It says where the number lies if the stated spreads are right; it is no confidence interval of a mean.`,
  source: 'Percentiles: Hyndman & Fan (1996), Am. Stat. 50, 361, definition 7',
};

const groupsStep: Step = {
  words: `Draws are said to fall into two groups where the widest gap between neighbours in order that leaves 2.5${nbsp}% of them, and 8, on either side is a fifth of their whole reach. That is a plain test with limits of our own, not a count of modes: groups that touch, or that hold fewer draws, are not told. Times that come round with the orbit are cut at the widest arc without a draw first.`,
};

const circularStep: Step = {
  words:
    'Times that come round with the orbit are averaged on the circle, each as a share of its draw’s own period, and shown in an orbit of the median period. Intervals are counted from half a turn before the mean to half a turn after, and mean, interval and centre stand in one turn: a time below 0 is before periapsis, at the end of the turn before.',
  equation: 'tan 2πt̄ = ⟨sin 2πt⟩ / ⟨cos 2πt⟩',
  source: 'Mardia & Jupp (2000), Directional Statistics, § 2.2 and § 6.3',
};

function bandsStep({ cases, draws }: SpreadReport): Step {
  const used = Math.min(...cases.map(({ bandDraws }) => bandDraws));
  const which = used < draws ? `the first ${used} draws` : `all ${draws} draws`;
  return {
    words: `The bands are percentiles point by point, from ${which}: no single draw need follow their edges. Each draw is read at shares of its own period.`,
  };
}

function indexSteps({ indexRows, sampling }: SpreadReport): Step[] {
  const wide =
    sampling === 'sobol'
      ? ' Sobol’ points are more even than the independent rows which resampling supposes, so that these intervals are rather too wide than too narrow.'
      : '';
  return [
    {
      words: `What matters most: the first-order index of input i is the share of a finding’s variance V that knowing it alone would remove; its total index is the share that would be left if all other inputs were known. Both from ${indexRows} rows of two independent sets of draws A and B, and AB, which is A with input i taken from B.`,
      equation: 'S_{i} = ⟨f(B) [f(AB) − f(A)]⟩ / V,  T_{i} = ⟨[f(A) − f(AB)]²⟩ / 2V',
      source:
        'Saltelli et al. (2010), Comput. Phys. Commun. 181, 259, table 2 (b); Jansen (1999), Comput. Phys. Commun. 117, 35',
    },
    {
      words: `The intervals of the indices come from 200 resamplings of the rows.${wide} An index whose truth is 0 may come out below 0.`,
      source: 'Efron (1979), Ann. Stat. 7, 1',
    },
  ];
}

const rankStep: Step = {
  words:
    'Inputs that go together have no shares of the variance. In their place stands D, from ranks alone: 0 exactly where input and finding are independent, 1 exactly where the input fixes the finding. It means what knowing the input, and all that goes along with it in the samples, tells about the finding; it does not mean that the input acts on it, and the values do not add up to 1. What chance gives on average is taken off the estimate, which may therefore come out slightly below 0.',
  equation: 'D = ∫ Var P(y ≤ t | x) dF(t) / ∫ F(t) (1 − F(t)) dF(t)',
  source:
    'Dette, Siburg & Stoimenov (2013), Scand. J. Stat. 40, 21; Chatterjee (2021), J. Am. Stat. Assoc. 116, 2009; classes: Plischke, Borgonovo & Smith (2013), Eur. J. Oper. Res. 226, 536',
};

export function spreadCautions({ cases, sampling }: SpreadReport): string[] {
  return [
    'The intervals speak of the stated spreads only. What the model leaves out (clouds, winds, currents, chemistry) is in none of them, and may be larger than all of them.',
    ...(sampling === 'posterior'
      ? ['The samples are as good as the fit that made them; whatever it took for granted is taken for granted here.']
      : [
          'Each input was drawn by itself. Where two are known only together, as eccentricity and argument of periapsis from one fit, give posterior samples instead.',
        ]),
    'What matters most is what matters within these spreads: an input that is well known, or written without a spread, cannot show up, however strongly the planet depends on it.',
    ...(cases.some(({ inputs }) => inputs.some(({ text }) => / to /.test(text)))
      ? [
          'A range was drawn evenly from end to end. Where it stands for not knowing, and not for a measured spread, so do the percentiles.',
        ]
      : []),
    'The ends of the 95 % intervals rest on few draws; two seeds may differ there in the last digit shown.',
    'These are planning figures. They are no basis for qualifying hardware or for anyone’s safety: that is for licensed practice and test.',
    'Proposals and telescope time: times for observing and exposure come from the observatory’s own tools; a time here is as good as the orbit it was made from.',
  ];
}
