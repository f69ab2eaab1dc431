/** The heat store that an observed lag gives, in words. Pure. */

import type { ReadBack } from '../../sim/studies/grid/readBack.ts';
import type { UniversalPlace } from '../../sim/studies/grid/storeNumber.ts';
import { mixedLayerHeatCapacity } from '../../sim/surface/heatStore/mixedLayer.ts';
import { exact, nbsp, significant, withUnit } from './number.ts';

const digits = 3;

/** The answer under the form: heat-store number, heat capacity of the case, and the sea that would hold as much. */
export function readingText(reading: ReadBack, { heatCapacityPerNumber }: UniversalPlace): string {
  const { storeNumber, low, high } = reading;
  if (storeNumber === null) {
    const none = `No heat store can be read: ${reading.reason}.`;
    if (low === null && high === null) return none;
    const [numbers, capacities] = [1, heatCapacityPerNumber].map((per) => limitsText(low, high, per));
    return `${none} Its uncertainty takes in heat-store numbers ${numbers}: heat capacities ${withUnit(capacities!, 'J/m2/K')}.`;
  }
  const range = rangeText(low, high, 1);
  const capacity = storeNumber * heatCapacityPerNumber;
  const sea = capacity / mixedLayerHeatCapacity(1);
  return [
    `Heat-store number ${significant(storeNumber, digits)}${range}.`,
    `Heat capacity ${withUnit(significant(capacity, digits), 'J/m2/K')}${rangeText(low, high, heatCapacityPerNumber)}`,
    `— as much as ${significant(sea, digits)}${nbsp}m of stirred sea.`,
  ].join(' ');
}

/** ` (1.2 to 2.1)`; a side that the lag's uncertainty leaves open is said to be. */
function rangeText(low: number | null, high: number | null, per: number): string {
  if (low === null && high === null) return ' (no limit either way)';
  const text = limitsText(low, high, per);
  return text === '' ? '' : ` (${text})`;
}

/** Empty where the shown digits are the same at both ends. Shape: at least one is a number. */
function limitsText(low: number | null, high: number | null, per: number): string {
  const number = (value: number): string => significant(value * per, digits);
  if (low === null) return `below ${number(high!)}`;
  if (high === null) return `above ${number(low)}`;
  return number(low) === number(high) ? '' : `${number(low)} to ${number(high)}`;
}

/** `0.62 and 1.3`: where a case stands on the chart. */
export function placeText({ eccentricity, storeNumber }: UniversalPlace): string {
  return `eccentricity ${exact(Number(eccentricity.toPrecision(4)))}, heat-store number ${significant(storeNumber, digits)}`;
}
