import { describe, expect, test } from "vitest";
import * as z from "zod";
import { checkDesign } from "./check.ts";
import { DesignSchema } from "./design.ts";
import { faultsOf, faultsOfDocument, plainDesign, refuses, varied } from "./drafts.ts";

test("the plain design is accepted", () => {
  expect(faultsOfDocument(plainDesign())).toEqual([]);
});

describe("kinds of values", () => {
  refuses([
    [
      "unknown key",
      (d) => (d.coil.winding.pichMm = 3),
      "/coil/winding/pichMm",
      /did you mean pitchMm/,
      /boreDiameterMm/,
    ],
    ["unknown key at the top", (d) => (d["a/b~c"] = 3), "/a~1b~0c", /not a key known here/, /coil/],
    [
      "string for a number",
      (d) => (d.coil.winding.turns = "7"),
      "/coil/winding/turns",
      /text “7”/,
      /without quotes/,
    ],
    ["null for a number", (d) => (d.coil.conductor.wallMm = null), "/coil/conductor/wallMm", /null/, /mm/],
    ["list for a number", (d) => (d.drive.frequencyHz = [1]), "/drive/frequencyHz", /a list/, /Hz/],
    [
      "missing number",
      (d) => delete d.coil.winding.boreDiameterMm,
      "/coil/winding/boreDiameterMm",
      /missing/,
    ],
    ["missing coil", (d) => delete d.coil, "/coil", /missing/, /object/],
    ["text for the coil", (d) => (d.coil = "helix"), "/coil", /text “helix”/, /object/],
    ["no list of parts", (d) => (d.parts = {}), "/parts", /an object/, /list/],
    [
      "heated as a word",
      (d) => (d.parts[0].heated = "yes"),
      "/parts/0/heated",
      /text “yes”/,
      /true or false/,
    ],
    ["number for a name", (d) => (d.name = 3), "/name", /is 3/, /text in quotes/],
    ["another format", (d) => (d.format = "emberturn/2"), "/format", /emberturn\/2/, /^emberturn\/1$/],
    ["infinite", (d) => (d.drive.currentA = Infinity), "/drive/currentA", /finite/, /number of A/],
    ["not a number", (d) => (d.drive.frequencyHz = Number.NaN), "/drive/frequencyHz", /finite/],
  ]);

  test.each([null, 3, "coil", [plainDesign()]])("%j is no document", (value) => {
    expect(faultsOfDocument(value)).toMatchObject([{ pointer: "", accepted: "an object { … }" }]);
  });
});

describe("sizes", () => {
  refuses([
    [
      "fractional turns",
      (d) => (d.coil.winding.turns = 7.5),
      "/coil/winding/turns",
      /7\.5, not a whole/,
      /whole/,
    ],
    ["1e9 turns", (d) => (d.coil.winding.turns = 1e9), "/coil/winding/turns", /1000000000/, /at most 1000$/],
    ["1e300 turns", (d) => (d.coil.winding.turns = 1e300), "/coil/winding/turns", /1e\+300/, /at most 1000$/],
    ["no turns", (d) => (d.coil.winding.turns = 0), "/coil/winding/turns", /is 0/, /at least 1$/],
    ["negative bore", (d) => (d.coil.winding.boreDiameterMm = -1), "/coil/winding/boreDiameterMm", /-1 mm/],
    ["absurd bore", (d) => (d.coil.winding.boreDiameterMm = 1e9), "/coil/winding/boreDiameterMm", /20000 mm/],
    ["zero diameter", (d) => (d.parts[0].diameterMm = 0), "/parts/0/diameterMm", /0 mm/, /at least/],
    ["frequency 0", (d) => (d.drive.frequencyHz = 0), "/drive/frequencyHz", /0 Hz/, /at least 1 Hz/],
    [
      "frequency 1e12",
      (d) => (d.drive.frequencyHz = 1e12),
      "/drive/frequencyHz",
      /Hz/,
      /at most 10000000 Hz/,
    ],
    ["current 0", (d) => (d.drive.currentA = 0), "/drive/currentA", /0 A/],
    ["accuracy 0", (d) => (d.accuracyPercent = 0), "/accuracyPercent", /0 %/, /at least 0.01 %/],
    ["accuracy 50", (d) => (d.accuracyPercent = 50), "/accuracyPercent", /50 %/, /at most 10 %/],
    ["long name", (d) => (d.name = "x".repeat(201)), "/name", /too long/, /200/],
    [
      "too many parts",
      (d) => (d.parts = Array.from({ length: 101 }, (_, k) => ({ ...d.parts[0], centreZMm: 100 * k }))),
      "/parts",
      /101 entries/,
    ],
    [
      "stray point behind the axis",
      (d) => (d.strayPointsMm = [[-1, 0]]),
      "/strayPointsMm/0/0",
      /-1 mm.*axis/,
    ],
    [
      "stray point of three",
      (d) => (d.strayPointsMm = [[1, 0, 3]]),
      "/strayPointsMm/0",
      /holds 3/,
      /\[r, z\]/,
    ],
    [
      "stray point as text",
      (d) => (d.strayPointsMm = [["1", 0]]),
      "/strayPointsMm/0/0",
      /r of point 0/,
      /number/,
    ],
  ]);
});

test("a key that every object of JavaScript has is as unknown as any other", () => {
  for (const key of ["constructor", "toString", "valueOf", "hasOwnProperty"]) {
    const [fault] = faultsOf((d) => {
      d.coil.winding[key] = 1;
    });
    expect(fault?.pointer).toBe(`/coil/winding/${key}`);
    expect(fault?.detail).toBe(`${key} is not a key known here`);
  }
});

test("all faults are told at once, one entry each", () => {
  const faults = faultsOf((d) => {
    d.coil.conductor.wallMm = 5;
    d.coil.strands = [[0]];
    d.parts[0].material.relativePermeability = -1;
    d.drive = { frequencyHz: "fast" };
    d.extra = 1;
  });
  expect(faults.map((f) => f.pointer).sort()).toEqual([
    "/coil/conductor/wallMm",
    "/coil/strands",
    "/drive/frequencyHz",
    "/extra",
    "/parts/0/material/relativePermeability",
  ]);
});

test("an endless list of faults is cut short", () => {
  const faults = faultsOf((d) => {
    for (let i = 0; i < 5000; i++) d[`key ${i}`] = i;
  });
  expect(faults).toHaveLength(101);
  expect(faults.at(-1)?.detail).toBe("and 4900 more faults of the same document");
});

test("defaults are filled in", () => {
  const { design } = checkDesign(plainDesign());
  expect(design).toMatchObject({
    format: "emberturn/1",
    name: "unnamed design",
    coil: { conductor: { temperatureC: 20 }, winding: { centreZMm: 0 } },
    parts: [{ boreDiameterMm: 0, centreZMm: 0, temperatureC: 20, heated: true }],
    guides: [],
    strayPointsMm: [],
    accuracyPercent: 0.2,
  });
  const material = varied((d) => (d.parts[0].material = {}));
  expect(checkDesign(material).design.parts[0]?.material).toEqual({
    resistivityOhmM: null,
    relativePermeability: 1,
  });
});

// OpenAPI 3.1 speaks JSON Schema: the schema has to be sayable in it.
test("the schema can be written as JSON Schema", () => {
  const schema = z.toJSONSchema(DesignSchema, { io: "input" });
  expect(schema.required).toEqual(["coil", "drive"]);
  expect(schema.additionalProperties).toBe(false);
});
