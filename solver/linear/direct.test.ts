import { describe, expect, it } from "vitest";
import { SolverError } from "../errors.ts";
import { analyse, type ElementStructure, factorise, residual, solve, solveRefined } from "./direct.ts";
import { cellMatrix, denseSolution, difference, gradedLines, random, randomVector } from "./fixtures.ts";

/** Even lines, and a few blocks of cells as turns. */
const even = (n: number): number[] => Array.from({ length: n + 1 }, (_, i) => i);
const blocks =
  (turns: number) =>
  (i: number, j: number): number =>
    i % 3 !== 0 && j % 3 !== 0 && Math.floor(j / 3) < turns ? Math.floor(j / 3) : -1;

/** Elements of random size and membership: nothing about them is a grid. A = Σ P (G Gᵀ + j H Hᵀ) Pᵀ. */
function randomMatrix(seed: number, unknowns: number, elements: number) {
  const next = random(seed);
  const start = [0];
  const ids: number[] = [];
  const re: number[] = [];
  const im: number[] = [];
  for (let e = 0; e < elements; e++) {
    const m = 1 + Math.floor(next() * 7);
    const own = new Set([e % unknowns]);
    while (own.size < m) own.add(Math.floor(next() * unknowns));
    ids.push(...own);
    start.push(ids.length);
    const g = Array.from({ length: own.size }, () => [next() - 0.5, next() - 0.5]);
    for (let i = 0; i < own.size; i++)
      for (let j = 0; j <= i; j++) {
        re.push(g[i][0] * g[j][0] + (i === j ? 0.1 : 0));
        im.push(g[i][1] * g[j][1]);
      }
  }
  const points = Float64Array.from({ length: elements }, next);
  const structure: ElementStructure = {
    unknowns,
    start: Int32Array.from(start),
    ids: Int32Array.from(ids),
    x: points,
    y: points.slice().reverse(),
  };
  return { structure, values: { re: Float64Array.from(re), im: Float64Array.from(im) }, next };
}

describe("the direct solver against ml-matrix's pivoted dense solution", () => {
  it.each([3, 17, 91, 255])("on random elements, seed %i", (seed) => {
    const unknowns = 8 + (seed % 90);
    const { structure, values, next } = randomMatrix(seed, unknowns, unknowns + 40);
    const b = randomVector(unknowns, next);
    const x = solve(factorise(analyse(structure), values), b);
    expect(difference(x, denseSolution(structure, values, b))).toBeLessThan(1e-11);
  });

  it.each([
    [1, 1, 0],
    [2, 5, 0],
    [7, 6, 2],
    [11, 9, 3],
  ])("on %i × %i nine-node cells with %i turn voltages", (nx, ny, turns) => {
    const { structure, values } = cellMatrix(even(nx), even(ny), blocks(turns), turns, 3);
    const b = randomVector(structure.unknowns, random(7));
    const x = solve(factorise(analyse(structure), values), b);
    expect(difference(x, denseSolution(structure, values, b))).toBeLessThan(1e-11);
  });

  it("on a grid graded 1e5 to 1 with strong and weak losses", () => {
    const lines = gradedLines(10, 1e-5, 3.6);
    const { structure, values } = cellMatrix(lines, lines, blocks(2), 2, 1e9);
    const b = randomVector(structure.unknowns, random(11));
    const { x, residual: error } = solveRefined(factorise(analyse(structure), values), values, b);
    expect(error).toBeLessThan(1e-15);
    expect(difference(x, denseSolution(structure, values, b))).toBeLessThan(1e-9);
  });
});

describe("the direct solver on larger grids", () => {
  const lines = gradedLines(40, 1e-5, 1.33);
  const { structure, values } = cellMatrix(lines, lines, blocks(12), 12, 1e8, 1);
  const analysis = analyse(structure);

  it("leaves a residual at rounding level, smaller still when refined", () => {
    const b = randomVector(structure.unknowns, random(13));
    const factor = factorise(analysis, values);
    const plain = residual(structure, values, solve(factor, b), b).error;
    expect(plain).toBeLessThan(2e-14);
    expect(solveRefined(factor, values, b).residual).toBeLessThan(1e-15);
  });

  it("shows a residual when one value of the matrix is off by 1e-9", () => {
    const b = randomVector(structure.unknowns, random(15));
    const spoiled = { re: values.re.slice(), im: values.im };
    spoiled.re[0] *= 1 + 1e-9;
    const x = solve(factorise(analysis, values), b);
    expect(residual(structure, spoiled, x, b).error).toBeGreaterThan(1e-11);
  });

  it("is reciprocal: x_i of e_j equals x_j of e_i", () => {
    const n = structure.unknowns;
    const factor = factorise(analysis, values);
    const picks = [n - 1, n - 7, 5, Math.floor(n / 3), Math.floor(n / 2)];
    const rhs = { re: new Float64Array(n * picks.length), im: new Float64Array(n * picks.length) };
    for (const [k, i] of picks.entries()) rhs.re[k * n + i] = 1;
    const x = solve(factor, rhs, picks.length);
    for (const [k, i] of picks.entries())
      for (const [l, j] of picks.entries()) {
        const a = [x.re[k * n + j], x.im[k * n + j]];
        const b = [x.re[l * n + i], x.im[l * n + i]];
        expect(Math.hypot(a[0] - b[0], a[1] - b[1])).toBeLessThanOrEqual(1e-9 * Math.hypot(a[0], a[1]));
      }
  });

  it("gives the same digits for every factorisation with one analysis, and with a new one", () => {
    const b = randomVector(structure.unknowns, random(17));
    const other = { re: values.re.map((v) => 2 * v), im: values.im };
    const first = solve(factorise(analysis, values), b);
    factorise(analysis, other);
    expect(solve(factorise(analysis, values), b)).toEqual(first);
    expect(solve(factorise(analyse(structure), values), b)).toEqual(first);
  });

  it("keeps a factor intact while others are made", () => {
    const b = randomVector(structure.unknowns, random(19));
    const factor = factorise(analysis, values);
    const first = solve(factor, b);
    factorise(analysis, { re: values.re, im: values.im.map((v) => 3 * v) });
    expect(solve(factor, b)).toEqual(first);
  });

  it("tells its progress up to 1 and stops when the listener throws", () => {
    const told: number[] = [];
    factorise(analysis, values, (fraction) => told.push(fraction));
    expect(told.length).toBeGreaterThan(10);
    expect(told).toEqual([...told].sort((p, q) => p - q));
    expect(told.at(-1)).toBe(1);
    const stop = new Error("enough");
    expect(() =>
      factorise(analysis, values, () => {
        throw stop;
      }),
    ).toThrow(stop);
  });
});

