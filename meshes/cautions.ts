/** What the reader must know beside the numbers: limits of the model at this design, and of this solution. */
import { MU0 } from "../solver/index.ts";
import type { PartFigures } from "./answer.ts";
import { skinDepth } from "./build.ts";
import type { Scene } from "./scene.ts";

/** Flux density above which common steels are well into saturation, T (contract, section 2). */
const SATURATED = 2;
/** Touch voltage above which low-voltage rules ask for protection, V rms: common practice, local codes rule. */
const TOUCH_VOLTAGE = 50;

export interface CautionInput {
  readonly scene: Scene;
  readonly current: number;
  readonly voltage: number;
  readonly parts: readonly PartFigures[];
  readonly accuracyMet: boolean;
  readonly worstExcess: number;
}

export function cautions(input: CautionInput): string[] {
  const { scene } = input;
  const out: string[] = [];
  if (!input.accuracyMet) {
    const asked = format(100 * scene.accuracy);
    out.push(
      `The asked ${asked} % was not reached within the limit of unknowns: the widest bar is ${format(100 * scene.accuracy * input.worstExcess)} %.`,
    );
  }
  out.push(
    "Every turn is taken as a closed ring: pitch slope, cross-overs and the exit of the leads are not modelled; see the helix figures under copper.",
  );
  for (const p of input.parts) out.push(...saturation(p, input.current, scene.frequency));
  for (const g of scene.bodies) {
    if (g.role === "guide" && g.material.saturation !== null) {
      out.push(`${g.name}: solved with its low-field permeability; its saturation is not modelled here.`);
    }
  }
  if (input.voltage > TOUCH_VOLTAGE) {
    out.push(
      `The coil stands at ${format(input.voltage)} V rms: guard it, and let capacitors discharge before touching. Follow local codes; have a qualified person check.`,
    );
  }
  return out;
}

/** Linear parts beyond 2 T, and parts whose saturation was given but not followed. */
function saturation(p: PartFigures, current: number, frequency: number): string[] {
  const { relativePermeability: mu, saturation: bs } = p.body.material;
  if (mu <= 1) return [];
  const peakB = Math.SQRT2 * MU0 * mu * strongestH(p, frequency) * current;
  const limit = bs ?? SATURATED;
  if (bs === null && peakB <= limit) return [];
  if (bs !== null && peakB < bs / 10) return [];
  const reached = `µ0 µr H at its surface would peak at ${format(peakB)} T`;
  return bs === null
    ? [
        `${p.body.name}: ${reached}, above ${SATURATED} T: a steel would saturate there, and R, L and heat would differ.`,
      ]
    : [
        `${p.body.name}: solved with its low-field permeability, saturation not followed: ${reached}, against Bs = ${format(bs)} T.`,
      ];
}

/**
 * The strongest field along a part's surface per ampere, edges left out: where the skin is thin, the density not exceeded in 99.9 % of
 * the volume is that under the surface, 2ρH²/δ²; where it is not, that gives less than the mean over the surface, which then stands.
 */
function strongestH(p: PartFigures, frequency: number): number {
  const { resistivity } = p.body.material;
  if (resistivity === null) return p.surfaceH;
  return Math.max(p.surfaceH, skinDepth(p.body.material, frequency) * Math.sqrt(p.peak / (2 * resistivity)));
}

const format = (x: number): string => String(Number(x.toPrecision(3)));
