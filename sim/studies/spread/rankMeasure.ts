/**
 * How much one input tells about one finding, from samples whose inputs may be correlated.
 *
 * The measure is D = ∫ Var(P(finding ≤ t | input)) dF(t) / ∫ F(t)(1 − F(t)) dF(t), F the finding's distribution: 0 exactly when
 * the two are independent, 1 exactly when the input fixes the finding. It uses ranks alone, so no choice of unit or logarithm
 * matters, and it sees an input that changes only the scatter of a finding.
 * It means what knowing this input, and all that goes along with it in the samples, tells about the finding. It does not mean that
 * the input acts on the finding: one that merely goes along with another shares its value. The values do not add up to 1.
 *
 * Estimate: inputs in classes by rank, about √n of them (a partition of the given data: Plischke, Borgonovo & Smith 2013, Eur. J. Oper.
 * Res. 226, 536), and each class's distribution against that of all. Chosen over Chatterjee's own estimate of D, which compares neighbours:
 * repeated rows, as weights bring them, are their own neighbours there and look like dependence.
 * Source: Dette, Siburg & Stoimenov (2013) Scand. J. Stat. 40, 21; Chatterjee (2021) J. Am. Stat. Assoc. 116, 2009; Gamboa, Klein &
 *         Lagnoux (2018) SIAM/ASA J. Uncertainty Quantification 6, 522.
 */

export interface RankMeasure {
  /** D, less what chance alone gives on average: near 0 for an irrelevant input, below 0 half of the time. Null with a reason. */
  readonly value: number | null;
  /** An irrelevant input stays below this in about 97.5 % of cases. */
  readonly chanceLevel: number | null;
  readonly reason?: string;
}

/** A column's draws in rising order, with the ends of each group of equal values. */
export interface RankOrder {
  /** Draws that have a value, by rising value. */
  readonly draws: Uint32Array;
  /** Of each place in `draws`: one past the last place of the same value. */
  readonly groupEnd: Uint32Array;
}

/** Shape: values (n,), NaN where a draw has none. One for each column; every pair of columns uses it again. */
export function rankOrder(values: Float64Array): RankOrder {
  const draws = Uint32Array.from(values.keys())
    .filter((draw) => !Number.isNaN(values[draw]))
    .sort((a, b) => values[a] - values[b] || a - b);
  const groupEnd = new Uint32Array(draws.length);
  for (let place = draws.length - 1; place >= 0; place--) {
    const isLast = place === draws.length - 1 || values[draws[place]] !== values[draws[place + 1]];
    groupEnd[place] = isLast ? place + 1 : groupEnd[place + 1];
  }
  return { draws, groupEnd };
}

/**
 * Shape:  input and finding over the same n draws; draws without a finding are left out; every draw has its input.
 *         `rows` (n,), for posterior samples: the row that each draw took, so that repeats are not counted as independent.
 */
export function rankMeasure(input: RankOrder, finding: RankOrder, rows?: ArrayLike<number>): RankMeasure {
  const count = finding.draws.length;
  const independent = rows === undefined ? count : independentDraws(finding.draws, rows);
  if (independent < leastDraws) return noMeasure(`fewer than ${leastDraws} different draws have this finding`);
  if (isConstant(finding)) return noMeasure('the finding is the same in every draw');
  if (isConstant(input)) return noMeasure('the input is the same in every draw');
  const classes = classesByRank(input, finding, Math.round(Math.sqrt(independent)));
  if (classes.used < 2) return noMeasure('nearly all draws have the same input');
  return lessChance(classDependence(finding, classes), chanceOf(finding, classes.used, independent));
}

const leastDraws = 64;

function noMeasure(reason: string): RankMeasure {
  return { value: null, chanceLevel: null, reason };
}

function isConstant({ groupEnd }: RankOrder): boolean {
  return groupEnd.length === 0 || groupEnd[0] === groupEnd.length;
}

/** Kish's effective number: n² over the sum of the squared repeats. */
function independentDraws(draws: Uint32Array, rows: ArrayLike<number>): number {
  const repeats = new Map<number, number>();
  for (const draw of draws) repeats.set(rows[draw], (repeats.get(rows[draw]) ?? 0) + 1);
  let squares = 0;
  for (const repeat of repeats.values()) squares += repeat * repeat;
  return draws.length ** 2 / squares;
}

