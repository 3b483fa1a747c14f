import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import { randomScene, scaleScene, shiftScene } from "./fixtures.ts";
import { type Inspection, inspect } from "./invariants.ts";
import type { Scene } from "./scene.ts";

const folder = new URL("./examples/", import.meta.url);
const gallery = readdirSync(folder)
  .filter((f) => f.endsWith(".json"))
  .map((f) => ({ name: f, scene: checkDesign(JSON.parse(readFileSync(new URL(f, folder), "utf8"))).scene }));

/** Corners stay clear of 0° and 180°; arcs are held to h⁴; no surface cell above 0.85 δ at level 1. */
function expectSound(found: Inspection): void {
  expect(found.looseEdges).toBe(0);
  expect(found.leastSine).toBeGreaterThan(2e-3);
  expect(found.areaError).toBeLessThan(2e-4);
  expect(found.volumeError).toBeLessThan(2e-4);
  expect(found.surfaceCell).toBeLessThan(0.85);
}

describe("grids of the gallery", () => {
  it.each(gallery)("$name is sound at levels 1 and 2", ({ scene }) => {
    expectSound(inspect(scene, 1));
    const fine = inspect(scene, 2);
    expectSound(fine);
    expect(fine.volumeError).toBeLessThan(2e-5);
  });

  it.each([1e-4, 1e-2, 1, 10])("the first design is sound at %d m across", (size) => {
    const scene = gallery.find((g) => g.name === "demo.json")?.scene as Scene;
    const reach = Math.max(...scene.turns.map((t) => 2 * t.r));
    expectSound(inspect(scaleScene(scene, size / reach), 1));
  });
});

/** Designs that once came out wrong, each reduced to what did it. */
const hard = [
  {
    name: "rectangular turns a three-hundredth of their width apart, corner against corner",
    coil: {
      conductor: { section: "rectBar", radialWidthMm: 0.26, axialHeightMm: 0.284, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 0.93, turns: 5, pitchMm: [0.285, 0.336, 0.2857, 0.2935] },
    },
  },
  {
    name: "a thin ring alone, cut by its own mirror plane",
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 2, material: "copper" },
      winding: { form: "rings", centresMm: [[500, 0]] },
    },
  },
  {
    name: "parts that touch over part of a face",
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 60, turns: 3, pitchMm: 8 },
    },
    parts: [
      { shape: "cylinder", diameterMm: 40, lengthMm: 20, material: { resistivityOhmM: 2e-7 } },
      { shape: "cylinder", diameterMm: 25, lengthMm: 10, centreZMm: 15, material: { resistivityOhmM: 1e-6 } },
    ],
  },
  {
    name: "two equal parts whose faces meet in the plane of symmetry",
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 60, turns: 4, pitchMm: 8 },
    },
    parts: [10, -10].map((centreZMm) => ({
      shape: "cylinder",
      diameterMm: 40,
      lengthMm: 20,
      centreZMm,
      material: { resistivityOhmM: 2e-7 },
    })),
  },
  {
    name: "parts that touch in a wedge of little more than half a degree",
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: "copper" },
      winding: { form: "helix", boreDiameterMm: 60, turns: 3, pitchMm: 8 },
    },
    parts: [
      [
        [0, -10],
        [20, -10],
        [20, 0],
        [0, 0],
      ],
      [
        [10, 0],
        [20, 0.1],
        [20, 10],
        [10, 10],
      ],
    ].map((pointsMm) => ({ shape: "outline", pointsMm, material: { resistivityOhmM: 2e-7 } })),
  },
];

describe("grids that once came out wrong", () => {
  it.each(hard)("$name", (design) => {
    const { scene } = checkDesign({ ...design, drive: { frequencyHz: 10_000, currentA: 1 } });
    expectSound(inspect(scene, 1));
    expectSound(inspect(scene, 3));
  });
});

describe("grids of random scenes", () => {
  it.each(Array.from({ length: 60 }, (_, k) => 7 + 1001 * k))("seed %d is sound", (seed) => {
    expectSound(inspect(randomScene(seed), 1));
  });
});

describe("equal designs, equal grids", () => {
  const scene = gallery.find((g) => g.name === "stepped-shaft.json")?.scene as Scene;
  const plain = build(scene).mesh;

  it("scaled by any factor", () => {
    const factor = 3.7;
    const scaled = build(scaleScene(scene, factor)).mesh;
    expect(scaled.corners).toEqual(plain.corners);
    scaled.r.forEach((r, i) => {
      expect(Math.abs(r - factor * (plain.r[i] ?? 0))).toBeLessThan(
        1e-9 * factor * (plain.outer?.radius ?? 0),
      );
    });
  });

  it("moved along the axis", () => {
    const moved = build(shiftScene(scene, 0.123)).mesh;
    expect(moved.corners).toEqual(plain.corners);
  });

  it("mirrored: the same cells the other way up", () => {
    const mirrored = build(scaleScene(scene, -1)).mesh;
    const about = (plain.outer?.centreZ ?? 0) + (mirrored.outer?.centreZ ?? 0);
    const key = (r: number, z: number): string => `${(r * 1e9).toFixed(0)},${(z * 1e9).toFixed(0)}`;
    const there = new Set(Array.from(mirrored.r, (r, i) => key(r, about - (mirrored.z[i] ?? 0) + 0)));
    const missing = Array.from(plain.r, (r, i) => key(r, plain.z[i] ?? 0)).filter((k) => !there.has(k));
    expect(mirrored.region.length).toBe(plain.region.length);
    expect(missing.length / plain.r.length).toBeLessThan(0.01);
  });
});
