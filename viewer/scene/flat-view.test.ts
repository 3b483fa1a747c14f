import { describe, expect, it } from "vitest";
import { panned, screenAt, sectionAt, wholeView, windowOf, zoomed } from "./flat-view.ts";

const bounds = { rMax: 0.03, zMin: -0.05, zMax: 0.03 };
const size = { width: 800, height: 500 };
const whole = wholeView(bounds, size);

describe("the flat map's view", () => {
  it("shows both halves of everything with a little room", () => {
    const corners = [
      [-0.03, -0.05],
      [0.03, 0.03],
    ].map(([r, z]) => screenAt(whole, size, r!, z!));
    for (const [x, y] of corners) {
      expect(x).toBeGreaterThan(0);
      expect(x).toBeLessThan(size.width);
      expect(y).toBeGreaterThan(10);
      expect(y).toBeLessThan(size.height - 10);
    }
  });

  it("keeps the section under the pointer where it is, and goes there and back", () => {
    const near = zoomed(whole, size, 7.3, [600, 120], whole);
    const before = sectionAt(whole, size, 600, 120);
    const after = sectionAt(near, size, 600, 120);
    expect(after[0]).toBeCloseTo(before[0], 12);
    expect(after[1]).toBeCloseTo(before[1], 12);
    expect(whole.step / near.step).toBeCloseTo(7.3, 10);
    const back = screenAt(near, size, ...before);
    expect(back[0]).toBeCloseTo(600, 8);
    expect(back[1]).toBeCloseTo(120, 8);
  });

  it("never loses the picture", () => {
    expect(zoomed(whole, size, 1e9, [1, 1], whole).step).toBeCloseTo(whole.step / 4000, 12);
    expect(zoomed(whole, size, 1e-9, [1, 1], whole).step).toBeCloseTo(whole.step * 2, 12);
    expect(panned(whole, 1e6, -1e6, bounds)).toMatchObject({ r: -0.03, z: -0.05 });
  });

  it("hands the raster a window of device pixels with the same corner", () => {
    const window = windowOf(whole, size, 2);
    expect(window).toMatchObject({ width: 1600, height: 1000, step: whole.step / 2 });
    expect([window.left, window.top]).toEqual(sectionAt(whole, size, 0, 0));
  });
});
