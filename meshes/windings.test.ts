import { describe, expect, test } from "vitest";
import { WindingSchema } from "./design.ts";
import { type SectionMm, turnsOf } from "./windings.ts";

const tube: SectionMm = { kind: "round", radialMm: 8, axialMm: 8, wallMm: 1 };
const bar: SectionMm = { kind: "rect", radialMm: 6, axialMm: 10, wallMm: 0 };

function centres(winding: object, section = tube): number[][] {
  return turnsOf(WindingSchema.parse(winding), section).map((t) => [t.r, t.z]);
}

// Expected centres follow the formulas of the document's description, worked out by hand.
describe("turn centres", () => {
  test("helix: bottom to top about its middle, half a conductor outside the bore", () => {
    expect(centres({ form: "helix", boreDiameterMm: 50, turns: 3, pitchMm: 10.5, centreZMm: 4 })).toEqual([
      [29, -6.5],
      [29, 4],
      [29, 14.5],
    ]);
    expect(centres({ form: "helix", boreDiameterMm: 50, turns: 1, pitchMm: 9 }, bar)).toEqual([[28, 0]]);
  });

  test("helix of uneven pitch: about the middle of its height", () => {
    expect(centres({ form: "helix", boreDiameterMm: 50, turns: 4, pitchMm: [10, 12, 14] })).toEqual([
      [29, -18],
      [29, -8],
      [29, 4],
      [29, 18],
    ]);
  });

  test("spiral: inside out, also uneven", () => {
    expect(centres({ form: "spiral", innerDiameterMm: 30, turns: 3, pitchMm: 9, zMm: -5 })).toEqual([
      [19, -5],
      [28, -5],
      [37, -5],
    ]);
    expect(centres({ form: "spiral", innerDiameterMm: 30, turns: 3, pitchMm: [9, 11] }, bar)).toEqual([
      [18, 0],
      [27, 0],
      [38, 0],
    ]);
  });

  test("layers: inner first, each bottom to top", () => {
    const winding = {
      form: "layers",
      boreDiameterMm: 40,
      turnsPerLayer: 2,
      layers: 2,
      pitchMm: 10,
      layerPitchMm: 9,
    };
    expect(centres(winding)).toEqual([
      [24, -5],
      [24, 5],
      [33, -5],
      [33, 5],
    ]);
  });

  test("cone: bore linear from bottom to top, its side straight where the pitch is uneven", () => {
    const cone = { form: "cone", boreDiameterMm: 60, topBoreDiameterMm: 20, turns: 3 };
    expect(centres({ ...cone, pitchMm: 10 })).toEqual([
      [34, -10],
      [24, 0],
      [14, 10],
    ]);
    expect(centres({ ...cone, pitchMm: [5, 15] })).toEqual([
      [34, -10],
      [29, -5],
      [14, 10],
    ]);
  });

  test("rings: as listed, wound against the rest where told", () => {
    const rings = WindingSchema.parse({
      form: "rings",
      centresMm: [
        [30, 8],
        [20, -8],
      ],
      sense: [1, -1],
    });
    expect(turnsOf(rings, tube)).toEqual([
      { r: 30, z: 8, sense: 1, axialAdvance: 0, radialAdvance: 0 },
      { r: 20, z: -8, sense: -1, axialAdvance: 0, radialAdvance: 0 },
    ]);
  });
});

describe("advances, for the length of copper", () => {
  const advances = (winding: object) =>
    turnsOf(WindingSchema.parse(winding), tube).map((t) => [t.axialAdvance, t.radialAdvance]);

  test("each turn advances to the next, the last as the one before it", () => {
    expect(advances({ form: "helix", boreDiameterMm: 50, turns: 3, pitchMm: [10, 12] })).toEqual([
      [10, 0],
      [12, 0],
      [12, 0],
    ]);
    expect(advances({ form: "spiral", innerDiameterMm: 50, turns: 2, pitchMm: 9 })).toEqual([
      [0, 9],
      [0, 9],
    ]);
    const cone = { form: "cone", boreDiameterMm: 60, topBoreDiameterMm: 20, turns: 3, pitchMm: 10 };
    expect(advances(cone)).toEqual([
      [10, -10],
      [10, -10],
      [10, -10],
    ]);
  });

  test("a single turn advances by its pitch if it has one", () => {
    expect(advances({ form: "helix", boreDiameterMm: 50, turns: 1, pitchMm: 10 })).toEqual([[10, 0]]);
    expect(advances({ form: "helix", boreDiameterMm: 50, turns: 1 })).toEqual([[0, 0]]);
  });
});
