import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cutGrid } from "../grid/cut.ts";
import { axisEdge, fieldAt, touchOfCell } from "./axis.ts";
import { ballMesh, slantedMesh } from "./fixtures.ts";
import { edgeKind, emptyTable, kindOfCell, NODES, quadratics, shapeAt } from "./shape.ts";

const inside = fc.double({ min: -0.98, max: 0.98, noNaN: true });
const grids = { slanted: cutGrid(slantedMesh(), 2), ball: cutGrid(ballMesh([0.3, 1], 3), 2) };

/** Every cell of the two grids that touches the axis. */
function axisCells(): { kind: number; touch: number; s: Float64Array; z: Float64Array }[] {
  return Object.values(grids).flatMap((grid) =>
    Array.from(grid.cellRegion, (_region, cell) => {
      const nodes = grid.cellNodes.subarray(cell * NODES, (cell + 1) * NODES);
      return {
        kind: kindOfCell(grid.r, grid.z, grid.cellNodes, cell * NODES),
        touch: touchOfCell(grid.r, grid.cellNodes, cell * NODES),
        s: Float64Array.from(nodes, (i) => grid.r[i] ** 2),
        z: Float64Array.from(nodes, (i) => grid.z[i]),
      };
    }).filter((cell) => cell.touch > 0),
  );
}

describe("functions of the map", () => {
  it("are 1 at their own node, 0 at the others, and add up to 1 (seed 7)", () => {
    const table = emptyTable(1);
    for (let b = 0; b < 3; b++) {
      for (let a = 0; a < 3; a++) {
        shapeAt(0, a - 1, b - 1, table);
        for (let i = 0; i < NODES; i++) expect(Math.abs(table.n[i])).toBe(i === a + 3 * b ? 1 : 0);
      }
    }
    fc.assert(
      fc.property(fc.nat(80), inside, inside, (kind, xi, eta) => {
        shapeAt(kind, xi, eta, table);
        expect(table.n.reduce((x, y) => x + y, 0)).toBeCloseTo(1, 12);
        expect(table.dXi.reduce((x, y) => x + y, 0)).toBeCloseTo(0, 11);
      }),
      { seed: 7 },
    );
  });

  it("know edges that leave the axis squarely from slanted ones", () => {
    const kind = (z: readonly number[]): number =>
      edgeKind(Float64Array.of(0, 0.5, 1), Float64Array.from(z), 0, 1, 2);
    expect(kind([0, 0, 0])).toBe(1);
    expect(kind([0, 0.1, 0.4])).toBe(1);
    expect(kind([0, 0.5, 1])).toBe(0);
    expect(edgeKind(Float64Array.of(1, 0.5, 0), new Float64Array(3), 0, 1, 2)).toBe(2);
    expect(edgeKind(new Float64Array(3), Float64Array.of(0, 1, 2), 0, 1, 2)).toBe(0);
  });
});

describe("functions of ψ on the axis", () => {
  it("are met in every way: by a side, by a corner, squarely and at a slant", () => {
    const cells = axisCells();
    expect(cells.some((c) => c.touch >= 5)).toBe(true);
    expect(cells.some((c) => c.touch <= 4 && c.kind === 0)).toBe(true);
    expect(cells.some((c) => c.touch <= 4 && c.kind > 0)).toBe(true);
  });

  it("hold ψ = s exactly and have the derivatives they claim (seed 11)", () => {
    const here = emptyTable(1);
    const map = emptyTable(1);
    const near = emptyTable(1);
    const step = 1e-6;
    const dot = (n: Float64Array, s: Float64Array): number => n.reduce((sum, v, i) => sum + v * s[i], 0);
    fc.assert(
      fc.property(fc.constantFrom(...axisCells()), inside, inside, ({ kind, touch, s }, xi, eta) => {
        fieldAt(kind, touch, s, xi, eta, here);
        shapeAt(kind, xi, eta, map);
        const size = Math.max(...s);
        expect(dot(here.n, s) / size).toBeCloseTo(dot(map.n, s) / size, 13);
        expect(dot(here.dXi, s) / size).toBeCloseTo(dot(map.dXi, s) / size, 12);
        expect(dot(here.dEta, s) / size).toBeCloseTo(dot(map.dEta, s) / size, 12);
        fieldAt(kind, touch, s, xi + step, eta, near);
        for (let i = 0; i < NODES; i++) expect((near.n[i] - here.n[i]) / step).toBeCloseTo(here.dXi[i], 4);
        fieldAt(kind, touch, s, xi, eta + step, near);
        for (let i = 0; i < NODES; i++) expect((near.n[i] - here.n[i]) / step).toBeCloseTo(here.dEta[i], 4);
      }),
      { seed: 11 },
    );
  });

  it("have on every edge the trace that edge's own nodes dictate, so neighbours fit (seed 13)", () => {
    const table = emptyTable(1);
    const trace = new Float64Array(6);
    const edges = [
      { nodes: [0, 1, 2], digit: 0, at: (x: number) => [x, -1] },
      { nodes: [6, 7, 8], digit: 1, at: (x: number) => [x, 1] },
      { nodes: [0, 3, 6], digit: 2, at: (x: number) => [-1, x] },
      { nodes: [2, 5, 8], digit: 3, at: (x: number) => [1, x] },
    ];
    fc.assert(
      fc.property(fc.constantFrom(...axisCells()), inside, ({ kind, touch, s }, x) => {
        for (const { nodes, digit, at } of edges) {
          if (nodes.every((i) => s[i] === 0)) continue;
          const [xi, eta] = at(x);
          fieldAt(kind, touch, s, xi, eta, table);
          axisEdge(s[nodes[0]], s[nodes[1]], s[nodes[2]], Math.floor(kind / 3 ** digit) % 3, x, trace);
          for (let i = 0; i < NODES; i++) {
            const own = nodes.indexOf(i);
            if (s[i] > 0) expect(table.n[i]).toBeCloseTo(own < 0 ? 0 : trace[own], 12);
          }
        }
      }),
      { seed: 13 },
    );
  });

  it("fall with s: ψ/s stays bounded towards the axis, where quadratics in r do not", () => {
    const table = emptyTable(1);
    for (const { kind, touch, s } of axisCells()) {
      if (touch > 4) continue;
      const [xi, eta] = [
        [-1 + 1e-7, 0.3],
        [1 - 1e-7, 0.3],
        [0.3, -1 + 1e-7],
        [0.3, 1 - 1e-7],
      ][touch - 1];
      fieldAt(kind, touch, s, xi, eta, table);
      const here = table.n.reduce((sum, v, i) => sum + v * s[i], 0);
      const most = Math.max(...s);
      for (let i = 0; i < NODES; i++) expect(Math.abs(table.n[i] / here) * most).toBeLessThan(100);
    }
    const q = new Float64Array(9);
    quadratics(-1 + 1e-7, 0, q);
    expect(q[1] / 2.5e-15).toBeGreaterThan(1e6);
  });
});
