/**
 * What closed rings leave out of a wound coil: the copper's true length, and the extra resistance and inductance of the
 * current that also runs along the axis (or the radius). Estimates beside the solution, added to nothing.
 */
import { MU0 } from "../solver/index.ts";
import type { Scene } from "./scene.ts";

export interface HelixSurplus {
  /** Copper to cut, leads included, m. */
  readonly length: number;
  /** Surplus over the closed rings, Ω and H. */
  readonly extraResistance: number;
  readonly extraInductance: number;
}

/**
 * Turn k runs √((2πr)² + p²), p its advance to the next. The resistance grows with the length; the inductance by that of a
 * thin tube of current as long as the coil's whole advance l and as wide as its mean radius a,
 * (μ0/2π)[l ln((l + √(l²+a²))/a) − √(l²+a²) + a]: the mutual inductance of two filaments l at distance a, a being the geometric
 * mean distance of a circle from itself (Rosa, Bull. Bureau of Standards 4 (1908) 301; from memory).
 */
export function helixSurplus(scene: Scene, coilResistance: number): HelixSurplus {
  const { turns, advance, leads } = scene;
  let rings = 0;
  let helix = 0;
  let axial = 0;
  let radial = 0;
  turns.forEach((t, k) => {
    const step = advance[k] ?? { axial: 0, radial: 0 };
    const around = 2 * Math.PI * t.r;
    rings += around;
    helix += Math.hypot(around, step.axial, step.radial);
    axial += step.axial;
    radial += step.radial;
  });
  const a = rings / (2 * Math.PI * turns.length);
  const l = Math.hypot(axial, radial);
  const tube = l * Math.asinh(l / a) - Math.hypot(l, a) + a;
  return {
    length: helix + (leads === null ? 0 : 2 * leads.length),
    extraResistance: coilResistance * (helix / rings - 1),
    extraInductance: (MU0 / (2 * Math.PI)) * tube,
  };
}
