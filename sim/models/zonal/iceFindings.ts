/** Ice edges through the year, and how much of the globe is under ice. */

import type { Dataset } from '../../dataset/dataset.ts';
import type { Finding } from '../../findings/finding.ts';
import { wholeShare } from '../../findings/wholeShare.ts';
import type { Seconds } from '../../si.ts';
import type { ZonalYear } from './year.ts';

const degrees = 180 / Math.PI;

export function iceFindings(year: ZonalYear, dataset: Dataset): Finding[] {
  const fraction = dataset.variables.bandIceFraction;
  const weight = dataset.variables.weight.data;
  const [rows, bands] = fraction.shape;
  let mean = 0;
  const north = emptyCap('North', 'northern', rows);
  const south = emptyCap('South', 'southern', rows);
  for (let row = 0; row < rows; row++) {
    const ice = fraction.data.subarray(row * bands, (row + 1) * bands);
    mean += (weight[row] * ice.reduce((sum, value) => sum + value, 0)) / bands;
    for (const [cap, side, pole] of [[north, 1, bands - 1] as const, [south, -1, 0] as const]) {
      cap.atPole[row] = ice[pole];
      const edge = edgeFromPole(year, ice, side);
      if (edge !== null) cap.edges.push(edge);
    }
  }
  const time = dataset.variables.time.data;
  const { period } = year.world.orbit;
  return [
    ...edgeFindings(north),
    ...edgeFindings(south),
    capFraction(north, time, period),
    capFraction(south, time, period),
    { name: 'iceFractionMean', value: wholeShare(mean), unit: '1', label: 'Area and time under ice' },
  ];
}

/** What rows tell of one polar cap. */
interface Cap {
  readonly side: string;
  readonly word: string;
  /** Ice fraction of the band at the pole, by row. */
  readonly atPole: Float64Array;
  /** deg, of the rows that have a cap. */
  readonly edges: number[];
}

function emptyCap(side: string, word: string, rows: number): Cap {
  return { side, word, atPole: new Float64Array(rows), edges: [] };
}

/** From this share of the band at the pole on there is a cap. */
const capFrom = 0.5;

/** Latitude, deg, to which ice reaches unbroken from a pole, the equator at most; null where the band at the pole is not half frozen. */
function edgeFromPole(year: ZonalYear, ice: Float64Array, side: 1 | -1): number | null {
  const { edges } = year.physics.bands;
  const last = ice.length - 1;
  let covered = 0;
  for (let k = 0; k <= last; k++) {
    const share = ice[side === 1 ? last - k : k];
    covered += share;
    if (share < capFrom) break;
  }
  if (covered < capFrom) return null;
  const width = edges[1] - edges[0];
  return side * Math.asin(Math.max(0, 1 - covered * width)) * degrees;
}

function edgeFindings({ side, word, atPole, edges }: Cap): Finding[] {
  const reason = whyNoCap(word, atPole);
  const finding = (kind: string, pick: (values: readonly number[]) => number): Finding => {
    const base = {
      name: `iceEdge${side}${kind}`,
      unit: 'deg',
      label: `Ice edge, ${word}, ${kind === 'Min' ? 'least' : 'greatest'} latitude`,
    };
    return edges.length === 0 ? { ...base, value: null, reason } : { ...base, value: pick(edges) };
  };
  return [
    finding('Min', (values) => values.reduce((a, b) => Math.min(a, b))),
    finding('Max', (values) => values.reduce((a, b) => Math.max(a, b))),
  ];
}

/** A percentage that never rounds up to the half that is missed. */
function whyNoCap(word: string, atPole: Float64Array): string {
  const most = atPole.reduce((a, b) => Math.max(a, b), 0);
  if (most < 1e-9) return `no ice at the ${word} pole in any part of the year`;
  const percent = most < 0.01 ? 'less than 1 %' : `${Math.floor(100 * most)} % at most`;
  return `the ${word}most band is never half frozen (${percent})`;
}

/** Share of the year with a cap; between rows the ice of the band at the pole is taken as linear in time. */
function capFraction({ side, word, atPole }: Cap, time: Float64Array, period: Seconds): Finding {
  const rows = time.length;
  let sum = 0;
  for (let row = 0; row < rows; row++) {
    const last = row + 1 === rows;
    const length = (last ? time[0] + period : time[row + 1]) - time[row];
    sum += length * shareAbove(atPole[row] - capFrom, atPole[last ? 0 : row + 1] - capFrom);
  }
  return {
    name: `iceCap${side}Fraction`,
    value: Math.min(1, sum / period),
    unit: '1',
    label: `Share of the year with a ${word} ice cap`,
  };
}

/** Of a straight line from a to b, the share at or above zero. */
function shareAbove(a: number, b: number): number {
  if (a >= 0 && b >= 0) return 1;
  if (a < 0 && b < 0) return 0;
  return Math.max(a, b) / Math.abs(b - a);
}
