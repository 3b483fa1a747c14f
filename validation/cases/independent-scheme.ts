/** The project's scheme against a plain second-order one: other unknown, other cells, other open space, other solver. */
import { build } from "../../meshes/build.ts";
import { checkDesign } from "../../meshes/check.ts";
import type { Scene } from "../../meshes/scene.ts";
import { cutGrid } from "../../solver/index.ts";
import { type Check, type Constants, type Row, relativeRow } from "../check.ts";
import { resultOf, spoiltDesign } from "../document.ts";
import { type CoarseFigures, coarseFigures } from "../ninepoint/field.ts";
import reference from "../reference/open-cases.json";

const SOURCE = "the plain four-node scheme of this folder, extrapolated from two grids";
const NAMES = ["open-1", "open-2", "open-4"];
const COPPER = { resistivityOhmM: 1.75e-8 };

/** Small designs of kinds the open cases leave out; invented, few turns so that the slow scheme stays quick. */
const SMALL = [
  {
    name: "ball",
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: COPPER },
      winding: { form: "helix", boreDiameterMm: 52, turns: 2, pitchMm: 12 },
    },
    parts: [{ name: "ball", shape: "sphere", diameterMm: 40, material: { resistivityOhmM: 1.1e-6 } }],
    drive: { frequencyHz: 50_000, currentA: 100 },
  },
  {
    name: "bore",
    coil: {
      conductor: { section: "rectBar", radialWidthMm: 5, axialHeightMm: 6, material: COPPER },
      winding: { form: "helix", boreDiameterMm: 40, turns: 2, pitchMm: 8 },
    },
    parts: [
      {
        name: "ring",
        shape: "cylinder",
        diameterMm: 80,
        boreDiameterMm: 56,
        lengthMm: 20,
        material: { resistivityOhmM: 2.5e-7, relativePermeability: 20 },
      },
    ],
    drive: { frequencyHz: 5000, currentA: 100 },
  },
  {
    name: "washers",
    coil: {
      conductor: { section: "roundTube", outsideDiameterMm: 6, wallMm: 1, material: COPPER },
      winding: { form: "helix", boreDiameterMm: 40, turns: 2, pitchMm: 8 },
    },
    parts: [
      {
        name: "washers",
        shape: "stack",
        count: 3,
        gapMm: 0.5,
        of: { shape: "cylinder", diameterMm: 30, boreDiameterMm: 12, lengthMm: 4 },
        material: { resistivityOhmM: 7e-7 },
      },
    ],
    drive: { frequencyHz: 20_000, currentA: 100 },
  },
  {
    name: "guide",
    coil: {
      conductor: { section: "roundBar", outsideDiameterMm: 5, material: COPPER },
      winding: { form: "spiral", innerDiameterMm: 24, turns: 3, pitchMm: 7 },
    },
    parts: [
      {
        name: "disc",
        shape: "cylinder",
        diameterMm: 80,
        lengthMm: 5,
        centreZMm: -8,
        material: { resistivityOhmM: 7e-7 },
      },
    ],
    guides: [
      {
        name: "plate",
        shape: "cylinder",
        diameterMm: 72,
        boreDiameterMm: 16,
        lengthMm: 6,
        centreZMm: 8,
        material: { relativePermeability: 60 },
      },
    ],
    drive: { frequencyHz: 12_000, currentA: 100 },
  },
];

type Design = (typeof reference.cases)[number]["design"] | (typeof SMALL)[number];

export const independentScheme: Check = {
  id: "independent-scheme",
  title: "Cross-check by an independent second-order scheme",
  method:
    "Open cases 1, 2 and 4 and four small designs (ball, ring heated from its bore, washers 0.5 mm apart, spiral under a guide), loaded: bilinear cells in A over (r, z) on the same node lattices (nine-point stars), open space by inversion, envelope solution, grids of level 1 and 2 extrapolated by h² (Richardson); computed: predict at default accuracy.",
  why: "The extrapolation's rest (h⁴, some 1e-4) and the document's own error, which stays below 3e-4 in the open cases and 1e-4 in the small designs.",
  spoiled: { conductivity: 1.02, permeability: 1, length: 1 },
  pieces: [
    ...reference.cases
      .filter((c) => NAMES.includes(c.name))
      .map((c) => (constants: Constants) => rows(c.name, c.design, 5e-4, constants)),
    ...SMALL.map((d) => (constants: Constants) => rows(d.name, d, 2e-4, constants)),
  ],
};

function rows(name: string, design: Design, tolerance: number, constants: Constants): Row[] {
  const { scene } = checkDesign(design);
  const plain = extrapolated(scene);
  const { loaded, parts, power } = resultOf(spoiltDesign(design, constants));
  if (loaded === null || parts[0] === undefined) throw new RangeError(`${name} has no part`);
  const current = power.currentA.value;
  const row = (what: string, expected: number, got: { value: number; plusMinus: number }): Row =>
    relativeRow(`${name}: ${what}`, SOURCE, expected, { value: got.value, bar: got.plusMinus }, tolerance);
  return [
    row("R loaded", plain.resistance, loaded.resistanceOhm),
    row("L loaded", plain.inductance, loaded.inductanceH),
    row("part power", plain.part * current ** 2, parts[0].powerW),
  ];
}

/** Loaded R (Ω), L (H) and the first part's power at 1 A (W), by h² from levels 1 and 2. */
function extrapolated(scene: Scene): { resistance: number; inductance: number; part: number } {
  const built = build(scene);
  const materials = built.materials("loaded");
  const omega = 2 * Math.PI * scene.frequency;
  const at = (level: number): CoarseFigures =>
    coarseFigures(cutGrid(built.mesh, level), materials, omega, { circuit: scene.circuit });
  const [coarse, fine] = [at(1), at(2)];
  const limit = (read: (f: CoarseFigures) => number): number => (4 * read(fine) - read(coarse)) / 3;
  const region = built.regionOfBody(0);
  return {
    resistance: limit((f) => f.resistance),
    inductance: limit((f) => f.inductance),
    part: limit((f) => f.regionPower[region] ?? Number.NaN),
  };
}
