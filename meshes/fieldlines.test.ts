import { describe, expect, it } from "vitest";
import { skinDepth } from "./build.ts";
import { checkDesign } from "./check.ts";
import { fieldLines, type Lines, MOST_NODES } from "./fieldlines.ts";
import { randomScene, shiftScene } from "./fixtures.ts";
import type { Scene } from "./scene.ts";

const draft = {
  coil: {
    conductor: {
      section: "roundTube",
      outsideDiameterMm: 8,
      wallMm: 1,
      material: { resistivityOhmM: 1.75e-8 },
    },
    winding: { form: "helix", boreDiameterMm: 44, turns: 4, pitchMm: 11 },
  },
  parts: [
    {
      name: "sleeve",
      shape: "cylinder",
      diameterMm: 30,
      boreDiameterMm: 12,
      lengthMm: 60,
      material: { resistivityOhmM: 2.5e-7, relativePermeability: 30 },
    },
  ],
  drive: { frequencyHz: 10e3, currentA: 100 },
};
const scene = checkDesign(draft).scene;
const lines = fieldLines(scene);

/** Index of the line at x mm. */
const indexOf = ({ at }: Lines, mm: number): number => at.findIndex((x) => Math.abs(x - mm / 1e3) < 1e-9);
const ascends = ({ at }: Lines): boolean => at.every((x, i) => i === 0 || x > (at[i - 1] ?? x));
const nodes = (s: Scene): number => {
  const { r, z } = fieldLines(s);
  return r.at.length * z.at.length;
};

describe("lines for fields", () => {
  it("cover axis, coil and part with half the half-size to spare", () => {
    expect(lines.r.at[0]).toBe(0);
    expect(lines.size).toBeCloseTo(0.03, 9);
    expect(lines.r.at.at(-1)).toBeCloseTo(0.03 + 0.015, 9);
    expect(lines.z.at[0]).toBeCloseTo(-0.03 - 0.015, 9);
    expect(lines.z.at.at(-1)).toBeCloseTo(0.03 + 0.015, 9);
    expect(ascends(lines.r) && ascends(lines.z)).toBe(true);
  });

  it("run along every surface of part and turns, bores included, and know on which side it lies", () => {
    const r: [number, number][] = [
      [6, 1],
      [15, -1],
      [22, 1],
      [23, -1],
      [29, 1],
      [30, -1],
    ];
    for (const [mm, side] of r) expect(lines.r.side[indexOf(lines.r, mm)]).toBe(side);
    for (const centre of [-16.5, -5.5, 5.5, 16.5]) {
      for (const [mm, side] of [
        [-4, 1],
        [-3, -1],
        [3, 1],
        [4, -1],
      ] as const) {
        expect(lines.z.side[indexOf(lines.z, centre + mm)]).toBe(side);
      }
    }
    expect(lines.z.side[indexOf(lines.z, -30)]).toBe(1);
    expect(lines.z.side[indexOf(lines.z, 30)]).toBe(-1);
    expect(lines.r.side.filter((s) => s !== 0).length).toBe(6);
  });

  it("stand within about half a skin depth of each other at a surface, and widen away from it", () => {
    const [part] = scene.bodies;
    const depth = part === undefined ? 0 : skinDepth(part.material, scene.frequency);
    const i = indexOf(lines.r, 15);
    const cell = (k: number): number => (lines.r.at[k + 1] ?? 0) - (lines.r.at[k] ?? 0);
    expect(cell(i - 1)).toBeLessThan(0.65 * depth);
    expect(cell(i)).toBeLessThan(0.65 * depth);
    expect(cell(i - 2)).toBeGreaterThan(cell(i - 1));
    expect(cell(i + 1)).toBeGreaterThan(cell(i));
  });

  it("are mirror images for a mirror image, and shift with the design", () => {
    const { at } = lines.z;
    at.forEach((z, k) => {
      expect(at[at.length - 1 - k]).toBeCloseTo(-z, 12);
    });
    const moved = fieldLines(shiftScene(scene, 0.1));
    expect(moved.z.at.length).toBe(at.length);
    moved.z.at.forEach((z, k) => {
      expect(z).toBeCloseTo((at[k] ?? 0) + 0.1, 12);
    });
  });

  it("stay within their count for any design: random ones, 60 turns, 1000 scattered rings", () => {
    for (let seed = 1; seed <= 200; seed++) {
      const s = randomScene(seed);
      const { r, z } = fieldLines(s);
      expect(ascends(r) && ascends(z)).toBe(true);
      expect(r.at.length * z.at.length).toBeLessThanOrEqual(MOST_NODES);
      expect(Math.min(r.at.length, z.at.length)).toBeGreaterThan(5);
    }
    const turns = Array.from({ length: 60 }, (_, k) => ({ r: 0.03, z: 0.01 * k }));
    const many: Scene = { ...scene, turns };
    expect(nodes(many)).toBeLessThanOrEqual(MOST_NODES);
    const tall = fieldLines(many);
    for (const t of turns) expect(indexOf(tall.z, 1e3 * t.z + 4)).toBeGreaterThan(0);
    const rings = Array.from({ length: 1000 }, (_, k) => ({
      r: 0.03 + 0.009 * Math.floor(k / 40) + 1e-5 * k,
      z: 0.009 * (k % 40) + 1e-6 * k,
    }));
    const scattered: Scene = { ...scene, turns: rings };
    expect(nodes(scattered)).toBeLessThanOrEqual(MOST_NODES);
    expect(nodes(scattered)).toBeGreaterThan(MOST_NODES / 2);
    expect(indexOf(fieldLines(scattered).r, 15)).toBeGreaterThan(0);
  });
});
