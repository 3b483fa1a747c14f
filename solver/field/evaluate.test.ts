import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { makePatchMesh, tensorPatches } from "../grid/patches.ts";
import { makeProbe } from "./evaluate.ts";
import {
  AIR,
  ballMesh,
  COIL_TURNS,
  circuit,
  coilMaterials,
  coilMesh,
  prepared,
  slantedMesh,
} from "./fixtures.ts";
import { makeLocator } from "./locate.ts";
import { emptyTable, NODES, shapeAt } from "./shape.ts";
import { solveState } from "./solve.ts";
import { solveApplied } from "./sources.ts";

const meshes = { coil: coilMesh(), ball: ballMesh([0.3, 1], 3), slanted: slantedMesh() };
const grids = Object.values(meshes).map((mesh) =>
  prepared(mesh, 2, mesh.region.length > 100 ? [-1, -1, -1, -1, -1] : [-1, -1]),
);

describe("the locator", () => {
  it("gives back (ξ, η) of any place of any cell (seed 17)", () => {
    const inside = fc.double({ min: -0.97, max: 0.97, noNaN: true });
    const shape = emptyTable(1);
    const locators = grids.map((p) => makeLocator(p));
    fc.assert(
      fc.property(fc.nat(2), fc.nat(1e6), inside, inside, (k, any, xi, eta) => {
        const { grid, integrals } = grids[k];
        const cell = any % grid.cellRegion.length;
        shapeAt(integrals.kind[cell], xi, eta, shape);
        let [s, z] = [0, 0];
        for (let i = 0; i < NODES; i++) {
          const node = grid.cellNodes[cell * NODES + i];
          s += shape.n[i] * grid.r[node] ** 2;
          z += shape.n[i] * grid.z[node];
        }
        const place = locators[k](Math.sqrt(s), z);
        expect(place?.cell).toBe(cell);
        expect(place?.xi).toBeCloseTo(xi, 6);
        expect(place?.eta).toBeCloseTo(eta, 6);
      }),
      { seed: 17, numRuns: 300 },
    );
  });

  it("does not take for inside a cell what its map, folded beyond its edges, never reaches", () => {
    const points = [
      [46.6, 15],
      [49.9, 17.1],
      [49.7, 19.8],
      [46.6, 21.3],
      [53.9, 17.2],
      [49.3, 22.6],
    ];
    const mesh = makePatchMesh(
      Float64Array.from(points, ([r]) => r),
      Float64Array.from(points, ([, z]) => z),
      Int32Array.of(0, 1, 2, 3, 4, 5, 2, 1),
      new Int32Array(2),
      [],
      null,
    );
    const { grid } = prepared(mesh, 1, [-1]);
    const locate = makeLocator(prepared(mesh, 1, [-1]));
    const shape = emptyTable(1);
    let found = 0;
    for (let k = 0; k < 90_000; k++) {
      const [r, z] = [46 + 0.03 * (k % 300), 14 + 0.03 * Math.floor(k / 300)];
      const place = locate(r, z);
      if (place === null) continue;
      found++;
      shapeAt(0, place.xi, place.eta, shape);
      let [s, height] = [-r * r, -z];
      for (let i = 0; i < NODES; i++) {
        const node = grid.cellNodes[place.cell * NODES + i];
        s += shape.n[i] * grid.r[node] ** 2;
        height += shape.n[i] * grid.z[node];
      }
      expect(Math.hypot(s / r, height)).toBeLessThan(1e-6);
    }
    expect(found).toBeGreaterThan(20_000);
  });

  it("finds nothing outside", () => {
    expect(makeLocator(grids[2])(2.5, 0)).toBeNull();
    expect(makeLocator(grids[2])(1, 1.2)).toBeNull();
  });

  it("finds every height on the axis, where the map may be singular, to rounding", () => {
    const shape = emptyTable(1);
    grids.forEach((p) => {
      const { grid, integrals } = p;
      const locate = makeLocator(p);
      const axis = Array.from(grid.z).filter((_, i) => grid.r[i] === 0);
      const [low, high] = [Math.min(...axis), Math.max(...axis)];
      const inside = grid.exterior?.radius ?? Infinity;
      for (let k = 0; k <= 1000; k++) {
        const z = low + ((high - low) * k) / 1000;
        if (Math.abs(z - (grid.exterior?.centreZ ?? 0)) > inside) continue;
        const place = locate(0, z);
        if (place === null) throw new Error(`nothing at height ${z}`);
        shapeAt(integrals.kind[place.cell], place.xi, place.eta, shape);
        let [s, height] = [0, 0];
        for (let i = 0; i < NODES; i++) {
          const node = grid.cellNodes[place.cell * NODES + i];
          s += shape.n[i] * grid.r[node] ** 2;
          height += shape.n[i] * grid.z[node];
        }
        expect(Math.abs(s)).toBeLessThan(1e-14);
        expect(Math.abs(height - z)).toBeLessThan(1e-12 * (high - low));
      }
    });
  });

  it("prefers on the axis a cell with a side there", () => {
    const p = grids[2];
    const place = makeLocator(p)(0, -0.1);
    expect(p.integrals.touch[0]).toBeGreaterThan(4);
    expect(p.integrals.touch[place?.cell ?? 0]).toBeLessThan(5);
  });
});

describe("the probe", () => {
  it("reads a uniform field at any point of cells that meet the axis at any slant (seed 19)", () => {
    const p = grids[2];
    const s = solveApplied(p, { materials: [AIR, AIR], omega: 1 }, 1);
    const probe = makeProbe(s);
    const r = fc.oneof(fc.constant(0), fc.double({ min: 0, max: 2, noNaN: true }));
    fc.assert(
      fc.property(r, fc.double({ min: -1, max: 1, noNaN: true }), (rr, z) => {
        const { bz, br, psi } = probe(rr, z);
        expect(bz.re).toBeCloseTo(1, 6);
        expect(br.re).toBeCloseTo(0, 6);
        expect(psi.re).toBeCloseTo((rr * rr) / 2, 8);
      }),
      { seed: 19, numRuns: 300 },
    );
  });

  it("knows no field beyond a grid without open space", () => {
    const p = prepared(
      tensorPatches([0, 1], [0, 1], () => 0),
      1,
      [-1],
    );
    const probe = makeProbe(solveApplied(p, { materials: [AIR], omega: 1 }, 1));
    expect(() => probe(2, 0)).toThrow(/lies outside the grid/);
  });

  it("sees a coil from above and, upside down, from below alike", () => {
    const state = { materials: coilMaterials(), omega: 6e4 };
    const read = (mirrored: boolean): ReturnType<typeof makeProbe> =>
      makeProbe(solveState(prepared(coilMesh(1, mirrored), 1, COIL_TURNS), state, circuit([1, 1, 1])));
    const [up, down] = [read(false), read(true)];
    for (const [r, z] of [
      [0, 0.05],
      [0.022, 0.011],
      [0.2, -0.3],
    ]) {
      const [a, b] = [up(r, z), down(r, -z)];
      for (const part of ["re", "im"] as const) {
        expect(Math.abs(a.bz[part] - b.bz[part])).toBeLessThan(1e-9 * Math.hypot(a.bz.re, a.br.re));
        expect(Math.abs(a.br[part] + b.br[part])).toBeLessThan(1e-9 * Math.hypot(a.bz.re, a.br.re));
      }
    }
  });
});
