/** How a trace was computed, and what its numbers are not. Pure. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';
import { labelInText } from './along.ts';
import type { Step } from './rule.ts';

export function traceSteps({ cases, along }: TraceReport): Step[] {
  const has = (model: string): boolean => cases.some((oneCase) => oneCase.model === model);
  return [
    ...(has('lumped') ? [lumpedStep] : []),
    ...(has('zonal') ? [zonalStep] : []),
    {
      words: `A climate is a state T that repeats itself after one year; Φ carries a state through one year at the input p, here ${labelInText(along)}.`,
      equation: 'R(T, p) = Φ(T; p) − T = 0',
    },
    {
      words:
        'From the warm and the cold climate at each end of the range the solutions are followed by pseudo-arclength continuation: the step is measured along the branch and not along p, so that it passes round folds onto the unstable part.',
      equation: 'R(T, p) = 0,  ⟨Ṫ, T − T_{0}⟩ + ṗ (p − p_{0}) = Δs',
      source:
        'Keller (1977), in: Applications of Bifurcation Theory (ed. Rabinowitz), 359; Allgower & Georg (1990), Numerical Continuation Methods, ch. 6',
    },
    {
      words:
        'A state is stable where a small departure from it shrinks over a year: the largest multiplier μ of the linearised year is below one. At a fold it is one.',
      equation: 'δT(t + P) = μ δT(t),  stable: |μ| < 1',
      source: 'Floquet theory; Kuznetsov (2004), Elements of Applied Bifurcation Theory, 3rd ed.',
    },
  ];
}

const lumpedStep: Step = {
  words:
    'One temperature for the whole surface: a heat store takes up what is absorbed, and q from inside; it loses what is emitted.',
  equation: 'C dT/dt = f (1 − A(T)) S(r) + q − E(T)',
  source: 'Ice–albedo feedback: Budyko (1969), Tellus 21, 611; Sellers (1969), J. Appl. Meteorol. 8, 392',
};

const zonalStep: Step = {
  words:
    'A temperature for each latitude φ: it takes up what it absorbs, q from inside, and what transport brings; it loses what it emits.',
  equation: 'C ∂T/∂t = S(x, t) (1 − A(T)) + q − E(T) + ∂/∂x [ D (1 − x²) ∂T/∂x ],  x = sin φ',
  source:
    'North, Cahalan & Coakley (1981), Rev. Geophys. 19, 91; ice–albedo feedback: Budyko (1969), Tellus 21, 611; Sellers (1969), J. Appl. Meteorol. 8, 392',
};

export function traceCautions({ cases, along }: TraceReport): string[] {
  const isLumped = cases.some(({ model }) => model === 'lumped');
  const isZonal = cases.some(({ model }) => model === 'zonal');
  return [
    'A fold belongs to this model. Clouds, ocean currents, the carbon cycle and the vertical structure of the air move it or take it away.',
    `Every point is a climate that has had all the time it needs at a fixed ${labelInText(along)}. How fast a planet goes from one to another, and what it does while the input changes, is not in this diagram.`,
    'Stable means against small disturbances. A large one, across the unstable branch, can tip a planet long before the fold; weather, which does that, is not in the model.',
    'Only climates that hang together with the warm or the cold one at an end of the range are shown; one that stands apart from them would be missed.',
    ...(isLumped
      ? [
          'With one temperature for the whole surface, the ice fraction says how far along its ramp the albedo is; it is no area under ice.',
        ]
      : []),
    ...(isZonal
      ? [
          'By latitude, small polar caps may come and go in a jump of their own (small ice cap instability); how large it is depends on the width of the albedo ramp and on the number of bands.',
        ]
      : []),
    'These are planning figures. They are no basis for qualifying hardware or for anyone’s safety: that is for licensed practice and test.',
  ];
}
