/** What a coil measures by the grids solved so far, told while finer ones are still being solved. */
import type { Answer } from "./answer.ts";
import type { LeadPair } from "./leadpair.ts";
import type { Scene } from "./scene.ts";

/** R (Ω) and L (H) at the terminals, leads included. */
export interface FirstDigits {
  readonly emptyOhm: number;
  readonly emptyH: number;
  /** null without a part. */
  readonly loadedOhm: number | null;
  readonly loadedH: number | null;
  /** Largest bar of these and of the parts' powers, percent; null after the first grid, whose bars nothing tells yet. */
  readonly withinPercent: number | null;
}

/** The digits of one grid's answer. */
export function firstDigits(
  scene: Scene,
  { values }: Answer,
  pair: LeadPair,
  withinPercent: number | null,
): FirstDigits {
  const ohm = (state: string): number | null => {
    const r = values.get(`${state}.R`);
    return r === undefined ? null : r + pair.resistance;
  };
  const henry = (state: string): number | null => {
    const x = values.get(`${state}.X`);
    return x === undefined ? null : x / (2 * Math.PI * scene.frequency) + pair.inductance;
  };
  return {
    emptyOhm: ohm("empty") ?? Number.NaN,
    emptyH: henry("empty") ?? Number.NaN,
    loadedOhm: ohm("loaded"),
    loadedH: henry("loaded"),
    withinPercent,
  };
}