interface Classes {
  /** Of each draw. */
  readonly of: Uint32Array;
  /** Draws in each class; 0 for those that ties left empty. */
  readonly size: Float64Array;
  readonly used: number;
}

/** Equal shares of the draws that have the finding; equal inputs stay together, in the class of their middle. */
function classesByRank(input: RankOrder, finding: RankOrder, classCount: number): Classes {
  const length = 1 + Math.max(lastDraw(input), lastDraw(finding));
  const hasFinding = new Uint8Array(length);
  for (const draw of finding.draws) hasFinding[draw] = 1;
  const of = new Uint32Array(length);
  const size = new Float64Array(classCount);
  let before = 0;
  for (let start = 0; start < input.draws.length; start = input.groupEnd[start]) {
    const group = input.draws.subarray(start, input.groupEnd[start]).filter((draw) => hasFinding[draw] === 1);
    const middle = before + (group.length - 1) / 2;
    const chosen = Math.floor(((middle + 0.5) / finding.draws.length) * classCount);
    for (const draw of group) of[draw] = chosen;
    if (group.length > 0) size[chosen] += group.length;
    before += group.length;
  }
  return { of, size, used: size.filter((draws) => draws > 0).length };
}

function lastDraw({ draws }: RankOrder): number {
  return draws.reduce((last, draw) => Math.max(last, draw), 0);
}

/** D by one walk up the finding's values: Σ over classes of (share of class)·F_class² is kept up to date from draw to draw. */
function classDependence({ draws, groupEnd }: RankOrder, { of, size }: Classes): number {
  const reached = new Float64Array(size.length);
  const n = draws.length;
  let squares = 0; // Σ reached² / size
  let between = 0;
  let whole = 0;
  for (let start = 0; start < n; start = groupEnd[start]) {
    const end = groupEnd[start];
    for (let place = start; place < end; place++) {
      const chosen = of[draws[place]];
      squares += (2 * reached[chosen] + 1) / size[chosen];
      reached[chosen]++;
    }
    const below = end / n;
    between += (end - start) * (squares / n - below ** 2);
    whole += (end - start) * below * (1 - below);
  }
  return between / whole;
}

interface Chance {
  /** Of D when the finding is shuffled against the input: exact. */
  readonly average: number;
  /** D that shuffling exceeds in about 2.5 % of cases. */
  readonly level: number;
}

/** Standard normal at 97.5 %. */
const oneInForty = 1.959963984540054;

/**
 * Shuffling gives (used − 1)/(n − 1) on average, ties or not. Each class adds a Cramér–von Mises statistic, a sum of squares whose
 * relative variance is 2 ∫∫ K² / (∫ K(t, t))², K(s, t) = F(s)(1 − F(t)) for s ≤ t (0.8 without ties, 2 for a finding with two values:
 * Anderson & Darling 1952, Ann. Math. Stat. 23, 193). Their sum is as a χ² of the same variance, whose quantile is Wilson & Hilferty's
 * (1931, Proc. Natl Acad. Sci. 17, 684).
 */
function chanceOf({ draws, groupEnd }: RankOrder, used: number, independent: number): Chance {
  let lower = 0; // Σ p F² of the groups so far
  let squares = 0;
  let whole = 0;
  for (let start = 0; start < draws.length; start = groupEnd[start]) {
    const below = groupEnd[start] / draws.length;
    const own = (groupEnd[start] - start) / draws.length;
    squares += own * (1 - below) ** 2 * (2 * lower + own * below ** 2);
    lower += own * below ** 2;
    whole += own * below * (1 - below);
  }
  const average = Math.min(1, (used - 1) / (independent - 1));
  const third = (2 * squares) / whole ** 2 / (9 * (used - 1)); // 2/(9ν), ν the degrees of freedom
  return { average, level: average * (1 - third + oneInForty * Math.sqrt(third)) ** 3 };
}

function lessChance(raw: number, { average, level }: Chance): RankMeasure {
  return { value: (raw - average) / (1 - average), chanceLevel: (level - average) / (1 - average) };
}
