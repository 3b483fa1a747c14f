import { describe, expect, test } from "vitest";
import { type Draft, faultsOf, refuses } from "./drafts.ts";

const bare = (winding: Draft) => (d: Draft) => {
  d.coil.winding = winding;
  d.parts = [];
};
describe("a coil by itself", () => {
  const rect = { section: "rectBar", radialWidthMm: 6, axialHeightMm: 10, material: "copper" };
  const cone = { form: "cone", boreDiameterMm: 40, topBoreDiameterMm: 80, turns: 5 };
  const layers = {
    form: "layers",
    boreDiameterMm: 40,
    turnsPerLayer: 4,
    layers: 2,
    pitchMm: 9,
    layerPitchMm: 9,
  };
  refuses([
    [
      "helix, touching",
      (d) => (d.coil.winding.pitchMm = 8),
      "/coil/winding/pitchMm",
      /8 mm.*turns touch/,
      /^above 8$/,
    ],
    [
      "helix, overlapping",
      (d) => (d.coil.winding.pitchMm = 7),
      "/coil/winding/pitchMm",
      /overlap by 1 mm/,
      /above 8/,
    ],
    [
      "helix, hair's breadth",
      (d) => (d.coil.winding.pitchMm = 8.00001),
      "/coil/winding/pitchMm",
      /too fine/,
      /^at least 8\.001$/,
    ],
    [
      "helix of rectangles, by their height",
      (d) => Object.assign(d.coil, { conductor: rect, winding: { ...d.coil.winding, pitchMm: 9 } }),
      "/coil/winding/pitchMm",
      /10 mm in axial direction/,
      /above 10/,
    ],
    [
      "one entry of an uneven pitch",
      (d) => (d.coil.winding.pitchMm = [9, 9, 9, 8, 9, 9]),
      "/coil/winding/pitchMm/3",
      /pitch of 8 mm/,
      /above 8/,
    ],
    [
      "spiral",
      bare({ form: "spiral", innerDiameterMm: 30, turns: 4, pitchMm: 6 }),
      "/coil/winding/pitchMm",
      /8 mm in radial direction/,
      /above 8/,
    ],
    ["layers, axially", bare({ ...layers, pitchMm: 8 }), "/coil/winding/pitchMm", /axial/, /above 8/],
    [
      "layers, radially",
      bare({ ...layers, layerPitchMm: 8 }),
      "/coil/winding/layerPitchMm",
      /layers touch/,
      /above 8/,
    ],
    // Turns 5 mm apart in radius touch below √(8² − 5²) = 6.245 mm of pitch.
    ["cone", bare({ ...cone, pitchMm: 6 }), "/coil/winding/pitchMm", /turns 0 and 1/, /above 6\.245/],
    [
      "ring on ring",
      bare({
        form: "rings",
        centresMm: [
          [30, 0],
          [30, 20],
          [33, 5],
        ],
      }),
      "/coil/winding/centresMm/2",
      /ring 2 overlaps ring 0 by 2.169 mm/,
    ],
    [
      "ring at ring",
      bare({
        form: "rings",
        centresMm: [
          [30, 0],
          [30, 8],
        ],
      }),
      "/coil/winding/centresMm/1",
      /touches ring 0/,
    ],
    [
      "ring across the axis",
      bare({
        form: "rings",
        centresMm: [
          [3, 0],
          [30, 8],
        ],
      }),
      "/coil/winding/centresMm/0",
      /1 mm across the axis/,
      /r above 4/,
    ],
    [
      "ring at the axis",
      bare({
        form: "rings",
        centresMm: [
          [4, 0],
          [30, 8],
        ],
      }),
      "/coil/winding/centresMm/0",
      /to the axis/,
    ],
    [
      "vast pitch",
      bare({ form: "helix", boreDiameterMm: 50, turns: 1000, pitchMm: 100 }),
      "/coil/winding",
      /49950|49954|4995e?/,
    ],
  ]);

  test.each<[string, (d: Draft) => void]>([
    ["a cone of pitch below the section, its turns clear", bare({ ...cone, pitchMm: 6.3 })],
    [
      "a cone of rectangles side by side",
      (d) => {
        bare({ ...cone, topBoreDiameterMm: 100, pitchMm: 1 })(d);
        d.coil.conductor = rect;
      },
    ],
    [
      "nested rings with overlapping boxes",
      bare({
        form: "rings",
        centresMm: [
          [30, 0],
          [30, 9],
          [37, 4.5],
        ],
      }),
    ],
    [
      "two equal layers one sense against the other",
      bare({
        form: "rings",
        centresMm: [
          [30, 0],
          [30, 9],
        ],
        sense: [1, -1],
      }),
    ],
    [
      "a tenth of a millimetre across",
      (d) => {
        d.coil.conductor = {
          section: "roundTube",
          outsideDiameterMm: 0.008,
          wallMm: 0.001,
          material: "copper",
        };
        bare({ form: "helix", boreDiameterMm: 0.08, turns: 5, pitchMm: 0.01 })(d);
      },
    ],
    [
      "ten metres",
      (d) => {
        d.coil.conductor = { section: "roundTube", outsideDiameterMm: 80, wallMm: 8, material: "copper" };
        bare({ form: "helix", boreDiameterMm: 10_000, turns: 100, pitchMm: 100 })(d);
      },
    ],
  ])("%s is accepted", (_name, change) => {
    expect(faultsOf(change)).toEqual([]);
  });
});

test("the pitch offered where a gap is too fine is accepted", () => {
  const pitch = (mm: number) => faultsOf((d) => (d.coil.winding.pitchMm = mm));
  const offered = Number(/[\d.]+$/.exec(pitch(8.00001)[0]?.accepted ?? "")?.[0]);
  expect(offered).toBeGreaterThan(8);
  expect(pitch(offered)).toEqual([]);
});
