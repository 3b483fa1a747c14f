/** Design → result document: grids refined until the asked accuracy holds, the drive applied, every figure with its bar. */
import { countNodes, refine, sharesBelow } from "../solver/index.ts";
import { type Answer, answerAt, type PartFigures } from "./answer.ts";
import { type Built, build, skinDepth } from "./build.ts";
import { cautions } from "./cautions.ts";
import type { Checked } from "./check.ts";
import { currentOf, type PerAmpere, powerAt, terminal } from "./drive.ts";
import type { Fields } from "./fields.ts";
import { type FirstDigits, firstDigits } from "./first-digits.ts";
import { heatMap } from "./heat.ts";
import type { HeatMap } from "./heatmap.ts";
import { helixSurplus } from "./helix.ts";
import { type LeadPair, leadPair } from "./leadpair.ts";
import { resample } from "./resample.ts";
import type { DepthShare, PartResult, Power, Result } from "./result.ts";
import type { Scene } from "./scene.ts";
import { extentOf, surfaceDistance } from "./surfaces.ts";
import { plus, product, relative, times, type Uncertain } from "./uncertain.ts";
import { mmFromMetres } from "./units.ts";

/** No grid beyond the second is made larger than this. */
export const MOST_UNKNOWNS = 300_000;
/** Parts that take less than this share of the power are not held to the asked accuracy. */
const GOVERNED_SHARE = 0.01;
/** Depths at which shares are given, in skin depths. */
const DEPTHS = [0.5, 1, 2] as const;

export interface Progress {
  /** 0 … 1 of the whole, as far as can be told. */
  readonly fraction: number;
  readonly stage: string;
  /** From the first grid on. */
  readonly firstDigits?: FirstDigits;
}

export interface Hooks {
  readonly progress?: (p: Progress) => void;
  /** Looked at often; the work stops soon after it turns true. */
  readonly signal?: { readonly aborted: boolean };
  /** The process's maximum resident set, bytes; 0 where nobody can tell. */
  readonly peakMemoryBytes?: () => number;
  /** True: the prediction carries the fields of both states. */
  readonly fields?: boolean;
}

/** Thrown when the signal was aborted. */
export class Cancelled extends Error {
  constructor() {
    super("cancelled");
    this.name = "Cancelled";
  }
}

export interface Prediction {
  readonly result: Result;
  readonly heat: HeatMap;
  /** There when the hooks ask for it. */
  readonly fields?: Fields;
}

/** @throws Cancelled; SolverError or MeshError on a defect. */
export function predict({ design, scene }: Checked, hooks: Hooks = {}): Prediction {
  const started = performance.now();
  const check = (): void => {
    if (hooks.signal?.aborted === true) throw new Cancelled();
  };
  check();
  let told: { readonly firstDigits?: FirstDigits } = {};
  const report = (fraction: number, stage: string): void => {
    check();
    hooks.progress?.({ fraction, stage, ...told });
  };
  report(0, "laying the grid");
  const built = build(scene);
  const pair = leadPair(scene);
  const { finest, bars, grids, met, worst } = solveGrids(scene, built, pair, report, (digits) => {
    told = { firstDigits: digits };
  });
  const figures = collect(scene, finest, bars, pair);
  const power = powerAt(scene.drive, figures.perAmpere, 2 * Math.PI * scene.frequency);
  const current = power.currentA.value;
  report(0.97, "reading the field");
  const parts = finest.figures.map((p, i) => partResult(scene, finest, bars, p, i, power));
  const working = finest.loaded ?? finest.empty;
  const surplus = helixSurplus(scene, read(finest, bars, "empty.R").value);
  const result: Result = {
    design,
    empty: figures.empty,
    loaded: figures.loaded,
    power,
    turns: scene.turns.map((t, k) => ({
      rMm: mmFromMetres(t.r),
      zMm: mmFromMetres(t.z),
      powerW: (working.losses.turnPower[k] ?? 0) * current ** 2,
    })),
    parts,
    strayField: scene.strayPoints.map(([r, z], i) => ({
      rMm: mmFromMetres(r),
      zMm: mmFromMetres(z),
      fluxDensityT: product(power.currentA, read(finest, bars, `stray${i}`)),
    })),
    leads: scene.leads === null ? null : { resistanceOhm: pair.resistance, inductanceH: pair.inductance },
    copper: {
      lengthMm: mmFromMetres(surplus.length),
      helixExtraOhm: surplus.extraResistance,
      helixExtraH: surplus.extraInductance,
    },
    numerics: {
      unknowns: finest.unknowns,
      grids,
      iterations: finest.iterations,
      seconds: (performance.now() - started) / 1000,
      peakMemoryBytes: hooks.peakMemoryBytes?.() ?? 0,
      powerBalance: finest.balance,
      accuracyMet: met,
    },
    cautions: cautions({
      scene,
      current,
      voltage: power.coilVoltageV.value,
      parts: finest.figures,
      accuracyMet: met,
      worstExcess: worst,
    }),
  };
  const heat = heatMap(scene, finest, current);
  const fields = hooks.fields === true ? { fields: resample(scene, finest, current) } : {};
  report(1, "done");
  return { result, heat, ...fields };
}

