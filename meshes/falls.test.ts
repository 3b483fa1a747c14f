import { describe, expect, it } from "vitest";
import { fallsOf, kinship, surfaceFall } from "./falls.ts";
import type { Body, Piece } from "./scene.ts";

/** A rod 40 mm thick and 400 mm long. */
const rod: Piece = {
  kind: "polygon",
  points: [
    [0, 0],
    [0.02, 0],
    [0.02, 0.4],
    [0, 0.4],
  ],
};
const ball: Piece = { kind: "sphere", centreZ: 0, radius: 0.02 };

const body = (piece: Piece, relativePermeability: number, resistivity: number | null = 2e-7): Body => ({
  name: "piece",
  role: "part",
  index: 0,
  heated: true,
  pieces: [piece],
  material: { resistivity, relativePermeability, lossTangent: 0, saturation: null },
  cylinder: false,
});

/** δ = √(ρ/(π f µ)): 0.29 mm at 10 kHz and µr 60, 13 mm at 5 Hz. */
const [HIGH, LOW] = [1e4, 5];

describe("falls of global figures", () => {
  it("are slowed by magnetic edges alone, and only by bodies that are there", () => {
    const smooth = fallsOf([]);
    expect(fallsOf([body(rod, 1), body(ball, 60)])).toEqual(smooth);
    const edged = fallsOf([body(ball, 60), body(rod, 60)]);
    for (const figure of ["resistance", "power", "energy", "field"] as const) {
      expect(edged[figure].order).toBeLessThan(smooth[figure].order);
    }
  });
});

it("a body's energy is kin of its power where magnetic edges are", () => {
  expect(kinship([body(rod, 60), body(ball, 1)])).toBeGreaterThan(0);
  expect(kinship([body(rod, 1), body(ball, 60)])).toBe(0);
});

describe("fall of the surface field", () => {
  it("is first order where nothing sharp is magnetic, n^(−1/3) where it is", () => {
    expect(surfaceFall(body(rod, 1), [], HIGH)).toEqual({ order: 1, share: 1 });
    expect(surfaceFall(body(ball, 60), [], HIGH)).toEqual({ order: 1, share: 1 });
    expect(surfaceFall(body(rod, 60), [], LOW)).toEqual({ order: 1 / 3, share: 1 });
  });

  it("is owed to the edges in part only where the skin is thin against the body", () => {
    const confined = surfaceFall(body(rod, 60), [], HIGH);
    expect(confined.order).toBeCloseTo(1 / 3, 12);
    expect(confined.share).toBeLessThan(0.5);
  });

  it("is slowed by an edge of what touches the body, thin as the body's own skin may be", () => {
    const core = body(rod, 25, null);
    expect(surfaceFall(body(rod, 1), [core], HIGH)).toEqual({ order: 1 / 3, share: 1 });
    expect(surfaceFall(body(rod, 60), [core], HIGH)).toEqual({ order: 1 / 3, share: 1 });
    expect(surfaceFall(body(rod, 1), [body(rod, 1)], HIGH)).toEqual({ order: 1, share: 1 });
  });
});
