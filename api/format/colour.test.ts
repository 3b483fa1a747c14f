import { describe, expect, it } from "vitest";
import { heatColour, heatLab, toRgb } from "./colour.ts";

describe("the colours of heat", () => {
  it("turn CIE L*a*b* into sRGB as published for the primaries (CIE 15 with IEC 61966-2-1, D65)", () => {
    // L*a*b* of the sRGB primaries and white, rounded to 0.01, follow from the two standards' own matrices.
    expect(toRgb([53.24, 80.09, 67.2])).toEqual([255, 0, 0]);
    expect(toRgb([87.73, -86.18, 83.18])).toEqual([0, 255, 0]);
    expect(toRgb([32.3, 79.19, -107.86])).toEqual([0, 0, 255]);
    expect(toRgb([100, 0, 0])).toEqual([255, 255, 255]);
  });

  it("rise evenly: steps in L*a*b* differ by less than a fifth, lightness by nothing", () => {
    const points = Array.from({ length: 41 }, (_, k) => heatLab(k / 40));
    const steps = points.slice(1).map((p, k) => Math.hypot(...p.map((v, i) => v - points[k]![i]!)));
    expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(1.2);
    const rises = points.slice(1).map((p, k) => p[0] - points[k]![0]);
    for (const rise of rises) expect(rise).toBeCloseTo(82 / 40, 12);
  });

  it("hold the ends outside 0 … 1", () => {
    expect(heatColour(-1)).toBe(heatColour(0));
    expect(heatColour(2)).toBe(heatColour(1));
    expect(heatColour(0.5)).toMatch(/^#[0-9a-f]{6}$/);
  });
});
