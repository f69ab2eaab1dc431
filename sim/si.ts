/**
 * Names for plain numbers in SI. An alias informs the reader; the compiler does not check it.
 * Degrees, astronomical units and days live at the borders (`scenario/`, output, figures), with a suffix.
 */
export type Metres = number;
export type Kilograms = number;
export type Seconds = number;
export type Kelvin = number;
export type Watts = number;
export type Radians = number;
/** W m⁻² */
export type Flux = number;
/** J m⁻² K⁻¹ */
export type ArealHeatCapacity = number;
/** Seconds of barycentric dynamical time (TDB) since J2000.0, 2000-01-01T12:00:00 TDB. */
export type TdbSeconds = number;
