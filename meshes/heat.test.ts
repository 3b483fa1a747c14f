import { beforeAll, describe, expect, it } from "vitest";
import { type Answer, answerAt } from "./answer.ts";
import { build } from "./build.ts";
import { checkDesign } from "./check.ts";
import { heatMap } from "./heat.ts";
import type { HeatMap } from "./heatmap.ts";

const { scene } = checkDesign({
  coil: {
    conductor: { section: "rectTube", radialWidthMm: 6, axialHeightMm: 8, wallMm: 1, material: "copper" },
    winding: { form: "helix", boreDiameterMm: 44, turns: 2, pitchMm: 12 },
  },
  parts: [
    { name: "ball", shape: "sphere", diameterMm: 30, centreZMm: 4, material: { resistivityOhmM: 2e-7 } },
    {
      name: "cup",
      shape: "cylinder",
      diameterMm: 40,
      boreDiameterMm: 30,
      lengthMm: 6,
      centreZMm: -20,
      material: { resistivityOhmM: 1e-6 },
    },
  ],
  drive: { frequencyHz: 5000, currentA: 100 },
});

let answer: Answer;
let map: HeatMap;
beforeAll(() => {
  answer = answerAt(scene, build(scene), 2, () => {});
  map = heatMap(scene, answer, 100);
});

/** Signed area and volume of revolution of piece i: shoelace, and Pappus' theorem. */
function piece(i: number): { area: number; volume: number } {
  let [area, moment] = [0, 0];
  for (let k = 0; k < 4; k++) {
    const at = (corner: number): number => map.corners[8 * i + corner] ?? 0;
    const [r, z, r2, z2] = [at(2 * k), at(2 * k + 1), at((2 * k + 2) % 8), at((2 * k + 3) % 8)];
    area += (r * z2 - r2 * z) / 2;
    moment += ((r * z2 - r2 * z) * (r + r2)) / 6;
  }
  return { area, volume: 2 * Math.PI * moment };
}

/** Sum of a figure over the pieces of the outlines with this name. */
const sum = (name: string, of: (i: number) => number): number =>
  Array.from(map.outline.keys()).reduce(
    (total, i) => (map.outlines[map.outline[i] ?? -1]?.name === name ? total + of(i) : total),
    0,
  );

describe("the heat map", () => {
  it("has one density and one outline a piece, all pieces counter-clockwise and right of the axis", () => {
    expect(map.corners.length).toBe(8 * map.density.length);
    expect(map.outline.length).toBe(map.density.length);
    map.density.forEach((p, i) => {
      expect(p).toBeGreaterThanOrEqual(0);
      expect(piece(i).area).toBeGreaterThan(0);
    });
    expect(map.corners.every((x, i) => i % 2 === 1 || x >= 0)).toBe(true);
  });

  it("fills each outline: areas of a ball's half section, a ring and a tube's copper", () => {
    const area = (name: string): number => sum(name, (i) => piece(i).area) * 1e6;
    expect(area("ball") / ((Math.PI * 15 ** 2) / 2)).toBeCloseTo(1, 2);
    // Positions are rounded to 2^−36 of the scene's size.
    expect(area("cup")).toBeCloseTo(5 * 6, 7);
    expect(area("turn 0")).toBeCloseTo(6 * 8 - 4 * 6, 7);
  });

  it("adds up to the powers at the current that flows", () => {
    const watts = (name: string): number => sum(name, (i) => (map.density[i] ?? 0) * piece(i).volume);
    answer.figures.forEach((p) => {
      expect(watts(p.body.name) / (p.power * 100 ** 2)).toBeCloseTo(1, 1);
    });
    const turn = answer.loaded?.losses.turnPower[1] ?? 0;
    expect(watts("turn 1") / (turn * 100 ** 2)).toBeCloseTo(1, 1);
  });

  it("goes with the square of the current", () => {
    const twice = heatMap(scene, answer, 200);
    map.density.forEach((p, i) => {
      expect(twice.density[i]).toBeCloseTo(4 * p, 6);
    });
  });

  it("outlines copper with its bore, then parts; a ball from pole to pole", () => {
    expect(map.outlines.map((o) => `${o.role} ${o.name}`)).toEqual([
      "copper turn 0",
      "copper turn 0",
      "copper turn 1",
      "copper turn 1",
      "part ball",
      "part cup",
    ]);
    const [outer, bore] = map.outlines.map((o) => o.points.map((p) => [p[0] * 1e3, p[1] * 1e3]));
    expect(outer?.[0]?.[0]).toBeCloseTo(22, 9);
    expect(outer?.[2]?.[1]).toBeCloseTo(-2, 9);
    expect(bore?.[0]?.[0]).toBeCloseTo(23, 9);
    const ball = map.outlines[4]?.points ?? [];
    for (const [r, z] of ball) expect(Math.hypot(r, z - 0.004)).toBeCloseTo(0.015, 12);
    expect(ball[0]?.[1]).toBeCloseTo(-0.011, 12);
    expect(ball.at(-1)?.[1]).toBeCloseTo(0.019, 12);
  });
});
