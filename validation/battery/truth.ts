/**
 * What a design truly gives, as well as we can tell: our own solution on two consecutive levels well beyond those `predict` stops at, its doubt
 * from their difference, and closed forms in place of it where there are any. The grid is another than predict's: laid as if for a lower
 * frequency, so with thicker and deeper layers and other triangles between, that a fault of one grid is not its own truth. (As if for a higher
 * one its layers would end where the field is not gone yet: 1.6 times moved powers of thin-skinned magnetic parts by 3e-5.)
 *
 *   doubt(q) = |q_n − q_(n−1)| · e(n)/(e(n−1) − e(n)), e how q's error falls at the slowest (solver/refine.ts).
 *
 * The result is put together here from the solver's values, not by `predict`, so that a slip there shows as well.
 */
import { type Answer, answerAt } from "../../meshes/answer.ts";
import { type Built, build, skinDepth } from "../../meshes/build.ts";
import { checkDesign } from "../../meshes/check.ts";
import { powerAt, terminal } from "../../meshes/drive.ts";
import { type LeadPair, leadPair } from "../../meshes/leadpair.ts";
import { predict } from "../../meshes/predict.ts";
import type { DepthShare } from "../../meshes/result.ts";
import type { Scene } from "../../meshes/scene.ts";
import { extentOf, surfaceDistance } from "../../meshes/surfaces.ts";
import { sure, type Uncertain } from "../../meshes/uncertain.ts";
import { mmFromMetres } from "../../meshes/units.ts";
import { countNodes, type Fall, remaining, sharesBelow } from "../../solver/index.ts";
import { closedForms } from "./closed.ts";
import type { Entry } from "./designs/index.ts";
import { type Figures, listed, type PartOfFigures } from "./figures.ts";

/** Truth is sought this many levels beyond the one `predict` stops at … */
const BEYOND = 2;
/** … one where a grid would be larger than this. */
const MOST_UNKNOWNS = 500_000;
/** The truth's grid is laid for this many times the frequency it is solved at. */
const LAID_FOR = 0.7;
const NO_TICK = (): void => undefined;

/** A design's truth. */
export interface Truth {
  /** The design document it belongs to, as JSON text. */
  readonly design: string;
  readonly level: number;
  readonly unknowns: number;
  /** Level `predict` stopped at when this was made. */
  readonly stoppedAt: number;
  /** Paths whose figures are closed forms. */
  readonly closed: readonly string[];
  /** Figures that carry bars, by path: truth and its doubt. */
  readonly barred: Readonly<Record<string, readonly [value: number, doubt: number]>>;
  /** Figures that carry none. */
  readonly plain: Readonly<Record<string, number>>;
}

/** The text by which a stored truth knows its design. */
export const documentText = (entry: Entry): string => JSON.stringify(entry.design);

/** @throws Refusal, SolverError or MeshError when the design cannot be solved at all. */
export function truthOf(entry: Entry): Truth {
  const checked = checkDesign(entry.design);
  const { scene } = checked;
  const free = predict(checked).result.numerics.unknowns - scene.turns.length;
  const stoppedAt = levelOf(build(scene), free);
  const built = build({ ...scene, frequency: LAID_FOR * scene.frequency });
  const level = stoppedAt + (countNodes(built.mesh, stoppedAt + BEYOND) <= MOST_UNKNOWNS ? BEYOND : 1);
  // The leads' pair is solved by itself, with bars of its own: asked for a tenth of what the design asks.
  const pair = leadPair({ ...scene, accuracy: scene.accuracy / 10 });
  const before = listed(figuresOf(scene, answerAt(scene, built, level - 1, NO_TICK), pair));
  const answer = answerAt(scene, built, level, NO_TICK);
  const fine = listed(figuresOf(scene, answer, pair));
  const barred: Record<string, readonly [number, number]> = {};
  for (const [path, { value }] of fine.barred) {
    const was = before.barred.get(path)?.value ?? Number.NaN;
    barred[path] = [value, Math.abs(value - was) * remaining(fallOf(answer, path), level - 1, level)];
  }
  const closed = closedForms(entry.id, scene);
  for (const [path, { value, plusMinus }] of closed) barred[path] = [value, plusMinus];
  return {
    design: documentText(entry),
    level,
    unknowns: answer.unknowns,
    stoppedAt,
    closed: [...closed.keys()],
    barred,
    plain: Object.fromEntries(fine.plain),
  };
}

