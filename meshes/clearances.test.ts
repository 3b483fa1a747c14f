import { describe, expect, test } from "vitest";
import { block, type Draft, faultsOf, faultsOfDocument, outline, refuses, varied } from "./drafts.ts";

const ball = (centreZMm: number, diameterMm = 20, name = "ball"): Draft => ({
  name,
  shape: "sphere",
  diameterMm,
  centreZMm,
  material: { resistivityOhmM: 1e-6 },
});
const parts =
  (...list: Draft[]) =>
  (d: Draft) => {
    d.parts = list;
  };

describe("copper and bodies", () => {
  refuses([
    // The billet of 51.6 mm reaches 0.8 mm into the copper on a bore of 50 mm.
    [
      "part over copper",
      (d) => (d.parts[0].diameterMm = 51.6),
      "/parts/0",
      /^pin overlaps turn 0 by 0\.8 mm/,
      /^diameterMm below 50$/,
    ],
    [
      "part at copper",
      (d) => (d.parts[0].diameterMm = 50),
      "/parts/0",
      /^pin touches turn 0/,
      /^diameterMm below 50$/,
    ],
    [
      "part all but at copper",
      (d) => (d.parts[0].diameterMm = 49.9999),
      "/parts/0",
      /only 0\.00005 mm to turn 0/,
      /at least 0.0009 mm clear/,
    ],
    [
      "ring over copper from outside",
      (d) => Object.assign(d.parts[0], { name: "ring", diameterMm: 100, boreDiameterMm: 65, lengthMm: 20 }),
      "/parts/0",
      /ring overlaps turn \d by 0\.5 mm/,
      /boreDiameterMm above 66/,
    ],
    [
      "sphere over copper",
      parts(ball(0, 52)),
      "/parts/0",
      /ball overlaps turn 3 by 1 mm/,
      /diameterMm below 50/,
    ],
    ["outline over copper", parts(block("bar", 0, 28, 0, 5)), "/parts/0", /bar overlaps turn 3 by 3 mm/],
    [
      "copper in a solid",
      parts(block("bar", 0, 60, -60, 60)),
      "/parts/0",
      /bar overlaps turn \d.*6 more turns/,
    ],
    [
      "guide over copper",
      (d) => (d.guides = [block("yoke", 32.5, 40, -5, 5)]),
      "/guides/0",
      /yoke overlaps turn 3 by 0\.5 mm/,
    ],
    [
      "stack over copper",
      parts({
        name: "washers",
        shape: "stack",
        count: 3,
        gapMm: 1,
        of: { shape: "cylinder", diameterMm: 52, lengthMm: 5 },
        material: {},
      }),
      "/parts/0",
      /washers overlaps turn/,
      /of\/diameterMm below 50/,
    ],
    [
      "disc under a flat coil",
      (d) => {
        d.coil.winding = { form: "spiral", innerDiameterMm: 30, turns: 4, pitchMm: 9 };
        d.parts = [{ ...d.parts[0], diameterMm: 90, lengthMm: 10, centreZMm: -8.5 }];
      },
      "/parts/0",
      /pin overlaps turn 0 by 0\.5 mm/,
      /centreZMm below -9/,
    ],
  ]);

  test("the accepted measure is rounded to the accepted side", () => {
    const [fault] = faultsOf((d) => {
      d.coil.winding.boreDiameterMm = 33.33337;
      d.parts[0].diameterMm = 34;
    });
    expect(fault?.accepted).toBe("diameterMm below 33.3333");
  });

  test("the accepted measure is accepted", () => {
    expect(faultsOf((d) => (d.parts[0].diameterMm = 49.99))).toEqual([]);
    expect(faultsOf(parts(ball(0, 49.99)))).toEqual([]);
  });

  test("a default or repeated name is told by its place", () => {
    const first = { ...block("pin", 0, 5, -5, 5) };
    const faults = faultsOf(parts(first, block("pin", 4, 6, -5, 5), { ...block("part", 3, 5.5, -4, 4) }));
    expect(faults.map((f) => f.detail)).toEqual([
      "pin (part 1) overlaps pin (part 0) by 1 mm",
      "part 2 overlaps pin (part 0) by 2 mm",
      "part 2 overlaps pin (part 1) by 1.5 mm",
    ]);
  });
});

