/** Coefficients of AS 241 as doubles, from the constant term up: numerator and denominator of each of its three ranges. */
const central = {
  top: [
    3.3871328727963665, 133.14166789178438, 1971.5909503065513, 13731.69376550946, 45921.95393154987, 67265.7709270087,
    33430.57558358813, 2509.0809287301227,
  ],
  bottom: [
    1, 42.31333070160091, 687.1870074920579, 5394.196021424751, 21213.794301586597, 39307.89580009271,
    28729.085735721943, 5226.495278852854,
  ],
};
const tail = {
  top: [
    1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
    0.2417807251774506, 0.022723844989269184, 0.0007745450142783414,
  ],
  bottom: [
    1, 2.053191626637759, 1.6763848301838038, 0.6897673349851, 0.14810397642748008, 0.015198666563616457,
    0.0005475938084995345, 1.0507500716444169e-9,
  ],
};
const farTail = {
  top: [
    6.657904643501103, 5.463784911164114, 1.7848265399172913, 0.29656057182850487, 0.026532189526576124,
    0.0012426609473880784, 2.7115555687434876e-5, 2.0103343992922881e-7,
  ],
  bottom: [
    1, 0.599832206555888, 0.1369298809227358, 0.014875361290850615, 0.0007868691311456133, 1.8463183175100548e-5,
    1.421511758316446e-7, 2.0442631033899397e-15,
  ],
};

/**
 * Inverse of the standard normal distribution: the x below which a share `probability` lies.
 * Shape:  one number in, one out; relative error about 1e-16.
 * Units:  probability 1 → standard deviations; −∞ at 0, +∞ at 1, NaN outside.
 * Source: Wichura (1988) Algorithm AS 241, PPND16, Appl. Statist. 37, 477.
 */
export function normalQuantile(probability: number): number {
  const q = probability - 0.5;
  if (Math.abs(q) <= centralHalf) return centralQuantile(q);
  const share = q < 0 ? probability : 1 - probability;
  if (share === 0) return q < 0 ? Number.NEGATIVE_INFINITY : Number.POSITIVE_INFINITY;
  const r = Math.sqrt(-Math.log(share));
  const size = r <= 5 ? ratio(tail, r - 1.6) : ratio(farTail, r - 5);
  return q < 0 ? -size : size;
}

/**
 * The x for which a share `share` of the standard normal distribution lies between −x and x.
 * Shape:  one number in, one out; relative error about 1e-16, down to the smallest shares.
 * Units:  probability 1 → standard deviations; 0 at 0, +∞ at 1, NaN outside.
 * Source: as normalQuantile.
 */
export function halfNormalQuantile(share: number): number {
  if (Math.abs(share / 2) <= centralHalf) return share < 0 ? Number.NaN : centralQuantile(share / 2);
  return -normalQuantile((1 - share) / 2);
}

/** |probability − ½| up to which the first range reaches. */
const centralHalf = 0.425;

/** At probability ½ + q. */
function centralQuantile(q: number): number {
  return q * ratio(central, 0.180625 - q * q);
}

function ratio({ top, bottom }: { top: readonly number[]; bottom: readonly number[] }, x: number): number {
  return polynomial(top, x) / polynomial(bottom, x);
}

function polynomial(coefficients: readonly number[], x: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}
