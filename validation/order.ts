/** Observed order of convergence: the slope of ln|error| against ln h by least squares. */

/** `errors[i]` on a grid of `levels[i]` cells a patch side (h = 1/level). */
export function observedOrder(levels: readonly number[], errors: readonly number[]): number {
  const x = levels.map((n) => -Math.log(n));
  const y = errors.map((e) => Math.log(Math.abs(e)));
  const mean = (v: readonly number[]): number => v.reduce((sum, a) => sum + a, 0) / v.length;
  const [mx, my] = [mean(x), mean(y)];
  let [top, bottom] = [0, 0];
  x.forEach((xi, i) => {
    top += (xi - mx) * ((y[i] ?? 0) - my);
    bottom += (xi - mx) ** 2;
  });
  return top / bottom;
}
