import { describe, expect, it } from "vitest";
import { countNodes, cutGrid } from "./cut.ts";
import { type ArcOfEdge, makePatchMesh } from "./patches.ts";

/** Half disc of radius R about (0, centre): three patches along the circle and one that closes the middle towards the axis. */
function halfDisc(R: number, centre: number) {
  const h = Math.SQRT1_2 * R;
  const r = [0, 0, R / 2, 0, 0, h, R, h, 0];
  const z = [-R, -R / 2, 0, R / 2, R, h, 0, -h, 0].map((v) => v + centre);
  const arc = (a: number, b: number): ArcOfEdge => ({ a, b, centreR: 0, centreZ: centre, radius: R });
  return makePatchMesh(
    Float64Array.from(r),
    Float64Array.from(z),
    Int32Array.from([0, 7, 2, 1, 7, 6, 5, 2, 2, 5, 4, 3, 1, 2, 3, 8]),
    new Int32Array(4),
    [arc(0, 7), arc(7, 6), arc(6, 5), arc(5, 4)],
    { centreZ: centre, radius: R },
  );
}

/** A ring between radii 1 and 2 about (3, 0), eight patches: angles pass ±π. */
function ring() {
  const at = (radius: number, k: number): [number, number] => {
    const angle = (k * Math.PI) / 4;
    return [3 + radius * Math.cos(angle), radius * Math.sin(angle)];
  };
  const eighths = Array.from({ length: 8 }, (_, k) => k);
  const points = eighths.flatMap((k) => [at(1, k), at(2, k)]);
  const arcs = eighths.flatMap((k) =>
    [1, 2].map(
      (radius, i): ArcOfEdge => ({ a: 2 * k + i, b: (2 * k + 2 + i) % 16, centreR: 3, centreZ: 0, radius }),
    ),
  );
  return makePatchMesh(
    Float64Array.from(points, (p) => p[0]),
    Float64Array.from(points, (p) => p[1]),
    Int32Array.from(eighths.flatMap((k) => [0, 1, 3, 2].map((c) => (2 * k + c) % 16))),
    Int32Array.from(eighths),
    arcs,
    null,
  );
}

describe("a ring cut into cells", () => {
  it.each([1, 2, 5])("level %d has every node on its circle, at equal angles", (n) => {
    const grid = cutGrid(ring(), n);
    // Concentric arcs and straight rays: the Coons map is polar, radii and angles in equal steps.
    for (let i = 0; i < grid.r.length; i++) {
      const radius = Math.hypot((grid.r[i] ?? 0) - 3, grid.z[i] ?? 0);
      const step = (radius - 1) * 2 * n;
      expect(Math.abs(step - Math.round(step))).toBeLessThan(1e-12 * n);
      const turn = (Math.atan2(grid.z[i] ?? 0, (grid.r[i] ?? 0) - 3) / (Math.PI / 4)) * 2 * n;
      expect(Math.abs(turn - Math.round(turn))).toBeLessThan(1e-12 * n);
    }
  });

  it.each([1, 2, 5])("level %d: counted nodes, each in a cell, patches and regions kept", (n) => {
    const mesh = ring();
    const grid = cutGrid(mesh, n);
    expect(grid.r.length).toBe(countNodes(mesh, n));
    expect(grid.r.length).toBe((2 * n + 1) * 16 * n);
    expect(new Set(grid.cellNodes).size).toBe(grid.r.length);
    expect(grid.cellRegion.length).toBe(8 * n * n);
    grid.cellPatch.forEach((p, c) => {
      expect(grid.cellRegion[c]).toBe(mesh.region[p]);
    });
  });

  it("neighbours share the nodes of their common edge: a coarse grid's are every second of the fine one's", () => {
    const key = (r = 0, z = 0): string => `${r.toFixed(9)},${z.toFixed(9)}`;
    const [coarse, fine] = [cutGrid(ring(), 2), cutGrid(ring(), 4)];
    const there = new Set(Array.from(fine.r, (r, i) => key(r, fine.z[i])));
    expect(there.size).toBe(fine.r.length);
    coarse.r.forEach((r, i) => {
      expect(there.has(key(r, coarse.z[i]))).toBe(true);
    });
  });
});

describe("open space round a half disc", () => {
  const [R, centre] = [2, 0.7];
  const mesh = halfDisc(R, centre);

  it.each([1, 3])("level %d: rings from the circle to infinity, nodes counted", (n) => {
    const grid = cutGrid(mesh, n);
    const { exterior } = grid;
    expect(grid.r.length).toBe(countNodes(mesh, n));
    expect(exterior?.cellNodes.length).toBe(9 * 2 * n * 4 * n);
    exterior?.cellNodes.forEach((node, k) => {
      const [t, c] = [exterior.t[k] ?? 0, exterior.c[k] ?? 0];
      // The Kelvin image at ρ' = R t keeps its direction.
      const [r, z] = [grid.r[node] ?? 0, (grid.z[node] ?? 0) - centre];
      expect(Math.hypot(r, z)).toBeCloseTo(R * t, 12);
      expect(z).toBeCloseTo(R * t * c, 12);
      expect(grid.fixed[node]).toBe(t === 0 || Math.abs(c) === 1 ? 1 : 0);
    });
  });

  it("angles rise along a from below to above, t falls along b", () => {
    const exterior = cutGrid(mesh, 2).exterior;
    for (let k = 0; k < (exterior?.c.length ?? 0); k += 9) {
      const [c, t] = [exterior?.c.subarray(k, k + 9), exterior?.t.subarray(k, k + 9)];
      expect(c?.[2]).toBeGreaterThan(c?.[0] ?? 2);
      expect(t?.[6]).toBeLessThan(t?.[0] ?? 0);
    }
  });

  it("edges that run the other way round, as in a mesh turned upside down, give the same space", () => {
    const edgeEnds = mesh.edgeEnds.slice();
    for (const e of mesh.outerEdges) edgeEnds.subarray(2 * e, 2 * e + 2).reverse();
    const [plain, turned] = [cutGrid(mesh, 2), cutGrid({ ...mesh, edgeEnds }, 2)];
    expect(turned.exterior?.c).toEqual(plain.exterior?.c);
    turned.exterior?.cellNodes.forEach((node, k) => {
      const other = plain.exterior?.cellNodes[k] ?? -1;
      expect(turned.r[node]).toBeCloseTo(plain.r[other] ?? -1, 12);
      expect(turned.z[node]).toBeCloseTo(plain.z[other] ?? -9, 12);
    });
  });

  it("the axis is fixed, all else inside is free", () => {
    const grid = cutGrid(mesh, 2);
    for (const node of grid.cellNodes) expect(grid.fixed[node]).toBe(grid.r[node] === 0 ? 1 : 0);
  });
});
