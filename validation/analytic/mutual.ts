/**
 * Mutual inductance of two coaxial circular filaments:
 *   M = μ0 √(ab) [(2/k − k) K(k) − (2/k) E(k)],  k² = 4ab / ((a+b)² + h²).
 * Source: J. C. Maxwell, A Treatise on Electricity and Magnetism (1873), art. 701; NIST DLMF 19.34.
 */
import { MU0 } from "../../solver/index.ts";
import { ellipticKE } from "./elliptic.ts";

/** M in H of circles of radii a and b (m), planes h (m) apart. */
export function mutualInductance(a: number, b: number, h: number): number {
  const far = (a + b) ** 2 + h * h;
  const k = Math.sqrt((4 * a * b) / far);
  const { K, E } = ellipticKE(Math.sqrt(((a - b) ** 2 + h * h) / far));
  return MU0 * Math.sqrt(a * b) * ((2 / k - k) * K - (2 / k) * E);
}
