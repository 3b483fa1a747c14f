import { describe, expect, it } from "vitest";
import type { HeatMap } from "../../meshes/heatmap.ts";
import { heatColour } from "../format/colour.ts";
import { powerPerLength } from "../format/heat-profile.ts";
import { marks, position, roundStep, scaleFor } from "../format/heat-scale.ts";
import { joinCells } from "./patches-of-colour.ts";
import { renderPicture } from "./picture.ts";

/** A square block of n × n cells, r from 0 to a, z from 0 to a, density as a function of the cell's middle. */
function block(n: number, a: number, density: (r: number, z: number) => number): HeatMap {
  const corners: number[] = [];
  const values: number[] = [];
  const h = a / n;
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const [r, z] = [i * h, k * h];
      corners.push(r, z, r + h, z, r + h, z + h, r, z + h);
      values.push(density(r + h / 2, z + h / 2));
    }
  }
  const square = [
    [0, 0],
    [a, 0],
    [a, a],
    [0, a],
  ] as const;
  return {
    corners: Float64Array.from(corners),
    density: Float64Array.from(values),
    outline: new Int32Array(values.length),
    outlines: [{ role: "part", name: "block", points: square }],
  };
}

const caption = { title: `A <pin> & "more"`, lines: ["one line"], skinDepth: 1e-3 };

describe("joined cells", () => {
  it("become one curve round two neighbours, without the shared edge or corners on straight lines", () => {
    const left = [
      [0, 0],
      [5, 0],
      [5, 5],
      [0, 5],
    ] as const;
    const right = [
      [5, 0],
      [9, 0],
      [9, 5],
      [5, 5],
    ] as const;
    expect(joinCells([left, right])).toBe("M0 0l9 0 0 5-9 0z");
  });

  it("keep a hole, and vanish when rounding left nothing", () => {
    const ring = [0, 1, 2, 3, 4, 5, 6, 7, 8]
      .filter((k) => k !== 4)
      .map((k) => [k % 3, Math.floor(k / 3)] as const)
      .map(
        ([x, y]) =>
          [
            [x, y],
            [x + 1, y],
            [x + 1, y + 1],
            [x, y + 1],
          ] as const,
      );
    expect(joinCells(ring).match(/z/g)).toHaveLength(2);
    expect(
      joinCells([
        [
          [1, 1],
          [1, 1],
          [1, 1],
          [1, 1],
        ],
      ]),
    ).toBe("");
  });
});

describe("the colour scale", () => {
  it("is logarithmic for a thin hot skin and linear for an even glow", () => {
    const skin = scaleFor(block(40, 0.02, (r) => 1e9 * Math.exp((r - 0.02) / 2e-4)))!;
    expect(skin.kind).toBe("log");
    expect(skin.high / skin.low).toBeCloseTo(1000, 6);
    const even = scaleFor(block(10, 0.02, () => 5e6))!;
    expect(even).toEqual({ kind: "linear", low: 0, high: 5e6 });
  });

  it("takes its top from 99.9 % of the volume, rings weighted by their radius", () => {
    // One cell of 1600 beside the axis is far less than a thousandth of the volume; one at the rim is more.
    const atAxis = scaleFor(block(40, 0.02, (r, z) => (r < 5e-4 && z < 5e-4 ? 1e12 : 1e6)))!;
    expect(atAxis.high).toBe(1e6);
    const atRim = scaleFor(block(40, 0.02, (r, z) => (r > 0.0195 && z < 5e-4 ? 1e12 : 1e6)))!;
    expect(atRim.high).toBe(1e12);
  });

  it("marks round values within its range", () => {
    expect(marks({ kind: "linear", low: 0, high: 5e6 })).toEqual([0, 1e6, 2e6, 3e6, 4e6, 5e6]);
    expect(marks({ kind: "log", low: 1.5e6, high: 1.5e9 })[0]).toBeCloseTo(2e6);
    expect(position({ kind: "log", low: 1e6, high: 1e9 }, 1e6)).toBeCloseTo(0);
    expect(position({ kind: "log", low: 1e6, high: 1e9 }, 1e3)).toBe(0);
    expect([roundStep(107, 5), roundStep(0.9, 3), roundStep(10, 5)]).toEqual([50, 0.5, 2]);
  });

  it("is absent where nothing is heated", () => {
    expect(scaleFor(block(2, 0.02, () => 0))).toBeNull();
  });
});

