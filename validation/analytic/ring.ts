/**
 * Inductance of one ring of round wire, radius a to the wire's centre, wire radius r.
 *
 * Uniform current density (Lord Rayleigh and W. D. Niven, 1881, as quoted by Rosa and Grover 1912; from memory):
 *   L = μ0 a [(1 + r²/8a²) ln(8a/r) + r²/24a² − 7/4].
 * All current on the surface, thin wire only (error of order (r/a)² ln): L = μ0 a [ln(8a/r) − 2].
 */
import { MU0 } from "../../solver/index.ts";

/** Low-frequency inductance, H. */
export function ringInductanceUniform(a: number, r: number): number {
  const q = (r / a) ** 2;
  return MU0 * a * ((1 + q / 8) * Math.log((8 * a) / r) + q / 24 - 1.75);
}

/** High-frequency inductance of a thin ring, H. */
export function ringInductanceSurface(a: number, r: number): number {
  return MU0 * a * (Math.log((8 * a) / r) - 2);
}
