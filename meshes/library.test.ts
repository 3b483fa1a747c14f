import { beforeAll, describe, expect, test } from "vitest";
import { materialAt } from "../solver/index.ts";
import { checkDesign } from "./check.ts";
import { type Draft, faultsOf, refuses, varied } from "./drafts.ts";
import { libraryChoices } from "./materials.ts";
import { predict } from "./predict.ts";
import type { Result } from "./result.ts";
import { kelvinFromCelsius } from "./units.ts";

const part =
  (material: unknown, temperatureC = 20) =>
  (d: Draft) => {
    d.parts[0].material = material;
    d.parts[0].temperatureC = temperatureC;
  };
const guide =
  (material: unknown, temperatureC = 20) =>
  (d: Draft) => {
    d.guides = [{ shape: "sphere", diameterMm: 5, centreZMm: 90, material, temperatureC }];
  };
const conductor =
  (material: unknown, temperatureC = 20) =>
  (d: Draft) => {
    Object.assign(d.coil.conductor, { material, temperatureC });
  };

describe("library ids", () => {
  test.each(["copper", "brass", "bronze", "aluminium", "silver", "stainless-steel"])(
    "%s winds a coil",
    (id) => {
      expect(faultsOf(conductor(id))).toEqual([]);
    },
  );

  test.each(["ferrite", "iron-powder", "laminated-iron"])("%s guides, and may be a part", (id) => {
    expect(faultsOf(guide(id))).toEqual([]);
    expect(faultsOf(part(id))).toEqual([]);
  });

  test.each([
    ["mild-steel", 1200],
    ["graphite", 2000],
    ["molten-aluminium", 700],
    ["molten-copper", 1100],
    ["molten-iron", 1600],
    ["silicon-carbide", 1400],
  ])("%s is a part at %d °C", (id, celsius) => {
    expect(faultsOf(part(id, celsius))).toEqual([]);
  });

  refuses([
    [
      "steel as a conductor",
      conductor("mild-steel"),
      "/coil/conductor/material",
      /nothing to wind a coil from/,
    ],
    ["graphite as a conductor", conductor("graphite"), "/coil/conductor/material", /solid/, /brass/],
    ["copper as a guide", guide("copper"), "/guides/0/material", /no material of a guide/, /ferrite/],
    ["nonsense as a guide", guide("mithril"), "/guides/0/material", /no material “mithril”/],
    [
      "cold melt",
      part("molten-aluminium"),
      "/parts/0/temperatureC",
      /661 to 1000 °C, not at 20/,
      /661 to 1000/,
    ],
    ["steel beyond its table", part("mild-steel", 1201), "/parts/0/temperatureC", /20 to 1200 °C/],
    ["steel below its table", part("carbon-steel", 19), "/parts/0/temperatureC", /20 to 1200 °C/],
    ["hot binder", guide("iron-powder", 250), "/guides/0/temperatureC", /20 to 200 °C/],
    ["hot brass", conductor("brass", 301), "/coil/conductor/temperatureC", /-20 to 300 °C/],
  ]);

  test("are offered by their names", () => {
    expect(libraryChoices("conductor")[0]).toEqual(["copper", "copper"]);
    expect(libraryChoices("part")).toContainEqual(["stainless-steel", "austenitic stainless steel"]);
    expect(libraryChoices("guide").map(([id]) => id)).toEqual(["ferrite", "iron-powder", "laminated-iron"]);
  });
});

/** A quick design: a steel ball in two turns of bar. */
const ball = (material: unknown, temperatureC: number): Draft => ({
  coil: {
    conductor: { section: "roundBar", outsideDiameterMm: 6, material: "copper" },
    winding: { form: "helix", boreDiameterMm: 50, turns: 2, pitchMm: 12 },
  },
  parts: [{ name: "ball", shape: "sphere", diameterMm: 20, material, temperatureC }],
  drive: { frequencyHz: 2000, currentA: 500 },
  accuracyPercent: 2,
});

const solved = (draft: Draft): Result => predict(checkDesign(draft)).result;
const figures = ({ empty, loaded, power, parts }: Result) => ({ empty, loaded, power, parts });

describe.each([20, 600, 900])("a part of mild steel at %d °C", (celsius) => {
  const state = materialAt("mild-steel", kelvinFromCelsius(celsius));
  let library: Result;
  beforeAll(() => {
    library = solved(ball("mild-steel", celsius));
  });

  test("is solved as the inline material with its numbers there", () => {
    const { resistivity, relativePermeability, saturation } = state;
    const inline = solved(
      ball(
        {
          resistivityOhmM: resistivity,
          relativePermeability,
          ...(saturation === null ? {} : { saturationT: saturation }),
        },
        20,
      ),
    );
    expect(figures(library)).toEqual(figures(inline));
    expect(library.cautions).toEqual(inline.cautions);
  });

  test("is told to saturate below the Curie point only, against its own Bs", () => {
    const told = library.cautions.filter((c) => c.startsWith("ball: "));
    if (state.saturation === null) expect(told).toEqual([]);
    else expect(told.join()).toContain(`Bs = ${Number(state.saturation.toPrecision(3))} T`);
  });
});

test("resistivity and permeability both move with the temperature", () => {
  const [cold, warm, hot] = [20, 600, 900].map((c) => materialAt("mild-steel", kelvinFromCelsius(c)));
  expect(warm!.resistivity).toBeGreaterThan(4 * cold!.resistivity!);
  expect(warm!.relativePermeability).toBeLessThan(0.9 * cold!.relativePermeability);
  expect(hot!.relativePermeability).toBe(1);
});

test("a guide of the library keeps its permeability and its losses", () => {
  const scene = checkDesign(varied(guide("iron-powder"))).scene;
  expect(scene.bodies.find((b) => b.role === "guide")!.material).toEqual(materialAt("iron-powder", 293.15));
  expect(materialAt("iron-powder", 293.15)).toMatchObject({ relativePermeability: 40, lossTangent: 0.01 });
});
