/**
 * Inductance of a single-layer solenoid.
 *
 * Current sheet (H. Nagaoka, J. Coll. Sci. Imp. Univ. Tokyo 27 (1909), art. 6), u = 2a/l, k = u/√(1+u²):
 *   L = K_N μ0 N² π a²/l,  K_N = 4/(3π k') [(k'²/k²)(K − E) + E − k].
 * Handbook formula (R. Lundin, Proc. IEEE 73 (1985) 1428), within 3e-6 of it.
 * Round wire of diameter d at pitch p (E. B. Rosa, Bull. Bur. Stand. 2 (1906)), uniform current in the wire:
 *   L = L_sheet − μ0 a N (k_s + k_m),  k_s = 5/4 − ln(2p/d),
 *   k_m = (2/N) Σ_{n=1}^{N−1} (N − n) [ln n − g(n)],  g(n) the logarithm of the mean distance of unit strips n apart.
 */
import { MU0 } from "../../solver/index.ts";
import { ellipticKE } from "./elliptic.ts";

/** Nagaoka's coefficient for u = diameter / length. */
export function nagaoka(u: number): number {
  const k = u / Math.hypot(1, u);
  const kPrime = 1 / Math.hypot(1, u);
  const { K, E } = ellipticKE(kPrime);
  return (4 / (3 * Math.PI * kPrime)) * ((kPrime / k) ** 2 * (K - E) + E - k);
}

/** Current-sheet inductance, H: radius a, length l (m), N turns. */
export function sheetInductance(a: number, l: number, turns: number): number {
  return (nagaoka((2 * a) / l) * MU0 * turns ** 2 * Math.PI * a * a) / l;
}

/** Lundin's handbook formula for the same, H. */
export function lundinInductance(a: number, l: number, turns: number): number {
  const f1 = (x: number): number => (1 + 0.383901 * x + 0.017108 * x * x) / (1 + 0.258952 * x);
  const f2 = (x: number): number => 0.093842 * x + 0.002029 * x * x - 0.000801 * x ** 3;
  const u = (2 * a) / l;
  if (u <= 1) return ((MU0 * turns ** 2 * Math.PI * a * a) / l) * (f1(u * u) - (4 / (3 * Math.PI)) * u);
  const x = 1 / (u * u);
  return MU0 * turns ** 2 * a * ((Math.log((8 * a) / l) - 0.5) * f1(x) + f2(x));
}

/** Rosa's k_s for wire diameter over pitch. */
export function rosaSelf(dOverP: number): number {
  return 1.25 - Math.log(2 / dOverP);
}

/** Rosa's k_m for N turns. */
export function rosaMutual(turns: number): number {
  let sum = 0;
  for (let n = 1; n < turns; n++) sum += (turns - n) * (Math.log(n) - stripDistance(n));
  return (2 * sum) / turns;
}

/** ln of the geometric mean distance of two collinear unit strips, centres n apart. */
function stripDistance(n: number): number {
  const term = (x: number): number => (x === 0 ? 0 : x * x * Math.log(x));
  return (term(n + 1) - 2 * term(n) + term(n - 1)) / 2 - 1.5;
}

/** Single layer of round wire with uniform current, H: mean radius a, pitch p, wire diameter d (m). */
export function rosaInductance(a: number, pitch: number, d: number, turns: number): number {
  return (
    sheetInductance(a, turns * pitch, turns) - MU0 * a * turns * (rosaSelf(d / pitch) + rosaMutual(turns))
  );
}
