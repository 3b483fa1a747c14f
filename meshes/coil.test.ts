/** What the schema refuses of conductors, windings, strands and drives. */
import { describe, expect, test } from "vitest";
import { type Draft, faultsOf, refuses } from "./drafts.ts";

const round = { section: "roundTube", outsideDiameterMm: 8, wallMm: 1 };

describe("conductor", () => {
  refuses([
    [
      "unknown section",
      (d) => (d.coil.conductor.section = "ovalTube"),
      "/coil/conductor/section",
      /ovalTube/,
      /rectBar/,
    ],
    ["no section", (d) => delete d.coil.conductor.section, "/coil/conductor/section", /missing/, /roundTube/],
    [
      "thick wall",
      (d) => (d.coil.conductor.wallMm = 4.5),
      "/coil/conductor/wallMm",
      /half the section, 4 mm/,
      /below 4/,
    ],
    ["no bore left", (d) => (d.coil.conductor.wallMm = 4), "/coil/conductor/wallMm", /no bore/, /roundBar/],
    [
      "thick wall of a rectangle",
      (d) =>
        (d.coil.conductor = {
          section: "rectTube",
          radialWidthMm: 6,
          axialHeightMm: 9,
          wallMm: 3.2,
          material: "copper",
        }),
      "/coil/conductor/wallMm",
      /half the section, 3 mm/,
      /rectBar/,
    ],
    [
      "wall of a bar",
      (d) => (d.coil.conductor = { ...round, section: "roundBar", material: "copper" }),
      "/coil/conductor/wallMm",
      /solid/,
    ],
    [
      "temperature",
      (d) => (d.coil.conductor.temperatureC = 400),
      "/coil/conductor/temperatureC",
      /400 °C/,
      /-50 to 250/,
    ],
    [
      "below zero",
      (d) => (d.coil.conductor.temperatureC = -300),
      "/coil/conductor/temperatureC",
      /-300 °C/,
      /-273.15/,
    ],
    ["no material", (d) => delete d.coil.conductor.material, "/coil/conductor/material", /missing/, /copper/],
    [
      "insulating material",
      (d) => (d.coil.conductor.material = { relativePermeability: 1 }),
      "/coil/conductor/material/resistivityOhmM",
      /missing/,
      /Ω·m/,
    ],
    [
      "leads that touch",
      (d) => (d.coil.leads = { lengthMm: 100, spacingMm: 8 }),
      "/coil/leads/spacingMm",
      /8 mm/,
      /at least 8\.02/,
    ],
    [
      "leads too near to resolve the gap",
      (d) => (d.coil.leads = { lengthMm: 100, spacingMm: 8.001 }),
      "/coil/leads/spacingMm",
      /too fine/,
      /at least 8\.02/,
    ],
    [
      "rectangular leads that touch along their axial height, though not along their radial width",
      (d) => {
        d.coil.conductor = { ...d.coil.conductor, section: "rectTube", radialWidthMm: 6, axialHeightMm: 10 };
        delete d.coil.conductor.outsideDiameterMm;
        d.coil.leads = { lengthMm: 100, spacingMm: 9 };
      },
      "/coil/leads/spacingMm",
      /touch: the conductor is 10 mm high/,
      /at least 10\.0/,
    ],
  ]);

  test("an inline material is taken as given at any temperature", () => {
    const change = (d: Draft) =>
      Object.assign(d.coil.conductor, { material: { resistivityOhmM: 3e-8 }, temperatureC: 700 });
    expect(faultsOf(change)).toEqual([]);
  });
});

