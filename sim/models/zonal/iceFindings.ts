/** Ice edges through the year, and how much of the globe is under ice. */
import type { Dataset } from '../../dataset/dataset.ts';
import type { Finding } from '../../findings/finding.ts';
import type { ZonalYear } from './year.ts';

const degrees = 180 / Math.PI;

export function iceFindings(year: ZonalYear, dataset: Dataset): Finding[] {
  const fraction = dataset.variables.bandIceFraction;
  const weight = dataset.variables.weight.data;
  const [rows, bands] = fraction.shape;
  let mean = 0;
  const north: number[] = [];
  const south: number[] = [];
  for (let row = 0; row < rows; row++) {
    const ice = fraction.data.subarray(row * bands, (row + 1) * bands);
    mean += (weight[row] * ice.reduce((sum, value) => sum + value, 0)) / bands;
    const northern = edgeFromPole(year, ice, 1);
    const southern = edgeFromPole(year, ice, -1);
    if (northern !== null) north.push(northern);
    if (southern !== null) south.push(southern);
  }
  return [
    ...edgeFindings('North', 'northern', north),
    ...edgeFindings('South', 'southern', south),
    { name: 'iceFractionMean', value: mean, unit: '1', label: 'Area and time under ice' },
  ];
}

/** Latitude, deg, to which ice reaches unbroken from a pole, the equator at most; null where the pole itself is free of it. */
function edgeFromPole(year: ZonalYear, ice: Float64Array, side: 1 | -1): number | null {
  const { edges } = year.physics.bands;
  const last = ice.length - 1;
  let covered = 0;
  for (let k = 0; k <= last; k++) {
    const share = ice[side === 1 ? last - k : k];
    covered += share;
    if (share < 0.5) break;
  }
  if (covered < 0.5) return null;
  const width = edges[1] - edges[0];
  return side * Math.asin(Math.max(0, 1 - covered * width)) * degrees;
}

function edgeFindings(side: string, word: string, edges: readonly number[]): Finding[] {
  const reason = `no ice at the ${word} pole in any part of the year`;
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
