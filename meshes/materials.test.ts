import { describe, expect, test } from "vitest";
import { type Draft, faultsOf, refuses } from "./drafts.ts";

describe("materials", () => {
  const part = (material: unknown) => (d: Draft) => (d.parts[0].material = material);
  const guide =
    (material: unknown, more = {}) =>
    (d: Draft) => {
      d.guides = [{ name: "yoke", shape: "sphere", diameterMm: 5, centreZMm: 90, material, ...more }];
    };
  refuses([
    ["unknown id", part("mithril"), "/parts/0/material", /library has no material “mithril”/, /copper/],
    ["number", part(5), "/parts/0/material", /is 5/, /library id/],
    [
      "zero permeability",
      part({ relativePermeability: 0 }),
      "/parts/0/material/relativePermeability",
      /is 0/,
      /at least/,
    ],
    [
      "negative permeability",
      guide({ relativePermeability: -40 }),
      "/guides/0/material/relativePermeability",
      /-40/,
    ],
    [
      "absurd permeability",
      part({ relativePermeability: 1e9 }),
      "/parts/0/material/relativePermeability",
      /1000000/,
    ],
    [
      "zero resistivity",
      part({ resistivityOhmM: 0 }),
      "/parts/0/material/resistivityOhmM",
      /0 Ω·m/,
      /1e-9 Ω·m/,
    ],
    [
      "text in a material",
      part({ resistivityOhmM: "2e-7" }),
      "/parts/0/material/resistivityOhmM",
      /text “2e-7”/,
    ],
    ["loss tangent of a part", part({ lossTangent: 0.1 }), "/parts/0/material/lossTangent", /guides only/],
    ["negative loss tangent", guide({ lossTangent: -0.1 }), "/guides/0/material/lossTangent", /-0.1/],
    ["heated guide", guide({}, { heated: true }), "/guides/0/heated", /parts only/],
    [
      "saturation without magnetism",
      part({ saturationT: 2 }),
      "/parts/0/material/relativePermeability",
      /above 1/,
      /above 1/,
    ],
    [
      "saturation twice",
      part({
        relativePermeability: 600,
        saturationT: 2,
        curve: [
          [0, 0],
          [100, 1],
        ],
      }),
      "/parts/0/material/saturationT",
      /one of them/,
    ],
    [
      "curve off the origin",
      part({
        curve: [
          [1, 0.1],
          [100, 1],
        ],
      }),
      "/parts/0/material/curve/0",
      /\[0, 0\]/,
    ],
    [
      "falling curve",
      part({
        curve: [
          [0, 0],
          [100, 1],
          [200, 0.9],
        ],
      }),
      "/parts/0/material/curve/2",
      /rise/,
    ],
    [
      "curve back in H",
      part({
        curve: [
          [0, 0],
          [100, 1],
          [90, 1.1],
        ],
      }),
      "/parts/0/material/curve/2",
      /rise/,
    ],
    [
      "flatter than air",
      part({
        curve: [
          [0, 0],
          [100, 1],
          [1e5, 1.01],
        ],
      }),
      "/parts/0/material/curve/2",
      /air/,
    ],
    [
      "impossibly steep",
      part({
        curve: [
          [0, 0],
          [0.01, 1],
        ],
      }),
      "/parts/0/material/curve/1",
      /million/,
    ],
    [
      "curve as text",
      part({
        curve: [
          [0, 0],
          ["a", 1],
        ],
      }),
      "/parts/0/material/curve/1/0",
      /H of point 1/,
    ],
  ]);

  test("two faults of one material are two entries", () => {
    const faults = faultsOf(part({ resistivityOhmM: -1, relativePermeability: -1, lossTangent: 1 }));
    expect(faults.map((f) => f.pointer.split("/").at(-1)).sort()).toEqual([
      "lossTangent",
      "relativePermeability",
      "resistivityOhmM",
    ]);
  });
});
