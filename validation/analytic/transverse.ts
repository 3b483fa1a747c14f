/**
 * Long round wire in a uniform transverse field H0: A outside = μ0 H0 (r + C a²/r) sin φ with
 *   C = (µr J1 − z J1')/(µr J1 + z J1'),  z J1' = z J0 − J1,  z = (1−j) a/δ;
 *   loss per length = −2π ω μ0 a² |H0|² Im C, H0 rms.
 * Source: J. Lammeraner, M. Stafl, Eddy Currents (1966), re-derived.
 */
import type { Complex } from "../../solver/index.ts";
import { besselI } from "./bessel.ts";
import { add, complex, div, mul, scale, sub } from "./complex.ts";

/** C for the wire's radius in skin depths and its relative permeability. */
export function transverseCoefficient(aOverDelta: number, mur: number): Complex {
  // J1(z) = −j I1(w) and J0(z) = I0(w) with w = jz = (1+j) a/δ; the common e^w drops out of the ratio.
  const w = complex(aOverDelta, aOverDelta);
  const i1 = besselI(1, w);
  const slope = sub(mul(w, besselI(0, w)), i1);
  return div(sub(scale(i1, mur), slope), add(scale(i1, mur), slope));
}
