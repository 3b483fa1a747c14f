/** A checked design in its place: SI units, plain geometry, materials at their temperatures. */
import { type Circuit, MU0, materialAt } from "../solver/index.ts";
import type { Design, Guide, Part } from "./design.ts";
import type { Layout } from "./layout.ts";
import type { Material } from "./materials.ts";
import type { Body, Drive, Piece, Point, Scene, SceneMaterial, Section } from "./scene.ts";
import { type Figure, isCylinder } from "./shapes.ts";
import { fractionFromPercent, kelvinFromCelsius, metresFromMm as m } from "./units.ts";
import type { SectionMm, TurnMm } from "./windings.ts";

/** The scene of a completed, checked design; `layout` is its own. */
export function sceneOf(design: Design, layout: Layout): Scene {
  if (layout.copper === null) throw new Error("a scene needs its copper");
  const { section, turns } = layout.copper;
  const { conductor, leads, strands } = design.coil;
  const bodies = [...design.parts, ...design.guides];
  return {
    section: sectionOf(section),
    conductor: materialOf(conductor.material, conductor.temperatureC),
    turns: turns.map((t) => ({ r: m(t.r), z: m(t.z) })),
    circuit: circuitOf(turns, strands),
    advance: turns.map((t) => ({ axial: m(t.axialAdvance), radial: m(t.radialAdvance) })),
    leads: leads === undefined ? null : { length: m(leads.lengthMm), spacing: m(leads.spacingMm) },
    bodies: snapped(
      bodies.map((body, k) =>
        k < design.parts.length
          ? bodyOf(body, "part", k, layout.bodies[k]?.pieces ?? [])
          : bodyOf(body, "guide", k - design.parts.length, layout.bodies[k]?.pieces ?? []),
      ),
    ),
    frequency: design.drive.frequencyHz,
    drive: driveOf(design.drive),
    strayPoints: design.strayPointsMm.map(([r, z]): Point => [m(r), m(z)]),
    accuracy: fractionFromPercent(design.accuracyPercent),
  };
}

function sectionOf(s: SectionMm): Section {
  return s.kind === "round"
    ? { kind: "round", radius: m(s.radialMm) / 2, wall: m(s.wallMm) }
    : { kind: "rect", width: m(s.radialMm), height: m(s.axialMm), wall: m(s.wallMm) };
}

function circuitOf(turns: readonly TurnMm[], strands: readonly (readonly number[])[] | undefined): Circuit {
  const path = new Int32Array(turns.length);
  strands?.forEach((strand, s) => {
    for (const turn of strand) path[turn] = s;
  });
  return { turns: turns.length, path, sense: Int8Array.from(turns, (t) => t.sense) };
}

function bodyOf(body: Part | Guide, role: "part" | "guide", index: number, pieces: readonly Figure[]): Body {
  return {
    name: body.name,
    role,
    index,
    heated: "heated" in body && body.heated,
    pieces: pieces.map(pieceOf),
    material: materialOf(body.material, body.temperatureC),
    cylinder: isCylinder(body),
  };
}

function pieceOf(figure: Figure): Piece {
  return figure.kind === "disc"
    ? { kind: "sphere", centreZ: m(figure.z), radius: m(figure.radius) }
    : { kind: "polygon", points: figure.points.map(([r, z]): Point => [m(r), m(z)]) };
}

function driveOf(drive: Design["drive"]): Drive {
  if (drive.currentA !== undefined) return { kind: "current", ampere: drive.currentA };
  if (drive.partPowerW !== undefined) return { kind: "power", watt: drive.partPowerW };
  return { kind: "voltage", volt: drive.coilVoltageV ?? 0 };
}

/** The linear material; a curve enters by its foot's slope (where no permeability is given) and its end's polarisation. */
function materialOf(material: Material, celsius: number): SceneMaterial {
  if (typeof material === "string") {
    return materialAt(material, kelvinFromCelsius(celsius));
  }
  const { curve } = material;
  return {
    resistivity: material.resistivityOhmM,
    relativePermeability: material.relativePermeability ?? (curve === undefined ? 1 : footSlope(curve)),
    lossTangent: "lossTangent" in material ? material.lossTangent : 0,
    saturation: material.saturationT ?? (curve === undefined ? null : endPolarisation(curve)),
  };
}

type Curve = readonly (readonly [number, number])[];

/** Relative permeability of a curve's first piece. */
function footSlope(curve: Curve): number {
  const [h, b] = curve[1] ?? [1, MU0];
  return b / (MU0 * h);
}

/** B − µ0 H at a curve's end, T; null where the curve is no more magnetic than air. */
function endPolarisation(curve: Curve): number | null {
  const [h, b] = curve.at(-1) ?? [0, 0];
  const polarisation = b - MU0 * h;
  return polarisation > 0 ? polarisation : null;
}

/**
 * Makes coordinates of bodies that mean the same equal to the last bit: 0.1 + 0.2 and 0.3 are one face. Values within 1e-9 of the
 * bodies' size become the smallest of them.
 */
function snapped(bodies: readonly Body[]): Body[] {
  const points = bodies.flatMap((b) => b.pieces.flatMap((p) => (p.kind === "polygon" ? p.points : [])));
  const reach = points.reduce((most, [r, z]) => Math.max(most, r, Math.abs(z)), 0);
  const onR = snapper(
    points.map((p) => p[0]),
    1e-9 * reach,
  );
  const onZ = snapper(
    points.map((p) => p[1]),
    1e-9 * reach,
  );
  return bodies.map((body) => ({
    ...body,
    pieces: body.pieces.map((piece) =>
      piece.kind === "polygon"
        ? { ...piece, points: piece.points.map(([r, z]): Point => [onR(r), onZ(z)]) }
        : piece,
    ),
  }));
}

function snapper(values: readonly number[], tolerance: number): (x: number) => number {
  const to = new Map<number, number>();
  let first = -Infinity;
  for (const x of [...values].sort((a, b) => a - b)) {
    if (x - first > tolerance) first = x;
    to.set(x, first);
  }
  return (x) => to.get(x) ?? x;
}
