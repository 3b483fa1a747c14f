/** The bench's own arithmetic: medians, spreads, growth exponents. */

/** Repeated measurements of one quantity in brief. */
export interface Spread {
  readonly median: number;
  readonly min: number;
  readonly max: number;
  readonly count: number;
}

/** The middle value, or the mean of the middle two; NaN of nothing. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const half = sorted.length >> 1;
  const upper = sorted[half] ?? Number.NaN;
  return sorted.length % 2 === 1 ? upper : ((sorted[half - 1] ?? Number.NaN) + upper) / 2;
}

/** Median and extremes. */
export function spreadOf(values: readonly number[]): Spread {
  return {
    median: median(values),
    min: Math.min(...values),
    max: Math.max(...values),
    count: values.length,
  };
}

/** p of y = c xᵖ, by least squares of log y over log x. */
export function growthExponent(x: readonly number[], y: readonly number[]): number {
  const u = x.map(Math.log);
  const v = y.map(Math.log);
  const mean = (list: readonly number[]): number => list.reduce((sum, a) => sum + a, 0) / list.length;
  const [mu, mv] = [mean(u), mean(v)];
  const cross = u.reduce((sum, a, i) => sum + (a - mu) * ((v[i] ?? Number.NaN) - mv), 0);
  const square = u.reduce((sum, a) => sum + (a - mu) ** 2, 0);
  return cross / square;
}
