/**
 * What one grid says of a scene, per ampere through the coil: both states solved, the numbers that will carry bars by name,
 * and the parts they are sums of.
 */
import {
  type CoilSolution,
  fieldOfRings,
  type GridAnswer,
  type Kin,
  type Losses,
  lossesOf,
  makeProbe,
  powerBalance,
  quantileDensity,
  ringSources,
  sliceShares,
  solveState,
  surfaceField,
  type Tick,
} from "../solver/index.ts";
import type { Built, State } from "./build.ts";
import { CROWDING, type Fall, type Falls, fallsOf, kinship, NEAR, PEAK, surfaceFall } from "./falls.ts";
import { readyAt } from "./ready.ts";
import type { Body, Scene } from "./scene.ts";
import { extentOf, sphereSurface } from "./surfaces.ts";

/** A solved state of one grid. */
export interface Solved {
  readonly solution: CoilSolution;
  readonly losses: Losses;
}

/** Figures of one part at 1 A. */
export interface PartFigures {
  readonly body: Body;
  readonly region: number;
  readonly power: number;
  readonly surfaceH: number;
  readonly surfaceShares: readonly number[];
  readonly surfaceArea: number;
  /** Regions other than air that its surface meets. */
  readonly touches: readonly number[];
  readonly peak: number;
  /** Densities a little above and below the peak's share of volume. */
  readonly besidePeak: readonly number[];
  /** [r, z], m; null where no heat arises. */
  readonly hotSpot: readonly [number, number] | null;
  readonly slices: readonly number[];
}

export interface Answer extends GridAnswer {
  readonly empty: Solved;
  /** null when the scene has no part. */
  readonly loaded: Solved | null;
  readonly figures: readonly PartFigures[];
  readonly balance: number;
  readonly iterations: number;
}

export const SLICES = 8;

/** Solves level n of a built scene. `tick` hears the done fraction and may throw. */
export function answerAt(scene: Scene, built: Built, level: number, tick: Tick): Answer {
  const hasParts = scene.bodies.some((b) => b.role === "part");
  const share = hasParts ? 0.45 : 0.9;
  const prepared = readyAt(scene, built, level, (f) => tick(0.1 * f));
  const omega = 2 * Math.PI * scene.frequency;
  const solve = (state: State, from: number): Solved => {
    const solution = solveState(prepared, { materials: built.materials(state), omega }, scene.circuit, (f) =>
      tick(from + share * f),
    );
    return { solution, losses: lossesOf(solution) };
  };
  const empty = solve("empty", 0.1);
  const loaded = hasParts ? solve("loaded", 0.1 + share) : null;
  const working = loaded ?? empty;
  const partFigures = scene.bodies.flatMap((body, b) =>
    body.role === "part" ? [figuresOf(working, body, built.regionOfBody(b))] : [],
  );
  const table = new Table();
  const falls = fallsOf(scene.bodies);
  const guides = scene.bodies.filter((b) => b.role === "guide");
  addTerminals(table, "empty", empty, fallsOf(guides), [...empty.losses.regionPower]);
  const powers = powersOf(scene, built, working, partFigures);
  if (loaded !== null) addTerminals(table, "loaded", loaded, falls, Object.values(powers).flat());
  table.addSum("coil", powers.coil, falls.resistance);
  table.addSum("heated", powers.heated, falls.power);
  // A guide's loss goes as the energy in it, and errs as such.
  table.addSum("other", powers.other, falls.energy);
  partFigures.forEach((p, i) => {
    const touching = scene.bodies.filter((_, b) => p.touches.includes(built.regionOfBody(b)));
    addPart(table, p, i, falls.power, surfaceFall(p.body, touching, scene.frequency));
  });
  addKin(table, working, partFigures, kinship(scene.bodies));
  addStray(table, scene, working, falls.field);
  const balances = [empty, ...(loaded === null ? [] : [loaded])].map(
    (s) => powerBalance(s.solution, s.losses).active,
  );
  return {
    level,
    unknowns: prepared.system.unknowns,
    values: table.values,
    parts: table.parts,
    kin: table.kin,
    falls: table.falls,
    rounding: table.rounding,
    empty,
    loaded,
    figures: partFigures,
    balance: Math.max(...balances),
    iterations: 1,
  };
}

class Table {
  readonly values = new Map<string, number>();
  readonly parts = new Map<string, readonly number[]>();
  readonly kin = new Map<string, readonly Kin[]>();
  readonly falls = new Map<string, Fall>();
  readonly rounding = new Map<string, number>();

  add(name: string, value: number, fall: Fall, parts: readonly number[] = [value]): void {
    this.values.set(name, value);
    this.falls.set(name, fall);
    this.parts.set(name, parts);
  }

  addSum(name: string, parts: readonly number[], fall: Fall): void {
    const total = parts.reduce((a, b) => a + b, 0);
    this.add(name, total, fall, parts);
  }
}

