import { describe, expect, it } from "vitest";
import { heatColour } from "../../api/format/colour.ts";
import type { Heat } from "../heat.ts";
import { packed, paintOf, paintPixels, plainColour, rgbOf } from "./paint.ts";

const square = (r: number): [number, number][] => [
  [r, 0],
  [r + 1, 0],
  [r + 1, 1],
  [r, 1],
];

/** A part half hot, half without heat, a holder that takes none, a guide. */
const heat: Heat = {
  corners: Float32Array.from([0, 1, 2, 3].flatMap((r) => square(r).flat())),
  density: Float32Array.from([100, 0, 0, 50]),
  outline: Uint16Array.from([0, 0, 1, 2]),
  outlines: [
    { role: "part", name: "pin", points: square(0) },
    { role: "part", name: "holder", points: square(2) },
    { role: "guide", name: "yoke", points: square(3) },
  ],
};
const scale = { kind: "linear", low: 0, high: 100 } as const;
const palette = { cold: [1, 2, 3], guide: [4, 5, 6], hatch: [7, 8, 9] } as const;
const window = { left: 0, top: 1, step: 0.1, width: 50, height: 10 };

describe("the painting of cells", () => {
  const paint = paintOf(heat, scale, palette);
  const pixels = new Uint32Array(500);
  paintPixels(heat.corners, window, paint, pixels, { ground: 42, ratio: 1 });
  const at = (r: number): number => pixels[250 + Math.floor(r / 0.1)]!;

  it("gives the legend's colours to heat, the cold one to a body without any", () => {
    expect(at(0.5)).toBe(packed(rgbOf(heatColour(1))));
    expect(at(1.5)).toBe(packed(rgbOf(heatColour(0))));
    expect(at(2.5)).toBe(packed(palette.cold));
    expect(at(4.5)).toBe(42);
    expect(paintOf(heat, null, palette).colours[0]).toBe(packed(palette.cold));
  });

  it("hatches guides in two colours that add up to all of them", () => {
    const of = (colour: number): number => pixels.filter((pixel) => pixel === colour).length;
    const [lines, between] = [of(packed(palette.hatch)), of(packed(palette.guide))];
    expect(lines + between).toBe(100);
    // Two in seven by the line's width.
    expect(lines / 100).toBeCloseTo(2 / 7, 1);
    expect(plainColour(paint, 3)).toBe(packed(palette.guide));
    expect(plainColour(paint, 0)).toBe(at(0.5));
  });
});
