import { describe, expect, test } from "vitest";
import { type Draft, faultsOf, outline, refuses } from "./drafts.ts";

const parts =
  (...list: Draft[]) =>
  (d: Draft) => {
    d.parts = list;
  };

describe("a body by itself", () => {
  const stack = (of: Draft, gapMm: number) =>
    parts({ name: "stack", shape: "stack", count: 3, gapMm, of, material: { resistivityOhmM: 1e-6 } });
  const washer = { shape: "cylinder", diameterMm: 30, boreDiameterMm: 10, lengthMm: 4 };
  const wedge = {
    shape: "outline",
    pointsMm: [
      [0, 0],
      [9, 0],
      [0, 7],
    ],
  };
  refuses([
    [
      "bore as wide as the part",
      (d) => (d.parts[0].boreDiameterMm = 30),
      "/parts/0/boreDiameterMm",
      /bore of 30 mm/,
      /below 30/,
    ],
    [
      "bore of a washer",
      stack({ ...washer, boreDiameterMm: 31 }, 1),
      "/parts/0/of/boreDiameterMm",
      /31 mm/,
      /below 30/,
    ],
    [
      "outline behind the axis",
      parts(
        outline("x", [
          [0, 0],
          [9, 0],
          [-3, 7],
        ]),
      ),
      "/parts/0/pointsMm/2/0",
      /-3 mm: beyond the axis/,
    ],
    [
      "crossing outline",
      parts(
        outline("x", [
          [0, 0],
          [9, 9],
          [9, 0],
          [0, 9],
        ]),
      ),
      "/parts/0/pointsMm",
      /crosses itself/,
    ],
    [
      "two points",
      parts(
        outline("x", [
          [0, 0],
          [9, 9],
        ]),
      ),
      "/parts/0/pointsMm",
      /2 entries/,
      /at least 3/,
    ],
    [
      "crossing outline in a stack",
      stack(
        {
          ...wedge,
          pointsMm: [
            [0, 0],
            [9, 9],
            [9, 0],
            [0, 9],
          ],
        },
        1,
      ),
      "/parts/0/of/pointsMm",
      /crosses itself/,
    ],
    [
      "spheres without a gap",
      stack({ shape: "sphere", diameterMm: 9 }, 0),
      "/parts/0/gapMm",
      /spheres.*touch/,
      /at least/,
    ],
    ["outlines without a gap", stack(wedge, 0), "/parts/0/gapMm", /outlines.*touch/, /at least/],
    ["negative gap", stack(washer, -1), "/parts/0/gapMm", /-1 mm/, /at least 0 mm/],
    ["hair's breadth of a gap", stack(washer, 1e-4), "/parts/0/gapMm", /too fine/],
    [
      "stack of stacks",
      stack({ shape: "stack", count: 2, gapMm: 1, of: washer }, 1),
      "/parts/0/of/shape",
      /stack/,
      /cylinder, sphere, outline/,
    ],
    ["unknown shape", (d) => (d.parts[0].shape = "cube"), "/parts/0/shape", /cube/, /cylinder/],
    [
      "a film of an edge",
      parts(
        outline("x", [
          [0, 0],
          [9, 0],
          [9, 1e-4],
          [0, 9],
        ]),
      ),
      "/parts/0/pointsMm/1",
      /edge.*too fine/,
    ],
    [
      "off the axis by a hair",
      parts(
        outline("x", [
          [1e-4, 0],
          [9, 0],
          [9, 9],
          [0, 9],
        ]),
      ),
      "/parts/0/pointsMm/0",
      /off the axis/,
      /r = 0/,
    ],
    [
      "a slot by a hair",
      parts(
        outline("x", [
          [0, 0],
          [9, 0],
          [9, 9],
          [5.0001, 9],
          [5.0001, 2],
          [5, 2],
          [5, 9],
          [0, 9],
        ]),
      ),
      "/parts/0/pointsMm/4",
      /too fine/,
    ],
    [
      "a thin shell",
      (d) => (d.parts[0].boreDiameterMm = 29.9999),
      "/parts/0/boreDiameterMm",
      /wall.*too fine/,
    ],
    ["a thin bore", (d) => (d.parts[0].boreDiameterMm = 1e-4), "/parts/0/boreDiameterMm", /bore.*too fine/],
    ["a thin disc", (d) => (d.parts[0].lengthMm = 1e-4), "/parts/0/lengthMm", /length.*too fine/],
  ]);

  test("washers without a gap are accepted", () => {
    expect(faultsOf(stack(washer, 0))).toEqual([]);
  });

  test("more corners than can be solved are refused before any are placed", () => {
    const of = { shape: "cylinder", diameterMm: 10, lengthMm: 1e-1 };
    const many = Array.from({ length: 12 }, () => ({
      name: "s",
      shape: "stack",
      count: 500,
      gapMm: 0.1,
      of,
      material: {},
    }));
    const [fault, ...more] = faultsOf(parts(...many));
    expect(fault).toMatchObject({ pointer: "/parts", detail: expect.stringContaining("24000 corners") });
    expect(more).toEqual([]);
  });
});
