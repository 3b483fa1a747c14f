import { describe, expect, it } from "vitest";
import { dissect } from "./dissection.ts";
import { cellMatrix, gradedLines } from "./fixtures.ts";
import { frontsOf } from "./symbolic.ts";

const even = (n: number): number[] => Array.from({ length: n + 1 }, (_, i) => i);

describe("dissection", () => {
  const turnOf = (i: number, j: number): number => (i > 4 && i < 9 && j > 2 && j < 13 ? 0 : -1);
  const { structure } = cellMatrix(even(15), even(17), turnOf, 1, 1);
  const tree = dissect(structure);
  const fronts = frontsOf(structure, tree);

  it("holds every element in exactly one leaf, children before parents", () => {
    expect([...tree.order].sort((a, b) => a - b)).toEqual(even(15 * 17 - 1));
    for (let f = 0; f < tree.begin.length; f++) {
      if (tree.left[f] < 0) continue;
      expect(tree.left[f]).toBeLessThan(f);
      expect(tree.right[f]).toBeLessThan(f);
      expect(tree.begin[f]).toBe(tree.begin[tree.left[f]]);
      expect(tree.end[tree.left[f]]).toBe(tree.begin[tree.right[f]]);
      expect(tree.end[f]).toBe(tree.end[tree.right[f]]);
    }
  });

  it("eliminates every unknown once, in a front that carries it, with rows ascending and found again in the parent", () => {
    expect([...fronts.newNumber].sort((a, b) => a - b)).toEqual(even(structure.unknowns - 1));
    let pivot = 0;
    for (let f = 0; f < fronts.rows.length; f++) {
      const rows = [...fronts.rowIds.subarray(fronts.rowStart[f], fronts.rowStart[f + 1])];
      for (let k = 0; k < fronts.pivots[f]; k++) expect(rows[k]).toBe(pivot++);
      for (let k = 1; k < rows.length; k++) expect(rows[k]).toBeGreaterThan(rows[k - 1]);
      for (const child of [tree.left[f], tree.right[f]]) {
        if (child < 0) continue;
        for (let i = fronts.rowStart[child] + fronts.pivots[child]; i < fronts.rowStart[child + 1]; i++)
          expect(rows[fronts.rowInParent[i]]).toBe(fronts.rowIds[i]);
      }
    }
    expect(pivot).toBe(structure.unknowns);
  });

  it("eliminates a turn voltage last in its front, also when it is named first", () => {
    const ids = structure.ids.map((v) => structure.unknowns - 1 - v);
    const renamed = { ...structure, ids };
    const other = frontsOf(renamed, dissect(renamed));
    const row = other.newNumber[0];
    let pivot = -1;
    let f = -1;
    while (pivot < row) pivot += other.pivots[++f];
    expect(row).toBe(pivot);
    expect(other.pivots[f]).toBeGreaterThan(1);
  });

  it("cuts a square of n × n cells in halves that share one line of nodes", () => {
    const square = cellMatrix(even(16), even(16), () => -1, 0, 0).structure;
    const f = frontsOf(square, dissect(square));
    expect(f.pivots[f.pivots.length - 1]).toBeLessThanOrEqual(33);
  });

  it("fills no more than the study's 0.32 and 1.6 million numbers at 9k and 36k unknowns, whatever the grading", () => {
    for (const [n, limit] of [
      [48, 0.32e6],
      [96, 1.6e6],
    ]) {
      for (const lines of [even(n), gradedLines(n, 1e-5, 1e5 ** (1 / n))]) {
        const s = cellMatrix(lines, lines, () => -1, 0, 0).structure;
        expect(s.unknowns).toBeGreaterThan(n === 48 ? 9e3 : 36e3);
        const f = frontsOf(s, dissect(s));
        expect(f.entryStart[f.rows.length] + s.unknowns).toBeLessThan(limit);
      }
    }
  });
});
