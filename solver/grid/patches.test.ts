import { describe, expect, it } from "vitest";
import { makePatchMesh, tensorPatches } from "./patches.ts";

describe("patches between lines", () => {
  const mesh = tensorPatches([0, 1, 3], [-1, 0, 2, 5], (r, z) => (r > 1 ? 1 : 0) + (z > 2 ? 2 : 0));

  it("Euler: corners − edges + patches = 1", () => {
    expect(mesh.r.length - mesh.edgeEnds.length / 2 + mesh.region.length).toBe(1);
  });

  it("each runs counter-clockwise round its rectangle, and knows its region", () => {
    const sizes = mesh.region.map((_, p) => {
      const [a, , c] = mesh.corners.subarray(4 * p, 4 * p + 4);
      const [dr, dz] = [
        (mesh.r[c ?? 0] ?? 0) - (mesh.r[a ?? 0] ?? 0),
        (mesh.z[c ?? 0] ?? 0) - (mesh.z[a ?? 0] ?? 0),
      ];
      expect(dr).toBeGreaterThan(0);
      expect(dz).toBeGreaterThan(0);
      return dr * dz;
    });
    expect(sizes.reduce((a, b) => a + b, 0)).toBe(3 * 6);
    expect([...mesh.region]).toEqual([0, 1, 0, 1, 2, 3]);
  });

  it("edge i of a patch joins its corners i and i + 1, and neighbours share it", () => {
    const uses = new Map<number, number>();
    mesh.patchEdges.forEach((e, k) => {
      const p = k >> 2;
      const ends = [mesh.corners[k], mesh.corners[4 * p + ((k + 1) & 3)]];
      expect([...mesh.edgeEnds.subarray(2 * e, 2 * e + 2)].sort()).toEqual(ends.sort());
      uses.set(e, (uses.get(e) ?? 0) + 1);
    });
    const shared = [...uses.values()].filter((n) => n === 2).length;
    expect([shared, uses.size - shared]).toEqual([7, 10]);
  });
});

describe("arcs", () => {
  const r = Float64Array.from([0, 1, 1, 0, 2]);
  const z = Float64Array.from([0, 0, 1, 1, 0]);
  const corners = Int32Array.from([0, 1, 2, 3]);

  it("are kept with their edge, whichever way round it is named", () => {
    for (const [a, b] of [
      [1, 2],
      [2, 1],
    ] as const) {
      const arc = { a, b, centreR: 0.5, centreZ: 0.5, radius: Math.SQRT1_2 };
      const mesh = makePatchMesh(r, z, corners, new Int32Array(1), [arc], null);
      const e = mesh.patchEdges[1] ?? -1;
      expect([...mesh.edgeArc.subarray(3 * e, 3 * e + 3)]).toEqual([0.5, 0.5, Math.SQRT1_2]);
      expect(mesh.edgeArc.filter((x) => x !== 0).length).toBe(3);
      expect(mesh.outerEdges.length).toBe(0);
    }
  });

  it("on an edge that is none are a defect", () => {
    const arc = { a: 0, b: 2, centreR: 0, centreZ: 0, radius: 1 };
    expect(() => makePatchMesh(r, z, corners, new Int32Array(1), [arc], null)).toThrow(RangeError);
  });

  it("on the outer circle are listed from below to above, others of its size elsewhere are not", () => {
    const R = Math.SQRT2;
    const [x, y] = [Float64Array.from([0, 1, R, 1, 0]), Float64Array.from([-R, -1, 0, 1, R])];
    const quads = Int32Array.from([0, 1, 2, 4, 2, 3, 4, 4]);
    const on = (a: number, b: number, centreZ = 0) => ({ a, b, centreR: 0, centreZ, radius: R });
    const list = [on(3, 4), on(0, 1), on(2, 3), on(1, 2, 1e-3)];
    const mesh = makePatchMesh(x, y, quads, new Int32Array(2), list, { centreZ: 0, radius: R });
    const ends = [...mesh.outerEdges].map((e) => [...mesh.edgeEnds.subarray(2 * e, 2 * e + 2)]);
    expect(ends).toEqual([
      [0, 1],
      [2, 3],
      [3, 4],
    ]);
  });
});
