/** How a grid was computed, and what its numbers are not. Pure. */
import type { GridReport } from '../../sim/studies/grid/gridReport.ts';
import { rangesText } from './gridAxes.ts';
import { membersOf } from './gridMembers.ts';
import { modelCautions, planningCaution, stepsFor, usedInputs } from './method.ts';
import type { Step } from './rule.ts';

export function gridSteps(report: GridReport): Step[] {
  const { hold } = report;
  const shape = report.axes.map(({ nodes }) => nodes.length).join(' × ');
  const steps = report.axes.map(({ log }) => (log ? 'equal ratios' : 'equal steps'));
  const isPlaced = membersOf(report).some(({ universal }) => universal !== null);
  return [
    ...stepsFor({
      ...usedInputs(membersOf(report).flatMap(({ inputs }) => inputs)),
      ...models(report),
      periodic: true,
      forward: false,
      accounts: false,
    }),
    {
      words: `The grid: ${shape} worlds for every case, over ${rangesText(report)}, in ${steps.join(' and ')}. All other inputs stay as the scenario has them; each world is solved for itself, as a single run would. Lines between the nodes are interpolated for the eye.`,
    },
    ...(hold === 'orbitMeanInstellation' ? [heldFlux] : hold === null ? [] : [{ words: `Held on the way: ${hold}.` }]),
    ...(isPlaced ? [universalStep] : []),
  ];
}

const heldFlux: Step = {
  words: 'What the orbit receives on average is held at the scenario’s value while the eccentricity changes.',
  equation: '⟨S⟩ = L / (4πa² √(1 − e²)) = constant',
  source: 'Williams & Pollard (2002), Int. J. Astrobiology 1, 61',
};

const universalStep: Step = {
  words:
    'Plain worlds (constant albedo, emission c T⁴, no heat from inside) differ in two numbers only, the eccentricity and the heat-store number n: the radiative time τ at the textbook temperature T₀ of distance a, over the orbit’s pace. The chart is solved node by node with the same solver; a lag is read back by finding the root in n.',
  equation: '4n dy/dM = (a/r)² − y⁴,  y = T/T_{0},  n = 2πτ/P,  τ = C / (4 c T_{0}³)',
  source:
    'On nearly circular orbits: damping 1/√(1 + n²) and lag atan(n)/2π of an orbit, the first-order linear response (North & Coakley 1979, J. Atmos. Sci. 36, 1189)',
};

function models({ cases }: GridReport): { asOne: boolean; byLatitude: boolean } {
  const has = (model: string): boolean => cases.some((oneCase) => oneCase.model === model);
  return { asOne: has('lumped'), byLatitude: has('zonal') };
}

export function gridCautions(report: GridReport): string[] {
  const isPlaced = membersOf(report).some(({ universal }) => universal !== null);
  return [
    ...modelCautions(models(report)),
    'A range on an axis is a choice and no probability: the map says what would follow from each value, not how likely it is.',
    'Where a world has more than one climate, the map shows the one that a warm start leads to. A jump between neighbouring nodes may be the end of a climate.',
    ...(isPlaced
      ? [
          'The chart of plain worlds takes the surface as one heat store. Ground answers a fast orbit with a thinner layer than a slow one; a heat store that was read from a lag is what this orbit reaches, not the planet’s whole.',
          'An observed lag is that of the light that was seen: of the side turned to the observer, with its own phase curve and weather. Its uncertainty must hold these before a heat store is read from it.',
        ]
      : []),
    planningCaution,
  ];
}
