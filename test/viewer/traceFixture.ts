/** Traces whose folds are known: along a cubic T(s) the input is p(s), which turns back where dp/ds = 0. */
import type { TraceReport } from '../../sim/studies/traceReport.ts';

type Case = TraceReport['cases'][number];
type Point = Case['branches'][number]['points'][number];

export interface LoopOptions {
  readonly name?: string;
  readonly middle?: number;
  readonly model?: string;
}

/** Half the width of the loop in the input. */
export const loopHalf = 0.14;

/** p = middle + c (s³ − s), with c such that the folds, at s = ±1/√3, lie at middle ∓ loopHalf. */
export function loopCase({ name = 'ice world', middle = 1.07, model = 'zonal' }: LoopOptions = {}): Case {
  const turn = 1 / Math.sqrt(3);
  const scale = (loopHalf * 3 * Math.sqrt(3)) / 2;
  const steps = 120;
  const parameters = Array.from({ length: steps + 1 }, (_, step) => 1.35 - (2.7 * step) / steps);
  const all = [...parameters, turn, -turn].toSorted((a, b) => b - a);
  const points = all.map((s): Point => {
    const temperatureMean = 255 + 32 * s;
    return {
      value: middle + scale * (s ** 3 - s),
      stable: Math.abs(s) > turn,
      logMultiplier: turn ** 2 - s ** 2,
      fold: Math.abs(s) === turn,
      temperatureMean,
      temperatureMax: temperatureMean + 3,
      temperatureMin: temperatureMean - 4,
      iceFraction: Math.min(1, Math.max(0, 0.5 - 0.6 * s)),
    };
  });
  const folds = [middle - loopHalf, middle + loopHalf];
  return { name, model, branches: [{ ended: 'left', points }], folds, warnings: [] };
}

/** One climate throughout. */
export function plainCase(name = 'bare rock'): Case {
  const points = Array.from({ length: 30 }, (_, step): Point => {
    const value = 0.8 + 0.02 * step;
    const temperatureMean = 255 * value ** 0.25;
    return {
      value,
      stable: true,
      logMultiplier: -0.5,
      fold: false,
      temperatureMean,
      temperatureMax: temperatureMean + 9,
      temperatureMin: temperatureMean - 9,
      iceFraction: 0,
    };
  });
  return { name, model: 'lumped', branches: [{ ended: 'left', points }], folds: [], warnings: [] };
}

export function traceOf(cases: readonly Case[], along: Partial<TraceReport['along']> = {}): TraceReport {
  return {
    program: { name: 'perilag', version: '0.0.0' },
    scenario: {
      title: 'How far can Ossilith dim before it freezes?',
      notes: 'An invented star.',
      file: 'ossilith.yaml',
      sha256: 'ab'.repeat(32),
    },
    along: { key: 'star.luminosity', label: 'Luminosity', unit: 'Lsun', from: 0.8, to: 1.35, log: false, ...along },
    cases,
  };
}