/** The level whose grid has room for so many free nodes. */
function levelOf(built: Built, free: number): number {
  let level = 1;
  while (countNodes(built.mesh, level) < free) level++;
  return level;
}

/** How a figure's error falls, from the solver's values it is made of. */
function fallOf(answer: Answer, path: string): Fall | undefined {
  const state = answer.loaded === null ? "empty" : "loaded";
  const [head, index, last] = path.split(".");
  const named =
    head === "strayField"
      ? `stray${index}`
      : head === "parts" && last === "surfaceHAPerM"
        ? `part${index}.surfaceH`
        : head === "parts" && last === "peakWPerM3"
          ? `part${index}.peak`
          : head === "empty"
            ? "empty.R"
            : `${state}.R`;
  return answer.falls.get(named);
}

/** The result of one grid, without bars. */
function figuresOf(scene: Scene, answer: Answer, pair: LeadPair): Figures {
  const omega = 2 * Math.PI * scene.frequency;
  const at = (name: string): number => {
    const value = answer.values.get(name);
    if (value === undefined) throw new RangeError(`no grid tells ${name}`);
    return value;
  };
  const r = (state: string): Uncertain => sure(at(`${state}.R`) + pair.resistance);
  const x = (state: string): Uncertain => sure(at(`${state}.X`) + omega * pair.inductance);
  const state = answer.loaded === null ? "empty" : "loaded";
  const power = powerAt(
    scene.drive,
    {
      resistance: r(state),
      reactance: x(state),
      coil: sure(at("coil") + pair.resistance),
      heated: sure(at("heated")),
      other: sure(at("other")),
    },
    omega,
  );
  const current = power.currentA.value;
  const { losses } = answer.loaded ?? answer.empty;
  return {
    empty: terminal(r("empty"), x("empty"), omega),
    loaded: answer.loaded === null ? null : terminal(r("loaded"), x("loaded"), omega),
    power,
    turns: scene.turns.map((t, k) => ({
      rMm: mmFromMetres(t.r),
      zMm: mmFromMetres(t.z),
      powerW: (losses.turnPower[k] ?? 0) * current ** 2,
    })),
    strayField: scene.strayPoints.map(([rr, z], i) => ({
      rMm: mmFromMetres(rr),
      zMm: mmFromMetres(z),
      fluxDensityT: sure(current * at(`stray${i}`)),
    })),
    parts: answer.figures.map((_, i) => partOf(scene, answer, i, current)),
  };
}

function partOf(scene: Scene, answer: Answer, i: number, current: number): PartOfFigures {
  const p = answer.figures[i]!;
  const { solution, losses } = answer.loaded ?? answer.empty;
  const watt = p.power * current ** 2;
  const depth = skinDepth(p.body.material, scene.frequency);
  const { inner, outer } = extentOf(p.body);
  const shares = (distance: (r: number, z: number) => number): DepthShare[] | null => {
    if (!Number.isFinite(depth)) return null;
    const depths = [0.5, 1, 2].map((k) => k * depth);
    const below = sharesBelow(solution, losses, [p.region], distance, depths);
    return depths.map((d, k) => ({ depthMm: mmFromMetres(d), share: below[k] ?? 0 }));
  };
  return {
    powerW: sure(watt),
    surfaceWPerM2: sure(watt / p.surfaceArea),
    surfaceHAPerM: sure(p.surfaceH * current),
    peakWPerM3: sure(p.peak * current ** 2),
    hotSpotMm: p.hotSpot === null ? null : [mmFromMetres(p.hotSpot[0]), mmFromMetres(p.hotSpot[1])],
    sliceShares: [...p.slices],
    depthShares: shares(surfaceDistance(p.body)),
    sideDepthShares: p.body.cylinder ? shares((r) => outer - r) : null,
    boreDepthShares: p.body.cylinder && inner > 0 ? shares((r) => r - inner) : null,
  };
}
