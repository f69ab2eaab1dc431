/**
 * How a reference value came here.
 * seen        the figure was read in the public text named beside it
 * memory      from memory of the cited work, not read again; recomputed independently
 * calculated  own calculation with other software (mpmath, scipy), no published figure behind it: a regression value
 */
export type Provenance = 'seen' | 'memory' | 'calculated';
