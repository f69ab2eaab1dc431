/** Numbers for messages, where what was typed may have run out of range. */
import { formatNumber, formatQuantity } from '../../quantity/index.ts';

export function shown(value: number, unit: string, digits = 4): string {
  return Number.isFinite(value) ? formatQuantity(value, unit, digits) : 'a number out of range';
}

export function shownNumber(value: number, digits = 3): string {
  return Number.isFinite(value) ? formatNumber(value, digits) : 'a number out of range';
}