describe("windings", () => {
  const winding = (w: Draft) => (d: Draft) => {
    d.coil.winding = w;
    d.parts = [];
  };
  refuses([
    [
      "unknown form",
      (d) => (d.coil.winding.form = "helixx"),
      "/coil/winding/form",
      /did you mean helix\?/,
      /spiral/,
    ],
    ["no form", (d) => delete d.coil.winding.form, "/coil/winding/form", /missing/, /helix/],
    ["no pitch", (d) => delete d.coil.winding.pitchMm, "/coil/winding/pitchMm", /missing/, /mm/],
    [
      "pitch as text",
      (d) => (d.coil.winding.pitchMm = "wide"),
      "/coil/winding/pitchMm",
      /text “wide”/,
      /list/,
    ],
    [
      "short list",
      (d) => (d.coil.winding.pitchMm = [10, 11]),
      "/coil/winding/pitchMm",
      /2 pitches.*6 steps/,
      /6 numbers/,
    ],
    [
      "bad entry of a list",
      (d) => (d.coil.winding.pitchMm = [10, 11, -9, 10, 10, 10]),
      "/coil/winding/pitchMm/2",
      /entry 2 is -9 mm/,
    ],
    [
      "too many in layers",
      winding({
        form: "layers",
        boreDiameterMm: 50,
        turnsPerLayer: 100,
        layers: 20,
        pitchMm: 9,
        layerPitchMm: 9,
      }),
      "/coil/winding/layers",
      /2000 turns/,
      /at most 10$/,
    ],
    [
      "one turn of two bores",
      winding({ form: "cone", boreDiameterMm: 50, topBoreDiameterMm: 30, turns: 1 }),
      "/coil/winding/topBoreDiameterMm",
      /single turn/,
    ],
    ["no rings", winding({ form: "rings", centresMm: [] }), "/coil/winding/centresMm", /0 entries/],
    [
      "short sense",
      winding({
        form: "rings",
        centresMm: [
          [30, 0],
          [30, 20],
        ],
        sense: [1],
      }),
      "/coil/winding/sense",
      /1 entries for 2/,
    ],
    [
      "odd sense",
      winding({ form: "rings", centresMm: [[30, 0]], sense: [2] }),
      "/coil/winding/sense/0",
      /is 2/,
      /1, -1/,
    ],
    [
      "ring behind the axis",
      winding({ form: "rings", centresMm: [[-30, 0]] }),
      "/coil/winding/centresMm/0/0",
      /beyond the axis/,
    ],
  ]);

  test("a single turn needs no pitch", () => {
    expect(faultsOf(winding({ form: "helix", boreDiameterMm: 50, turns: 1 }))).toEqual([]);
    expect(faultsOf(winding({ form: "layers", boreDiameterMm: 50, turnsPerLayer: 1, layers: 1 }))).toEqual(
      [],
    );
    expect(faultsOf(winding({ form: "cone", boreDiameterMm: 50, topBoreDiameterMm: 50, turns: 1 }))).toEqual(
      [],
    );
    expect(faultsOf(winding({ form: "spiral", innerDiameterMm: 50, turns: 1, pitchMm: [] }))).toEqual([]);
  });
});

describe("strands", () => {
  const strands = (s: unknown) => (d: Draft) => (d.coil.strands = s);
  refuses([
    [
      "missing turns",
      strands([
        [0, 2, 4],
        [1, 3],
      ]),
      "/coil/strands",
      /turns 5, 6 \(counted from 0\) are in no strand/,
    ],
    [
      "a missing turn",
      strands([
        [0, 2, 4, 6],
        [1, 3],
      ]),
      "/coil/strands",
      /turn 5 \(counted from 0\) is in no strand/,
    ],
    [
      "a repeated turn",
      strands([
        [0, 2, 4, 6],
        [1, 3, 5, 4],
      ]),
      "/coil/strands/1/3",
      /turn 4 is in strand 0/,
    ],
    [
      "no such turn",
      strands([
        [0, 2, 4, 6],
        [1, 3, 5, 7],
      ]),
      "/coil/strands/1/3",
      /no turn 7/,
      /0 to 6/,
    ],
    [
      "strands of a coil beyond all bounds",
      (d) => Object.assign(d.coil, { strands: [[0]], winding: { ...d.coil.winding, turns: 1e9 } }),
      "/coil/winding/turns",
      /at most 1000/,
    ],
    ["an empty strand", strands([[0, 1, 2, 3, 4, 5, 6], []]), "/coil/strands/1", /0 entries/],
    [
      "a fraction of a turn",
      strands([[0, 1, 2, 3, 4, 5.5, 6]]),
      "/coil/strands/0/5",
      /entry 0, 5 is 5\.5, not a whole/,
    ],
  ]);
});

describe("drive", () => {
  const drive = (more: object) => (d: Draft) => (d.drive = { frequencyHz: 1e4, ...more });
  refuses([
    ["none", drive({}), "/drive", /how strong/, /exactly one of currentA, partPowerW, coilVoltageV/],
    ["two", drive({ currentA: 4, coilVoltageV: 3 }), "/drive", /twice: by currentA and coilVoltageV/],
    ["three", drive({ currentA: 4, coilVoltageV: 3, partPowerW: 2 }), "/drive", /three times/],
    [
      "power without a heated part",
      (d) => {
        drive({ partPowerW: 1000 })(d);
        d.parts[0].heated = false;
      },
      "/drive/partPowerW",
      /no such part conducts/,
    ],
    [
      "power without a conducting part",
      (d) => {
        drive({ partPowerW: 1000 })(d);
        d.parts[0].material = { relativePermeability: 50 };
      },
      "/drive/partPowerW",
      /no such part conducts/,
    ],
  ]);

  test.each(["currentA", "partPowerW", "coilVoltageV"])("%s alone will do", (key) => {
    expect(faultsOf(drive({ [key]: 100 }))).toEqual([]);
  });
});
