/** Short words for writing designs down: sections, windings, parts and guides of the battery, lengths in mm. */
import type * as z from "zod";
import type {
  ConductorSchema,
  DesignSchema,
  GuideSchema,
  PartSchema,
  WindingSchema,
} from "../../../meshes/design.ts";

type Conductor = z.input<typeof ConductorSchema>;
export type Winding = z.input<typeof WindingSchema>;
export type Part = z.input<typeof PartSchema>;
export type Guide = z.input<typeof GuideSchema>;
/** A design document as it is written, defaults left out. */
export type Written = z.input<typeof DesignSchema>;
export type Points = readonly (readonly [number, number])[];

/** One design of the battery, with the words it counts under beside those its numbers say (`tags.ts`). */
export interface Entry {
  readonly id: string;
  readonly tags: readonly string[];
  readonly design: Written;
}

const COPPER = { resistivityOhmM: 1.75e-8 };

// Sections

export const tube = (outsideDiameterMm: number, wallMm: number): Conductor => ({
  section: "roundTube",
  outsideDiameterMm,
  wallMm,
  material: COPPER,
});
export const bar = (outsideDiameterMm: number): Conductor => ({
  section: "roundBar",
  outsideDiameterMm,
  material: COPPER,
});
export const rectTube = (radialWidthMm: number, axialHeightMm: number, wallMm: number): Conductor => ({
  section: "rectTube",
  radialWidthMm,
  axialHeightMm,
  wallMm,
  material: COPPER,
});
export const rectBar = (radialWidthMm: number, axialHeightMm: number): Conductor => ({
  section: "rectBar",
  radialWidthMm,
  axialHeightMm,
  material: COPPER,
});

// Windings

type Pitch = number | number[];

export const helix = (boreDiameterMm: number, turns: number, pitchMm: Pitch, centreZMm = 0): Winding => ({
  form: "helix",
  boreDiameterMm,
  turns,
  pitchMm,
  centreZMm,
});
export const spiral = (innerDiameterMm: number, turns: number, pitchMm: Pitch, zMm = 0): Winding => ({
  form: "spiral",
  innerDiameterMm,
  turns,
  pitchMm,
  zMm,
});
/** Layers of `each` turns, `pitchMm` apart along z and `layerPitchMm` along r. */
export const layers = (
  boreDiameterMm: number,
  [each, count]: readonly [number, number],
  [pitchMm, layerPitchMm]: readonly [Pitch, number],
): Winding => ({ form: "layers", boreDiameterMm, turnsPerLayer: each, layers: count, pitchMm, layerPitchMm });
export const cone = (
  below: number,
  above: number,
  turns: number,
  pitchMm: Pitch,
  centreZMm = 0,
): Winding => ({
  form: "cone",
  boreDiameterMm: below,
  topBoreDiameterMm: above,
  turns,
  pitchMm,
  centreZMm,
});
export const rings = (centres: Points, sense?: readonly (1 | -1)[]): Winding => ({
  form: "rings",
  centresMm: centres.map(([r, z]) => [r, z]),
  ...(sense === undefined ? {} : { sense: [...sense] }),
});

// Materials

/** ρ in Ω·m and µr. */
export type Metal = readonly [resistivityOhmM: number, relativePermeability: number];

export const METALS = {
  aluminium: [2.8e-8, 1],
  brass: [6.5e-8, 1],
  hotSteel: [1.15e-6, 1],
  stainless: [7.2e-7, 1],
  graphite: [1e-5, 1],
} as const satisfies Record<string, Metal>;

/** Steel below its Curie point at this µr. */
export const steel = (relativePermeability: number): Metal => [2.2e-7, relativePermeability];

const metal = ([resistivityOhmM, relativePermeability]: Metal) => ({ resistivityOhmM, relativePermeability });

// Parts

interface Place {
  readonly bore?: number;
  readonly z?: number;
  readonly heated?: false;
  readonly name?: string;
}

const placed = (of: Metal, { heated, name }: Place) => ({
  material: metal(of),
  ...(heated === undefined ? {} : { heated }),
  ...(name === undefined ? {} : { name }),
});

export const cylinder = (diameterMm: number, lengthMm: number, of: Metal, place: Place = {}): Part => ({
  shape: "cylinder",
  diameterMm,
  lengthMm,
  boreDiameterMm: place.bore ?? 0,
  centreZMm: place.z ?? 0,
  ...placed(of, place),
});
export const sphere = (diameterMm: number, of: Metal, place: Place = {}): Part => ({
  shape: "sphere",
  diameterMm,
  centreZMm: place.z ?? 0,
  ...placed(of, place),
});
export const outline = (points: Points, of: Metal, place: Place = {}): Part => ({
  shape: "outline",
  pointsMm: points.map(([r, z]) => [r, z]),
  ...placed(of, place),
});

type Solid = Extract<Part, { shape: "stack" }>["of"];

export const stack = (count: number, gapMm: number, solid: Solid, of: Metal, place: Place = {}): Part => ({
  shape: "stack",
  count,
  gapMm,
  of: solid,
  ...placed(of, place),
});

// Guides

interface Core {
  readonly mur: number;
  /** Loss tangent. */
  readonly tan?: number;
  readonly name?: string;
}

const core = ({ mur, tan, name }: Core) => ({
  material: { relativePermeability: mur, ...(tan === undefined ? {} : { lossTangent: tan }) },
  ...(name === undefined ? {} : { name }),
});

export const guide = (points: Points, of: Core): Guide => ({
  shape: "outline",
  pointsMm: points.map(([r, z]) => [r, z]),
  ...core(of),
});
/** A plate or sleeve: bore and outside diameter, length, middle height. */
export const sleeve = (
  boreDiameterMm: number,
  diameterMm: number,
  [lengthMm, centreZMm]: readonly [number, number],
  of: Core,
): Guide => ({ shape: "cylinder", diameterMm, boreDiameterMm, lengthMm, centreZMm, ...core(of) });

// Outlines

/** A rectangle of r1 … r2 by z1 … z2. */
export const box = (r1: number, r2: number, z1: number, z2: number): Points => [
  [r1, z1],
  [r2, z1],
  [r2, z2],
  [r1, z2],
];

/** Points on an arc about (r, z), angles in degrees from the r axis towards z, both ends included; to a tenth of a micrometre. */
export const arc = (
  [r, z]: readonly [number, number],
  radius: number,
  [from, to]: readonly [number, number],
  steps: number,
): Points =>
  Array.from({ length: steps + 1 }, (_, k) => {
    const angle = ((from + ((to - from) * k) / steps) * Math.PI) / 180;
    const tidy = (x: number): number => Math.round(x * 1e4) / 1e4 + 0;
    return [Math.max(0, tidy(r + radius * Math.cos(angle))), tidy(z + radius * Math.sin(angle))] as const;
  });

// Drives

export const amps = (frequencyHz: number, currentA: number) => ({ frequencyHz, currentA });
export const watts = (frequencyHz: number, partPowerW: number) => ({ frequencyHz, partPowerW });
export const volts = (frequencyHz: number, coilVoltageV: number) => ({ frequencyHz, coilVoltageV });