describe("closed forms", () => {
  it("reproduces ψ = x on a graded grid driven by a unit flux through its far side", () => {
    const lines = gradedLines(26, 1e-5, 1.5);
    const { structure, values, unknownOf, columns } = cellMatrix(lines, lines, () => -1, 0, 0);
    const width = lines.at(-1)!;
    const b = { re: new Float64Array(structure.unknowns), im: new Float64Array(structure.unknowns) };
    for (let j = 0; j + 1 < lines.length; j++) {
      const h = lines[j + 1] - lines[j];
      for (const [a, w] of [1 / 6, 4 / 6, 1 / 6].entries())
        b.re[unknownOf[(2 * j + a) * columns + columns - 1]] += h * w;
    }
    const x = solve(factorise(analyse(structure), values), b);
    for (let v = 0; v < unknownOf.length; v++) {
      if (unknownOf[v] < 0) continue;
      const i = v % columns;
      const position = (lines[i >> 1] + lines[(i + 1) >> 1]) / 2;
      expect(Math.abs(x.re[unknownOf[v]] - position)).toBeLessThan(1e-10 * width);
      expect(x.im[unknownOf[v]]).toBe(0);
    }
  });

  it("puts u = −j/(σ area) on a weakly conducting turn that fills the grid: the whole load passes through its mass", () => {
    const { structure, values } = cellMatrix(even(4), even(4), () => 0, 1, 1e-6);
    const n = structure.unknowns;
    const b = { re: new Float64Array(n), im: new Float64Array(n) };
    b.re[n - 1] = 1;
    const x = solve(factorise(analyse(structure), values), b);
    const mass = 16 * 1e-6;
    expect(x.im[n - 1] * mass).toBeCloseTo(-1, 3);
  });
});

describe("faults", () => {
  const { structure, values } = cellMatrix(even(6), even(6), () => -1, 0, 0);

  const codeOf = (run: () => unknown): string => {
    try {
      run();
    } catch (error) {
      if (error instanceof SolverError) return error.code;
      throw error;
    }
    return "none";
  };

  it("names a singular matrix", () => {
    const zero = { re: values.re.map(() => 0), im: values.im };
    expect(codeOf(() => factorise(analyse(structure), zero))).toBe("singular");
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY])("names a matrix with %d in it", (bad) => {
    const re = values.re.slice();
    re[re.length >> 1] = bad;
    expect(codeOf(() => factorise(analyse(structure), { re, im: values.im }))).toBe("singular");
  });

  it("refuses arrays that do not fit", () => {
    const ids = structure.ids.slice();
    ids[3] = structure.unknowns;
    expect(codeOf(() => analyse({ ...structure, ids }))).toBe("structure");
    ids[3] = ids[4];
    expect(codeOf(() => analyse({ ...structure, ids }))).toBe("structure");
    expect(codeOf(() => analyse({ ...structure, unknowns: structure.unknowns + 1 }))).toBe("structure");
    expect(codeOf(() => analyse({ ...structure, x: new Float64Array(3) }))).toBe("structure");
    const short = { re: values.re.slice(1), im: values.im };
    expect(codeOf(() => factorise(analyse(structure), short))).toBe("structure");
    const factor = factorise(analyse(structure), values);
    expect(codeOf(() => solve(factor, { re: new Float64Array(3), im: new Float64Array(3) }))).toBe(
      "structure",
    );
  });

  it("takes elements without unknowns and elements at one point", () => {
    const point = { ...structure, x: new Float64Array(36), y: new Float64Array(36) };
    const b = randomVector(structure.unknowns, random(23));
    const x = solve(factorise(analyse(point), values), b);
    expect(residual(structure, values, x, b).error).toBeLessThan(1e-14);
    const empty = {
      unknowns: structure.unknowns,
      start: Int32Array.from([0, ...structure.start]),
      ids: structure.ids,
      x: new Float64Array(37),
      y: new Float64Array(37),
    };
    expect(residual(structure, values, solve(factorise(analyse(empty), values), b), b).error).toBeLessThan(
      1e-14,
    );
  });
});