/** R as the sum of the powers given, X as that of the regions' energies and the energy outside. */
function addTerminals(
  table: Table,
  state: State,
  { solution, losses }: Solved,
  falls: Falls,
  powers: readonly number[],
): void {
  const { re, im } = solution.impedance;
  table.add(`${state}.R`, re, falls.resistance, powers);
  const reactive = [...losses.regionEnergy, losses.exteriorEnergy].map((w) => 2 * solution.omega * w);
  table.add(`${state}.X`, im, falls.energy, reactive);
  table.kin.set(`${state}.R`, [{ value: im, weight: CROWDING * re }]);
}

interface Powers {
  readonly coil: readonly number[];
  readonly heated: readonly number[];
  readonly other: readonly number[];
}

/** All losses: of the coil by turns, of parts that are heated and of the rest, each part and guide by its slices. */
function powersOf(scene: Scene, built: Built, working: Solved, figures: readonly PartFigures[]): Powers {
  const { losses } = working;
  const slices = (heated: boolean): number[] =>
    figures.filter((p) => p.body.heated === heated).flatMap((p) => p.slices.map((s) => s * p.power));
  const guides = scene.bodies.flatMap((b, i) => {
    if (b.role !== "guide") return [];
    const region = built.regionOfBody(i);
    const power = losses.regionPower[region] ?? 0;
    return slicesOf(working, b, region, power).map((s) => s * power);
  });
  return { coil: [...losses.turnPower], heated: slices(true), other: [...slices(false), ...guides] };
}

function figuresOf({ solution, losses }: Solved, body: Body, region: number): PartFigures {
  const surface = surfaceField(solution, [region]);
  const power = losses.regionPower[region] ?? 0;
  const hot = power > 0 ? quantileDensity(solution, [region], 0.999) : null;
  return {
    body,
    region,
    power,
    surfaceH: surface.rms,
    surfaceShares: surface.shares,
    surfaceArea: sphereSurface(body) ?? surface.area,
    touches: surface.touches,
    peak: hot?.density ?? 0,
    besidePeak: hot?.beside ?? [],
    hotSpot: hot === null ? null : [hot.r, hot.z],
    slices: slicesOf({ solution, losses }, body, region, power),
  };
}

/** Shares of a body's power in slices of equal height, bottom to top; all 0 where no heat arises. */
function slicesOf({ solution, losses }: Solved, body: Body, region: number, power: number): number[] {
  const { low, high } = extentOf(body);
  const heights = Array.from({ length: SLICES + 1 }, (_, k) => low + ((high - low) * k) / SLICES);
  return power > 0 ? [...sliceShares(solution, losses, [region], heights)] : heights.slice(1).map(() => 0);
}

function addPart(table: Table, p: PartFigures, i: number, power: Fall, surface: Fall): void {
  table.add(
    `part${i}.power`,
    p.power,
    power,
    p.slices.map((s) => s * p.power),
  );
  table.add(`part${i}.surfaceH`, p.surfaceH, surface, p.surfaceShares);
  const near = [p.peak, ...p.besidePeak];
  table.add(
    `part${i}.peak`,
    p.peak,
    PEAK,
    near.map((d) => d / near.length),
  );
}

/** X as kin of the coil's power, energies of the parts as kin of theirs. */
function addKin(
  table: Table,
  { solution, losses }: Solved,
  figures: readonly PartFigures[],
  weight: number,
): void {
  const coil = table.values.get("coil") ?? 0;
  table.kin.set("coil", [{ value: solution.impedance.im, weight: CROWDING * coil }]);
  const kinOf = (p: PartFigures): Kin => ({
    value: losses.regionEnergy[p.region] ?? 0,
    weight: weight * p.power,
  });
  figures.forEach((p, i) => {
    table.kin.set(`part${i}.power`, [kinOf(p)]);
  });
  table.kin.set("heated", figures.filter((p) => p.body.heated).map(kinOf));
}

/** By summing over all ring sources; at points too near to one, from the cell that holds the point, which converges slower. */
function addStray(table: Table, scene: Scene, { solution }: Solved, fall: Fall): void {
  if (scene.strayPoints.length === 0) return;
  const rings = ringSources(solution);
  let probe: ReturnType<typeof makeProbe> | undefined;
  const inCell: ReturnType<typeof makeProbe> = (r, z) => {
    probe ??= makeProbe(solution);
    return probe(r, z);
  };
  scene.strayPoints.forEach(([r, z], i) => {
    const clear = fieldOfRings(rings, r, z);
    const { br, bz } = clear ?? inCell(r, z);
    const components = [br.re, br.im, bz.re, bz.im];
    table.add(`stray${i}`, Math.hypot(...components), clear === null ? NEAR : fall, components);
    // Each of the four components by itself.
    if (clear !== null) table.rounding.set(`stray${i}`, 2 * clear.rounding);
  });
}
