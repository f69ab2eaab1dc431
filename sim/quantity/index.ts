/** Numbers with units, uncertain numbers and dates: read at the border, SI inside, printed back in the user's units. */
export { type Dimension, type DimensionName, dimensions, sameDimension } from './dimension.ts';
export { formatNumber, formatQuantity, fromUnit, inUnit } from './format.ts';
export { formatInstantUtc, type Instant, julianDateTdb, parseInstant, type TimeScale } from './instant.ts';
export { nearest } from './nearest.ts';
export { halfNormalQuantile, normalQuantile } from './normalQuantile.ts';
export { halfNormalShare, normalShare } from './normalShare.ts';
export { checkBounds, isWithin, parseQuantity, type QuantitySpec } from './parse.ts';
export { quantityPattern, unitsInWords } from './pattern.ts';
export type { Distribution, Quantity } from './types.ts';
export { type Support, type UncertainNumber, uncertainNumber } from './uncertainNumber.ts';
export { parseUnit, type Unit } from './units.ts';