describe("bodies among each other", () => {
  const pin = {
    name: "pin",
    shape: "cylinder",
    diameterMm: 30,
    lengthMm: 90,
    material: { resistivityOhmM: 1e-6 },
  };
  const disc = (centreZMm: number) => ({ ...pin, name: "disc", lengthMm: 10, centreZMm });
  refuses([
    [
      "part over part",
      parts(pin, disc(49)),
      "/parts/1",
      /^disc overlaps pin by 1 mm$/,
      /centreZMm at least 50/,
    ],
    ["the same twice", parts(pin, { ...pin, name: "again" }), "/parts/1", /again overlaps pin by 15 mm/],
    [
      "one inside the other",
      parts(pin, block("core", 0, 5, -5, 5)),
      "/parts/1",
      /core overlaps pin by 15 mm|core overlaps pin/,
    ],
    [
      "guide over part",
      (d) => (d.guides = [block("cap", 0, 9, 44, 50)]),
      "/guides/0",
      /cap overlaps pin by 1 mm/,
    ],
    [
      "guide over guide",
      (d) => (d.guides = [block("a", 60, 70, 0, 9), block("b", 69, 80, 5, 14)]),
      "/guides/1",
      /b overlaps a by 1 mm/,
    ],
    [
      "sphere on a face",
      parts(pin, ball(55)),
      "/parts/1",
      /ball touches pin in a single point/,
      /gap of at least/,
    ],
    [
      "sphere on a sphere",
      parts(ball(0), ball(20, 20, "second")),
      "/parts/1",
      /second touches ball in a single point/,
    ],
    [
      "sphere in a bore",
      parts(ball(0), { ...pin, name: "tube", boreDiameterMm: 20 }),
      "/parts/1",
      /tube touches ball/,
    ],
    [
      "sphere in a face",
      parts(pin, ball(54)),
      "/parts/1",
      /ball overlaps pin by 1 mm/,
      /centreZMm at least 55/,
    ],
    [
      "a hair's breadth",
      parts(pin, disc(50.0005)),
      "/parts/1",
      /between disc and pin 0.0005 mm are left/,
      /touch exactly/,
    ],
    [
      "edges a hair's breadth out of line",
      parts(pin, { ...disc(50), diameterMm: 30.0004 }),
      "/parts/1",
      /0.0002 mm are left/,
    ],
  ]);

  test.each<[string, Draft[]]>([
    ["faces", [pin, disc(50)]],
    ["a part of a face", [pin, { ...disc(50), diameterMm: 20 }]],
    [
      "rod in its bore",
      [
        { ...pin, diameterMm: 20 },
        { ...pin, name: "sleeve", boreDiameterMm: 20 },
      ],
    ],
    ["corner at corner", [block("a", 0, 10, 0, 5), block("b", 10, 15, 5, 9)]],
    [
      "slanted faces",
      [
        outline("a", [
          [0, 0],
          [9, 0],
          [0, 7],
        ]),
        outline("b", [
          [9, 0],
          [9, 7],
          [0, 7],
        ]),
      ],
    ],
    ["faces equal but for rounding", [block("a", 0, 10, 0, 0.1 + 0.2), block("b", 0, 10, 0.3, 5)]],
  ])("may touch: %s", (_name, list) => {
    expect(faultsOf(parts(...list))).toEqual([]);
  });
});

test("geometry is told besides faults of the schema elsewhere", () => {
  const faults = faultsOf((d) => {
    d.drive.frequencyHz = -1;
    d.parts[0].diameterMm = 51;
    d.parts.push({ name: "broken", shape: "cube" });
  });
  expect(faults.map((f) => f.pointer)).toEqual(["/parts/1/shape", "/drive/frequencyHz", "/parts/0"]);
});

test("every overlap is an entry of its own", () => {
  const faults = faultsOfDocument(
    varied((d) => {
      d.coil.winding.pitchMm = 8;
      d.parts = [block("a", 0, 26, -5, 5), block("b", 0, 10, 4, 9)];
      d.guides = [block("c", 32, 40, -5, 5)];
    }),
  );
  expect(faults.map((f) => f.pointer)).toEqual([
    "/coil/winding/pitchMm",
    "/parts/0",
    "/parts/1",
    "/guides/0",
  ]);
});

test("hostile outlines are answered quickly", () => {
  const comb = (shift: number) =>
    outline("comb", [
      [0, shift - 1],
      [40, shift - 1],
      ...Array.from({ length: 1900 }, (_, i): [number, number] => [40 - i / 50, shift + (i % 2) * 5]),
    ]);
  const started = performance.now();
  expect(faultsOf(parts(...[0, 1, 2, 3, 4].map(comb))).length).toBeGreaterThan(4);
  expect(performance.now() - started).toBeLessThan(20_000);
});
