/**
 * Where the turns of a winding are: every turn is a closed ring through its section's centre. Order as everywhere: helix and
 * cone bottom to top, spiral inside out, layers inner first and each bottom to top, rings as listed. Lengths in mm.
 */
import type { Conductor, Winding } from "./design.ts";

/** Outer measures of a conductor's section, mm, and its wall (0 = solid). */
export interface SectionMm {
  readonly kind: "round" | "rect";
  readonly radialMm: number;
  readonly axialMm: number;
  readonly wallMm: number;
}

/** One turn, mm; `sense` −1 where it is wound against the rest; advance to the next of the same winding. */
export interface TurnMm {
  readonly r: number;
  readonly z: number;
  readonly sense: 1 | -1;
  readonly axialAdvance: number;
  readonly radialAdvance: number;
}

export function sectionOf(c: Conductor): SectionMm {
  const wallMm = "wallMm" in c ? c.wallMm : 0;
  return "outsideDiameterMm" in c
    ? { kind: "round", radialMm: c.outsideDiameterMm, axialMm: c.outsideDiameterMm, wallMm }
    : { kind: "rect", radialMm: c.radialWidthMm, axialMm: c.axialHeightMm, wallMm };
}

/** The steps from each turn to the next. */
export function stepsOf(pitch: number | readonly number[] | undefined, turns: number): readonly number[] {
  return Array.isArray(pitch) ? pitch : new Array<number>(turns - 1).fill((pitch as number | undefined) ?? 0);
}

/** The turns of `winding` in its order. */
export function turnsOf(winding: Winding, section: SectionMm): readonly TurnMm[] {
  const half = section.radialMm / 2;
  switch (winding.form) {
    case "helix":
      return stackedTurns(winding, winding.turns, () => winding.boreDiameterMm / 2 + half);
    case "cone": {
      const bottom = winding.boreDiameterMm / 2 + half;
      const top = winding.topBoreDiameterMm / 2 + half;
      return stackedTurns(winding, winding.turns, (share) => bottom + share * (top - bottom));
    }
    case "layers": {
      const layers = Array.from({ length: winding.layers }, (_, layer) => {
        const r = winding.boreDiameterMm / 2 + half + layer * (winding.layerPitchMm ?? 0);
        return stackedTurns(winding, winding.turnsPerLayer, () => r);
      });
      return layers.flat();
    }
    case "spiral":
      return spiralTurns(winding, half);
    case "rings":
      return winding.centresMm.map(([r, z], k) => ({
        r,
        z,
        sense: winding.sense?.[k] ?? 1,
        axialAdvance: 0,
        radialAdvance: 0,
      }));
  }
}

interface Axial {
  readonly pitchMm?: number | readonly number[] | undefined;
  readonly centreZMm: number;
}

/** z_k = centre + Σ_{i<k} p_i − ½ Σ p_i; `radiusAt` takes the share of the height below the turn (a cone's side is straight). */
function stackedTurns(axial: Axial, turns: number, radiusAt: (share: number) => number): TurnMm[] {
  const steps = stepsOf(axial.pitchMm, turns);
  const below =
    typeof axial.pitchMm === "number" ? (k: number) => k * (axial.pitchMm as number) : runningSum(steps);
  const height = below(turns - 1);
  const share = (k: number) =>
    turns === 1 ? 0 : typeof axial.pitchMm === "number" ? k / (turns - 1) : below(k) / height;
  const radii = Array.from({ length: turns }, (_, k) => radiusAt(share(k)));
  return radii.map((r, k) => ({
    r,
    z: axial.centreZMm + (below(k) - height / 2),
    sense: 1,
    axialAdvance: stepAfter(steps, k, axial.pitchMm),
    radialAdvance: turns === 1 ? 0 : stepAfter(differences(radii), k, 0),
  }));
}

function spiralTurns(winding: Extract<Winding, { form: "spiral" }>, half: number): TurnMm[] {
  const steps = stepsOf(winding.pitchMm, winding.turns);
  const pitch = winding.pitchMm;
  const outward = typeof pitch === "number" ? (k: number) => k * pitch : runningSum(steps);
  return Array.from({ length: winding.turns }, (_, k) => ({
    r: winding.innerDiameterMm / 2 + half + outward(k),
    z: winding.zMm,
    sense: 1,
    axialAdvance: 0,
    radialAdvance: stepAfter(steps, k, pitch),
  }));
}

/** The step from turn k to the next; the last turn goes on as the one before it, a single turn by its pitch if it has one. */
function stepAfter(
  steps: readonly number[],
  k: number,
  pitch: number | readonly number[] | undefined,
): number {
  return steps[Math.min(k, steps.length - 1)] ?? (typeof pitch === "number" ? pitch : 0);
}

function runningSum(steps: readonly number[]): (k: number) => number {
  const sums = [0];
  for (const step of steps) sums.push(sums.at(-1)! + step);
  return (k) => sums[k]!;
}

function differences(x: readonly number[]): number[] {
  return x.slice(1).map((value, i) => value - x[i]!);
}