/** A value of the finest grid with its bar; a name nobody put there is a defect, not a zero. */
function read(answer: Answer, bars: ReadonlyMap<string, number>, name: string): Uncertain {
  const value = answer.values.get(name);
  const plusMinus = bars.get(name);
  if (value === undefined || plusMinus === undefined) throw new RangeError(`no grid tells ${name}`);
  return { value, plusMinus };
}

interface Solved {
  readonly finest: Answer;
  readonly bars: ReadonlyMap<string, number>;
  readonly grids: number;
  readonly met: boolean;
  /** Largest bar in units of what was asked. */
  readonly worst: number;
}

const ORDINALS = ["first", "second", "third", "fourth", "fifth", "sixth", "seventh", "eighth"];
/** Where the grids start on the way from 0 to 1: most designs are done after the second. */
const STARTS = [0.05, 0.2, 0.7, 0.85, 0.92];
const ALL_SOLVED = 0.95;

/** Grids of levels 1, 2, … until the governed bars hold. */
function solveGrids(
  scene: Scene,
  built: Built,
  pair: LeadPair,
  report: (fraction: number, stage: string) => void,
  tell: (digits: FirstDigits) => void,
): Solved {
  const unknownsAt = (level: number): number => countNodes(built.mesh, level);
  let grids = 0;
  let worst = Number.POSITIVE_INFINITY;
  const solveAt = (level: number): Answer => {
    const name = `${ORDINALS[grids] ?? "next"} grid, ${unknownsAt(level)} unknowns${reached(worst, scene)}`;
    const [from, to] = [STARTS[grids] ?? ALL_SOLVED, STARTS[grids + 1] ?? ALL_SOLVED];
    const answer = answerAt(scene, built, level, (f) => report(from + (to - from) * f, name));
    if (grids === 0) tell(firstDigits(scene, answer, pair, null));
    return answer;
  };
  const refined = refine(
    solveAt,
    unknownsAt,
    (answer, bars) => {
      const over = excess(scene, answer, bars, pair);
      tell(firstDigits(scene, answer, pair, 100 * over * scene.accuracy));
      return over;
    },
    MOST_UNKNOWNS,
    (count, over) => {
      grids = count;
      worst = over;
    },
  );
  return { ...refined, worst };
}

const reached = (worst: number, scene: Scene): string =>
  Number.isFinite(worst)
    ? `, R and L within ${Number((100 * worst * scene.accuracy).toPrecision(2))} % so far`
    : "";