describe("the profile of the heat", () => {
  it("adds up to the parts' power, rings weighted by their radius, bins cut through cells", () => {
    // A cylinder of radius and height a, density z: ∫ z dV = π a⁴ / 2 in all, z π a² per height.
    const a = 0.03;
    const heat = block(64, a, (_, z) => z);
    const bins = powerPerLength(heat, { along: "z", from: -0.01, to: 0.05, count: 37 });
    const height = 0.06 / 37;
    expect(bins.reduce((sum, v) => sum + v * height, 0)).toBeCloseTo((Math.PI * a ** 4) / 2, 12);
    expect(bins[18]! / (Math.PI * a * a * (-0.01 + 18.5 * height))).toBeCloseTo(1, 2);
    expect(bins[0]).toBe(0);
    // The same cylinder along the radius: 2πr ∫ z dz = π a² r.
    const rings = powerPerLength(heat, { along: "r", from: 0, to: a, count: 15 });
    rings.forEach((value, k) => {
      expect(value / (Math.PI * a * a * ((k + 0.5) * (a / 15)))).toBeCloseTo(1, 1);
    });
    expect(rings.reduce((sum, v) => sum + (v * a) / 15, 0)).toBeCloseTo((Math.PI * a ** 4) / 2, 12);
  });

  it("leaves copper out", () => {
    const heat = block(4, 0.03, () => 1e6);
    const copper = { ...heat, outlines: [{ ...heat.outlines[0]!, role: "copper" as const }] };
    expect(Math.max(...powerPerLength(copper, { along: "z", from: 0, to: 0.03, count: 5 }))).toBe(0);
  });
});

describe("the heat picture", () => {
  const map = block(60, 0.03, (r) => 1e9 * Math.exp((r - 0.03) / 1e-3));

  it("is one closed SVG with escaped words, the unit, and the kind of scale stated", () => {
    const svg = renderPicture(map, caption);
    expect(svg).toMatch(/^<svg [^>]+>\n[\s\S]*<\/svg>\n$/);
    expect(svg).toContain("A &lt;pin&gt; &amp; &quot;more&quot;");
    expect(svg).toContain("power density, W/cm³");
    expect(svg).toContain("logarithmic");
    expect(svg).not.toContain("NaN");
  });

  it("breaks long words above the drawing into lines, and lowers the drawing by as much", () => {
    const heightOf = (svg: string): number => Number(/ height="(\d+)"/.exec(svg)![1]);
    const long = { ...caption, title: "anvil ".repeat(33), lines: ["x".repeat(300)] };
    const svg = renderPicture(map, long);
    const shown = [...svg.matchAll(/<text x="40"[^>]*>([^<]*)</g)].map((found) => found[1]!);
    expect(Math.max(...shown.map((line) => line.length))).toBeLessThanOrEqual(120);
    expect(shown.join("").match(/anvil/g)).toHaveLength(33);
    expect(shown.join("").match(/x/g)!.length).toBeGreaterThanOrEqual(300);
    expect(heightOf(svg)).toBeGreaterThan(
      heightOf(renderPicture(map, { ...caption, title: "anvil", lines: ["x"] })) + 90,
    );
  });

  it("stays small: 40 000 cells in under a megabyte", () => {
    const large = block(200, 0.03, (r, z) => 1e9 * Math.exp((r - 0.03) / 1e-3) * (1 + Math.sin(900 * z) / 2));
    expect(renderPicture(large, caption).length).toBeLessThan(1e6);
  });

  it("says so when nothing is heated, and when the skin is thinner than a line", () => {
    expect(
      renderPicture(
        block(2, 0.02, () => 0),
        caption,
      ),
    ).toContain("Nothing here takes heat.");
    expect(renderPicture(map, { ...caption, skinDepth: 2e-5 })).toContain("thinner than a line");
    expect(renderPicture(map, caption)).not.toContain("thinner than a line");
  });

  it("tells the heat over the height, of flat designs over the radius", () => {
    const { outlines } = map;
    const flat = {
      ...map,
      outlines: [
        {
          ...outlines[0]!,
          points: [
            [0, 0],
            [0.3, 0],
            [0.3, 0.03],
            [0, 0.03],
          ] as const,
        },
      ],
    };
    expect(renderPicture(map, caption)).toContain("heat per height");
    expect(renderPicture(flat, caption)).toContain("heat per radius");
  });

  it("leaves guides hatched, though they take a little heat", () => {
    const guide = { ...map, outlines: [{ ...map.outlines[0]!, role: "guide" as const }] };
    expect(renderPicture(guide, caption)).not.toContain(heatColour(0));
    expect(renderPicture(guide, caption)).toContain('fill="url(#guide)"');
  });

  it("draws to scale: a square is square, whatever its size", () => {
    for (const size of [1e-4, 0.03, 10]) {
      const svg = renderPicture(
        block(1, size, () => 1e6),
        caption,
      );
      const outline =
        /fill="none" stroke="#26221c"/.test(svg) &&
        /d="M0 0L(\d+) 0L(\d+) -(\d+)L0 -(\d+)z" fill="none"/.exec(svg);
      expect(outline && new Set(outline.slice(1)).size).toBe(1);
    }
  });
});
