import { describe, expect, it } from "vitest";
import { random } from "./fixtures.ts";
import { clearFront, eliminate, frontWorkspace, layoutOf, packColumns } from "./front.ts";

/** F = L D Lᵀ with given random L and D, written into the workspace; the partial factor must give L, D and the remainder back. */
function trial(n: number, p: number, seed: number): number {
  const next = random(seed);
  const l = Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, k) =>
      k < i ? [(next() - 0.5) / n, (next() - 0.5) / n] : k === i ? [1, 0] : [0, 0],
    ),
  );
  const d = Array.from({ length: n }, () => [1 + next(), 1 + next()]);
  const entry = (i: number, j: number, terms: number, from: number): [number, number] => {
    let re = 0;
    let im = 0;
    for (let k = from; k < terms; k++) {
      const [ar, ai] = l[i][k];
      const [br, bi] = l[j][k];
      const [tr, ti] = [ar * br - ai * bi, ar * bi + ai * br];
      re += tr * d[k][0] - ti * d[k][1];
      im += tr * d[k][1] + ti * d[k][0];
    }
    return [re, im];
  };
  const space = frontWorkspace(n);
  const area = space.areas[n & 1];
  const layout = layoutOf(n);
  const at = (i: number, j: number): number => area + j * layout.leading + i;
  const c = space.numbers;
  c.fill(0.5);
  clearFront(c, area, n);
  for (let j = 0; j < n; j++)
    for (let i = j; i < n; i++) [c[at(i, j)], c[layout.imag + at(i, j)]] = entry(i, j, j + 1, 0);
  const count = p * (n - p) + (p * (p - 1)) / 2;
  const out = { inverseRe: new Float64Array(p + 3), inverseIm: new Float64Array(p + 3) };
  expect(eliminate(space, area, n, p, out, 3)).toBe(-1);
  const packed = space.areas[1 - (n & 1)];
  packColumns(space, area, n, p, packed, packed + count);
  let off = 0;
  const compare = (re: number, im: number, want: readonly number[]): void => {
    off = Math.max(off, Math.hypot(re - want[0], im - want[1]));
  };
  let e = packed;
  for (let k = 0; k < p; k++) {
    const q = d[k][0] ** 2 + d[k][1] ** 2;
    compare(out.inverseRe[3 + k], out.inverseIm[3 + k], [d[k][0] / q, -d[k][1] / q]);
    for (let i = k + 1; i < n; i++, e++) compare(c[e], c[e + count], l[i][k]);
  }
  for (let j = p; j < n; j++)
    for (let i = j; i < n; i++) compare(c[at(i, j)], c[layout.imag + at(i, j)], entry(i, j, j + 1, p));
  return Number.isNaN(off) ? Infinity : off;
}

describe("partial factorisation of a front gives back the L, D and remainder it was made of", () => {
  const sizes = [1, 2, 3, 4, 5, 7, 8, 9, 16, 25, 47, 48, 49, 97, 131];
  const cases = sizes.flatMap((n) =>
    [0, 1, 2, 3, n >> 1, n - 1, n].filter((p) => p <= n).map((p) => [n, p] as const),
  );
  it.each(cases)("%i rows, %i pivots", (n, p) => {
    expect(trial(n, p, 31 * n + p)).toBeLessThan(1e-14);
  });

  it("also where more than 128 column pairs wait behind a block", () => {
    expect(trial(333, 51, 7)).toBeLessThan(1e-14);
  });

  it("names the first pivot that is zero", () => {
    const space = frontWorkspace(6);
    clearFront(space.numbers, 0, 6);
    for (let k = 0; k < 6; k++) space.numbers[k * layoutOf(6).leading + k] = k === 4 ? 0 : 1;
    const out = { inverseRe: new Float64Array(6), inverseIm: new Float64Array(6) };
    expect(eliminate(space, 0, 6, 6, out, 0)).toBe(4);
  });
});
