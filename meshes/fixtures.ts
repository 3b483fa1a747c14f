/** Scenes for tests: random ones by seed, and any scene scaled, moved or turned upside down. */
import type { Body, Piece, Point, Scene, Section, Turn } from "./scene.ts";

/** The same scene times `factor`, m → m, frequency divided by factor² (equal skin depth ratios); negative: also mirrored in z. */
export function scaleScene(scene: Scene, factor: number): Scene {
  const f = Math.abs(factor);
  const section: Section =
    scene.section.kind === "round"
      ? { ...scene.section, radius: scene.section.radius * f, wall: scene.section.wall * f }
      : {
          ...scene.section,
          width: scene.section.width * f,
          height: scene.section.height * f,
          wall: scene.section.wall * f,
        };
  return mapScene(
    { ...scene, section, frequency: scene.frequency / f ** 2 },
    f,
    (z) => factor * z,
    factor < 0,
  );
}

/** The same scene moved up by `distance`, m. */
export function shiftScene(scene: Scene, distance: number): Scene {
  return mapScene(scene, 1, (z) => z + distance, false);
}

function mapScene(scene: Scene, f: number, height: (z: number) => number, turned: boolean): Scene {
  const at = ([r, z]: Point): Point => [r * f, height(z)];
  const piece = (p: Piece): Piece => {
    if (p.kind === "sphere") return { ...p, centreZ: height(p.centreZ), radius: p.radius * f };
    const points = p.points.map(at);
    return { ...p, points: turned ? points.reverse() : points };
  };
  return {
    ...scene,
    turns: scene.turns.map((t) => ({ r: t.r * f, z: height(t.z) })),
    bodies: scene.bodies.map((b) => ({ ...b, pieces: b.pieces.map(piece) })),
    strayPoints: scene.strayPoints.map(at),
  };
}

/** Repeatable numbers in 0..1 (Numerical Recipes' quick generator; from memory). */
function generator(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state * 1664525 + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

interface Dice {
  readonly between: (a: number, b: number) => number;
  readonly log: (a: number, b: number) => number;
  readonly chance: (p: number) => boolean;
}

/**
 * A helix (sometimes with a second, staggered layer) round nothing, a cylinder, a sphere, an outline with undercuts and
 * sometimes a tip on the axis, or washers; all sizes, gaps down to 0.1 mm in 50, skin depths from tiny to huge.
 */
export function randomScene(seed: number): Scene {
  const next = generator(seed);
  const dice: Dice = {
    between: (a, b) => a + (b - a) * next(),
    log: (a, b) => Math.exp(Math.log(a) + (Math.log(b) - Math.log(a)) * next()),
    chance: (p) => next() < p,
  };
  const unit = dice.log(1e-5, 1e-2) * 0.2;
  const gap = dice.log(0.1, 8);
  const width = dice.between(3, 10);
  const section = randomSection(dice, width);
  const height = section.kind === "round" ? width : section.height;
  const count = Math.floor(dice.between(1, 10));
  const bore = dice.between(20, 80);
  const turns = randomTurns(dice, section, { count, gap, height, width, bore });
  const reach = count * (height + gap) + 5;
  const bodies = randomBodies(dice, bore / 2 - Math.min(gap, bore / 4), reach);
  const scene: Scene = {
    section,
    conductor: { resistivity: 1.75e-8, relativePermeability: 1, lossTangent: 0, saturation: null },
    turns,
    circuit: {
      turns: turns.length,
      path: new Int32Array(turns.length),
      sense: new Int8Array(turns.length).fill(1),
    },
    advance: turns.map(() => ({ axial: 0, radial: 0 })),
    leads: null,
    bodies,
    frequency: 1,
    drive: { kind: "current", ampere: 100 },
    strayPoints: [],
    accuracy: 0.002,
  };
  return { ...scaleScene(scene, unit), frequency: dice.log(50, 450e3) };
}

function randomSection(dice: Dice, width: number): Section {
  const hollow = dice.chance(0.6);
  const wall = hollow ? dice.between(0.05, 0.22) * width : 0;
  if (dice.chance(0.7)) return { kind: "round", radius: width / 2, wall };
  return { kind: "rect", width, height: width * dice.between(0.5, 2), wall };
}

function randomTurns(
  dice: Dice,
  section: Section,
  c: { count: number; gap: number; height: number; width: number; bore: number },
): Turn[] {
  const step = c.height + c.gap;
  const row = Array.from({ length: c.count }, (_, k) => ({
    r: (c.bore + c.width) / 2,
    z: (k - (c.count - 1) / 2) * step,
  }));
  if (section.kind !== "round" || c.count < 2 || !dice.chance(0.3)) return row;
  const out = Math.sqrt(Math.max(0, (c.width + c.gap) ** 2 - (step / 2) ** 2)) * 1.001;
  return [...row, ...row.slice(1).map((t) => ({ r: t.r + out, z: t.z - step / 2 }))];
}

function randomBodies(dice: Dice, radius: number, reach: number): Body[] {
  const kind = Math.floor(dice.between(0, 6));
  const height = dice.between(0.3, 2) * reach;
  const centre = dice.between(-height / 3, height / 3);
  const conducts = kind !== 4;
  const permeability = dice.chance(0.5) && conducts ? 1 : dice.log(2, 1000);
  const body = (pieces: readonly Piece[]): Body => ({
    name: "piece",
    role: "part",
    index: 0,
    heated: true,
    pieces,
    material: {
      resistivity: conducts ? dice.log(1e-8, 1e-5) : null,
      relativePermeability: permeability,
      lossTangent: 0,
      saturation: null,
    },
    cylinder: false,
  });
  if (kind === 0) return [];
  if (kind === 1)
    return [body([ring(dice.chance(0.5) ? 0 : radius * dice.between(0.1, 0.95), radius, height, centre)])];
  if (kind === 2) return [body([{ kind: "sphere", centreZ: centre, radius }])];
  if (kind === 3) {
    const gap = dice.log(0.1, 6);
    const tall = height / 4;
    return [body([-1, 0, 1].map((k) => ring(radius / 2, radius, tall, centre + k * (tall + gap))))];
  }
  return [body([randomOutline(dice, radius, height)])];
}

function ring(inner: number, outer: number, height: number, centre: number): Piece {
  const [low, high] = [centre - height / 2, centre + height / 2];
  return {
    kind: "polygon",
    points: [
      [inner, low],
      [outer, low],
      [outer, high],
      [inner, high],
    ],
  };
}

function randomOutline(dice: Dice, radius: number, height: number): Piece {
  const levels = Array.from(
    { length: Math.floor(dice.between(1, 9)) },
    () => dice.between(-0.45, 0.45) * height,
  );
  const wide = (): number => radius * dice.between(0.3, 1);
  const points: Point[] = [[0, -height / 2]];
  points.push([wide(), -height / 2]);
  for (const z of levels.sort((a, b) => a - b)) points.push([wide(), z]);
  if (!dice.chance(0.3)) points.push([wide(), height / 2]);
  points.push([0, height / 2]);
  return { kind: "polygon", points };
}
