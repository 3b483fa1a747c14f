import { describe, expect, it } from "vitest";
import type { Heat } from "../../heat.ts";
import { seenWords } from "./seen.ts";

const square = (r: number, z: number, size: number): [number, number][] => [
  [r, z],
  [r + size, z],
  [r + size, z + size],
  [r, z + size],
];

const heat: Heat = {
  corners: Float64Array.from([square(0, 0, 0.01), square(0.02, 0, 0.01), square(0.04, 0, 0.01)].flat(2)),
  density: Float64Array.from([3.187e9, 0, 25]),
  outline: Uint16Array.from([0, 1, 2]),
  outlines: [
    { role: "part", name: "pin", points: square(0, 0, 0.01) },
    { role: "part", name: "holder", points: square(0.02, 0, 0.01) },
    { role: "guide", name: "yoke", points: square(0.04, 0, 0.01) },
  ],
};

describe("the words for what is under the pointer", () => {
  it("tell density, body, place and depth; the axis is no surface", () => {
    expect(seenWords(heat, { r: 0.0005, z: 0.004, cell: 0 })).toEqual({
      value: "3187 W/cm³".replace("3187", "3190"),
      body: "pin",
      place: "r 0.50 mm, z 4.00 mm, 4 mm below its surface",
    });
    expect(seenWords(heat, { r: 0.01, z: 0.004, cell: 0 }).place).toMatch(/at its surface$/);
  });

  it("tell what takes no heat, what is a guide, and the open", () => {
    expect(seenWords(heat, { r: 0.021, z: 0.005, cell: 1 })).toMatchObject({
      value: "no heat",
      body: "holder",
    });
    expect(seenWords(heat, { r: 0.041, z: 0.005, cell: 2 })).toMatchObject({
      value: "25 µW/cm³",
      body: "yoke (guide)",
    });
    expect(seenWords(heat, { r: 0.015, z: -0.00001, cell: -1 })).toEqual({
      value: "open",
      body: "",
      place: "r 15.00 mm, z −0.01 mm",
    });
  });
});