/** Largest governed bar over what is asked of it: R and L of both states, power of each part of at least 1 %. */
function excess(scene: Scene, answer: Answer, bars: ReadonlyMap<string, number>, pair: LeadPair): number {
  const { empty, loaded, perAmpere } = collect(scene, answer, bars, pair);
  const governed = [empty, ...(loaded === null ? [] : [loaded])].flatMap((t) => [
    t.resistanceOhm,
    t.inductanceH,
  ]);
  const current = currentOf(scene.drive, perAmpere);
  const square = product(current, current);
  answer.figures.forEach((p, i) => {
    if (p.power < GOVERNED_SHARE * perAmpere.resistance.value) return;
    governed.push(product(square, read(answer, bars, `part${i}.power`)));
  });
  return Math.max(...governed.map(relative)) / scene.accuracy;
}

/** Terminal values with leads, and the losses per ampere squared. */
function collect(scene: Scene, answer: Answer, bars: ReadonlyMap<string, number>, pair: LeadPair) {
  const omega = 2 * Math.PI * scene.frequency;
  const leadR: Uncertain = { value: pair.resistance, plusMinus: pair.resistanceBar };
  const leadX: Uncertain = times(omega, { value: pair.inductance, plusMinus: pair.inductanceBar });
  const get = (name: string): Uncertain => read(answer, bars, name);
  const state = answer.loaded === null ? "empty" : "loaded";
  const perAmpere: PerAmpere = {
    resistance: plus(get(`${state}.R`), leadR),
    reactance: plus(get(`${state}.X`), leadX),
    coil: plus(get("coil"), leadR),
    heated: get("heated"),
    other: get("other"),
  };
  return {
    perAmpere,
    empty: terminal(plus(get("empty.R"), leadR), plus(get("empty.X"), leadX), omega),
    loaded: answer.loaded === null ? null : terminal(perAmpere.resistance, perAmpere.reactance, omega),
  };
}

function partResult(
  scene: Scene,
  answer: Answer,
  bars: ReadonlyMap<string, number>,
  p: PartFigures,
  i: number,
  power: Power,
): PartResult {
  const current = power.currentA;
  const square = product(current, current);
  const only = scene.drive.kind === "power" && answer.figures.filter((f) => f.body.heated).length === 1;
  const watts = only && p.body.heated ? power.heatedW : product(square, read(answer, bars, `part${i}.power`));
  const depth = skinDepth(p.body.material, scene.frequency);
  return {
    name: p.body.name,
    powerW: watts,
    skinDepthMm: Number.isFinite(depth) ? mmFromMetres(depth) : null,
    surfaceWPerM2: times(1 / p.surfaceArea, watts),
    surfaceHAPerM: product(current, read(answer, bars, `part${i}.surfaceH`)),
    peakWPerM3: product(square, read(answer, bars, `part${i}.peak`)),
    hotSpotMm: p.hotSpot === null ? null : [mmFromMetres(p.hotSpot[0]), mmFromMetres(p.hotSpot[1])],
    sliceShares: [...p.slices],
    ...depthResults(answer, p, depth),
  };
}

type Shares = Pick<PartResult, "depthShares" | "sideDepthShares" | "boreDepthShares">;

/** Shares within 0.5, 1 and 2 skin depths of any surface, of the outer side and of the bore. */
function depthResults(answer: Answer, p: PartFigures, depth: number): Shares {
  if (!Number.isFinite(depth)) return { depthShares: null, sideDepthShares: null, boreDepthShares: null };
  const { solution, losses } = answer.loaded ?? answer.empty;
  const depths = DEPTHS.map((k) => k * depth);
  const shares = (distance: (r: number, z: number) => number): DepthShare[] => {
    const below = sharesBelow(solution, losses, [p.region], distance, depths);
    return depths.map((d, k) => ({ depthMm: mmFromMetres(d), share: below[k] ?? 0 }));
  };
  const { inner, outer } = extentOf(p.body);
  return {
    depthShares: shares(surfaceDistance(p.body)),
    sideDepthShares: p.body.cylinder ? shares((r) => outer - r) : null,
    boreDepthShares: p.body.cylinder && inner > 0 ? shares((r) => r - inner) : null,
  };
}
