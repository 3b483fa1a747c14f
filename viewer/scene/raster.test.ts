import { describe, expect, it } from "vitest";
import { ringVolume } from "../../api/format/heat-scale.ts";
import { checkDesign } from "../../meshes/check.ts";
import demo from "../../meshes/examples/demo.json";
import { predict } from "../../meshes/predict.ts";
import { cellAt } from "../heat.ts";
import { none, rasterCells, rasterColours, type Window } from "./raster.ts";

/** A fan of cells between two radii and two angles, corners shared: curved neighbours of every slant. */
function fan(rings: number, spokes: number, inner = 0.01, outer = 0.04): Float64Array {
  const point = (i: number, k: number): [number, number] => {
    const radius = inner + ((outer - inner) * i) / rings;
    const angle = -Math.PI / 2 + (Math.PI * k) / spokes;
    return [Math.max(0, radius * Math.cos(angle)), radius * Math.sin(angle)];
  };
  const cells: number[] = [];
  for (let i = 0; i < rings; i++) {
    for (let k = 0; k < spokes; k++) {
      cells.push(...point(i, k), ...point(i + 1, k), ...point(i + 1, k + 1), ...point(i, k + 1));
    }
  }
  return Float64Array.from(cells);
}

const window: Window = { left: -0.05, top: 0.05, step: 2.5e-4, width: 400, height: 400 };

/** Distance outside the cell's edges, in px: at most 0 inside a convex counter-clockwise cell. */
function outside(corners: Float64Array, cell: number, r: number, z: number, step: number): number {
  let most = -Infinity;
  for (let k = 0; k < 4; k++) {
    const [r0, z0] = [corners[8 * cell + 2 * k]!, corners[8 * cell + 2 * k + 1]!];
    const j = (k + 1) % 4;
    const [dr, dz] = [corners[8 * cell + 2 * j]! - r0, corners[8 * cell + 2 * j + 1]! - z0];
    most = Math.max(most, ((r - r0) * dz - (z - z0) * dr) / Math.hypot(dr, dz) / step);
  }
  return most;
}

describe("the cells under the pixels", () => {
  const corners = fan(30, 90);
  const ids = rasterCells(corners, window);
  const at = (i: number, j: number): [number, number] => [
    Math.abs(window.left + (i + 0.5) * window.step),
    window.top - (j + 0.5) * window.step,
  ];

  it("hold the pixels' centres", () => {
    let [seen, worst] = [0, 0];
    ids.forEach((cell, k) => {
      if (cell === none) return;
      const [r, z] = at(k % window.width, Math.floor(k / window.width));
      worst = Math.max(worst, outside(corners, cell, r, z, window.step));
      seen++;
    });
    expect(worst).toBeLessThan(2e-3);
    expect(seen).toBeGreaterThan(35_000);
  });

  it("leave no gap: every centre well inside the fan has a cell, every one well outside has none", () => {
    const wrong = ids.filter((cell, k) => {
      const [r, z] = at(k % window.width, Math.floor(k / window.width));
      const radius = Math.hypot(r, z);
      if (radius > 0.01001 && radius < 0.03997) return cell === none;
      return (radius < 0.00999 || radius > 0.04001) && cell !== none;
    });
    expect(wrong).toHaveLength(0);
  });

  it("mirror in the axis", () => {
    for (let j = 0; j < window.height; j++) {
      const row = Array.from(ids.subarray(j * window.width, (j + 1) * window.width));
      expect(row).toEqual([...row].reverse());
    }
  });

  it("leave no gap when the corners are rounded to 32 bits and looked at from near", () => {
    const near: Window = { left: 0.0251, top: 0.0102, step: 2e-7, width: 500, height: 500 };
    expect(rasterCells(Float32Array.from(corners), near).includes(none)).toBe(false);
  });

  it("fill the area of the fan: Σ pixels = Σ cells by the shoelace formula, within half a per cent", () => {
    const pixels = ids.reduce((sum, cell) => sum + (cell === none ? 0 : 1), 0) * window.step ** 2;
    let area = 0;
    for (let k = 0; k < corners.length; k += 8) {
      const c = corners.subarray(k, k + 8);
      area += ((c[4]! - c[0]!) * (c[7]! - c[3]!) - (c[6]! - c[2]!) * (c[5]! - c[1]!)) / 2;
    }
    expect(pixels / (2 * area)).toBeCloseTo(1, 2.3);
  });
});

describe("the demo's heat under the pixels", () => {
  const { heat, result } = predict(checkDesign(demo));

  it("adds up to the power of copper and parts (leads apart) within 3 %, and is found where it is asked for", () => {
    // 20 pixels a half skin depth: each step between cells is placed to within half a pixel.
    const size = { width: 2400, height: 6000 };
    const close: Window = { left: 0, top: 0.03, step: 1.4e-5, ...size };
    const ids = rasterCells(heat.corners, close);
    let power = 0;
    ids.forEach((cell, k) => {
      if (cell === none) return;
      const r = close.left + ((k % size.width) + 0.5) * close.step;
      power += 2 * Math.PI * r * heat.density[cell]! * close.step ** 2;
    });
    const leads = (result.leads?.resistanceOhm ?? 0) * result.power.currentA.value ** 2;
    expect(power / (result.power.totalW.value - leads)).toBeCloseTo(1, 1.5);
    const exact = heat.density.reduce(
      (sum, p, cell) => sum + 2 * Math.PI * ringVolume(heat.corners, cell) * p,
      0,
    );
    expect(Math.abs(power / exact - 1)).toBeLessThan(0.005);
    const [i, j] = [999, 2200];
    const [r, z] = [close.left + (i + 0.5) * close.step, close.top - (j + 0.5) * close.step];
    expect(cellAt(heat, r, z)).toBe(ids[j * size.width + i]);
    expect(cellAt(heat, 0.018, 0)).toBe(none);
  });

  it("is painted in the colour of the cell found there, and nowhere else", () => {
    const screen: Window = { left: -0.07, top: 0.045, step: 2e-4, width: 700, height: 450 };
    const ids = rasterCells(heat.corners, screen);
    const colours = Uint32Array.from(heat.density, (_, cell) => cell + 1);
    const pixels = new Uint32Array(screen.width * screen.height);
    rasterColours(heat.corners, screen, colours, pixels);
    expect(pixels).toEqual(Uint32Array.from(ids, (cell) => (cell === none ? 0 : cell + 1)));
  });
});
