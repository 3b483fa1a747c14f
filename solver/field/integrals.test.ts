import { describe, expect, it } from "vitest";
import { cutGrid } from "../grid/cut.ts";
import { makePatchMesh, tensorPatches } from "../grid/patches.ts";
import { quadraticForm } from "./cellforms.ts";
import { ballMesh, prepared, slantedMesh } from "./fixtures.ts";
import { integrateCells } from "./integrals.ts";
import { prepare } from "./prepare.ts";
import { NODES } from "./shape.ts";

const ZERO = new Float64Array(NODES);

describe("integrals of a cell", () => {
  it("of a rectangle are those of the calculus: ∫2 ds dz, ∫dz ds/(2s)", () => {
    const grid = cutGrid(
      tensorPatches([1, 1.2], [0, 0.3], () => 0),
      1,
    );
    const { stiffness, mass, leastJacobian } = integrateCells(grid);
    const at = (f: (r: number, z: number) => number): Float64Array =>
      Float64Array.from(grid.cellNodes, (i) => f(grid.r[i], grid.z[i]));
    const log = Math.log(1.44) / 2;
    expect(
      quadraticForm(
        stiffness,
        0,
        at((r) => r * r),
        ZERO,
      ),
    ).toBeCloseTo(2 * 0.44 * 0.3, 14);
    expect(
      quadraticForm(
        stiffness,
        0,
        at((_r, z) => z),
        ZERO,
      ),
    ).toBeCloseTo(log * 0.3, 10);
    expect(
      quadraticForm(
        mass,
        0,
        at(() => 1),
        ZERO,
      ),
    ).toBeCloseTo(log * 0.3, 10);
    expect(
      quadraticForm(
        mass,
        0,
        at((r) => r * r),
        ZERO,
      ),
    ).toBeCloseTo((0.3 * (1.2 ** 4 - 1)) / 4, 14);
    expect(
      quadraticForm(
        mass,
        0,
        at((_r, z) => z),
        ZERO,
      ),
    ).toBeCloseTo(log * 0.009, 11);
    expect(leastJacobian[0]).toBeGreaterThan(0.8);
  });

  it("of a uniform field add up to its energy on any grid, also where cells meet the axis at a slant", () => {
    const grid = cutGrid(slantedMesh(), 2);
    const { stiffness, mass } = integrateCells(grid);
    let energy = 0;
    let heat = 0;
    for (let c = 0; c < grid.cellRegion.length; c++) {
      const s = Float64Array.from(grid.cellNodes.subarray(c * NODES, (c + 1) * NODES), (i) => grid.r[i] ** 2);
      energy += quadraticForm(stiffness, c, s, ZERO);
      heat += quadraticForm(mass, c, s, ZERO);
    }
    // Cells with one square and one slanted edge on the axis have rational maps: the Gauss rule is good to 1e-8 there.
    expect(Math.abs(energy / (2 * 4 * 2) - 1)).toBeLessThan(1e-8);
    expect(Math.abs(heat / ((4 * 4 * 2) / 4) - 1)).toBeLessThan(1e-8);
  });

  it("outside the circle hold the energy of a dipole, (1/R) ∫ [t²(1−c²) + 4t²c²] = 4/(3R)", () => {
    for (const [sectors, digits] of [
      [2, 4],
      [6, 6],
    ] as const) {
      const grid = cutGrid(ballMesh([0.5, 2], sectors), 1);
      const { exteriorStiffness } = integrateCells(grid);
      const { cellNodes, t, c } = grid.exterior ?? { cellNodes: [], t: ZERO, c: ZERO };
      let energy = 0;
      for (let cell = 0; cell * NODES < cellNodes.length; cell++) {
        const dipole = ZERO.map((_v, i) => t[cell * NODES + i] * (1 - c[cell * NODES + i] ** 2));
        energy += quadraticForm(exteriorStiffness, cell, dipole, ZERO);
      }
      expect(energy).toBeCloseTo(4 / 3 / 2, digits);
    }
  });

  it("leave no residual of a uniform field at any inner node", () => {
    const p = prepared(ballMesh([0.4, 1], 3), 2, [-1, -1]);
    const { grid, integrals } = p;
    const residual = new Float64Array(grid.r.length);
    const size = new Float64Array(grid.r.length);
    const outer = new Set<number>(grid.exterior?.cellNodes);
    // Where an arc meets the axis S/S_i is rational and the Gauss rule good to 1e-10; everywhere else polynomials, exact.
    const nearPole = new Set<number>();
    for (let c = 0; c < grid.cellRegion.length; c++)
      if (integrals.touch[c] > 0) for (let i = 0; i < NODES; i++) nearPole.add(grid.cellNodes[c * NODES + i]);
    for (let c = 0; c < grid.cellRegion.length; c++) {
      let k = c * 45;
      for (let i = 0; i < NODES; i++) {
        for (let j = 0; j <= i; j++, k++) {
          const [a, b] = [grid.cellNodes[c * NODES + i], grid.cellNodes[c * NODES + j]];
          residual[a] += integrals.stiffness[k] * grid.r[b] ** 2;
          size[a] += Math.abs(integrals.stiffness[k]) * grid.r[b] ** 2;
          if (a !== b) residual[b] += integrals.stiffness[k] * grid.r[a] ** 2;
        }
      }
    }
    for (let i = 0; i < residual.length; i++)
      if (grid.fixed[i] === 0 && !outer.has(i))
        expect(Math.abs(residual[i]), `node ${i}`).toBeLessThan((nearPole.has(i) ? 1e-9 : 1e-13) * size[i]);
  });

  it("refuse a cell that is turned over", () => {
    const mesh = makePatchMesh(
      Float64Array.of(1, 2, 2, 1),
      Float64Array.of(0, 0, 1, 1),
      Int32Array.of(0, 3, 2, 1),
      Int32Array.of(0),
      [],
      null,
    );
    expect(() => prepare(cutGrid(mesh, 1), [-1])).toThrow(/cell 0 of region 0 is turned over/);
  });
});
