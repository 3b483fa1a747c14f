/**
 * Impedance an infinite rod (radius b) or tube (inner radius a, outer b) adds to a coil round it (r1..r2 by height h, N turns,
 * uniform current density):
 *   ΔZ = jω 2μ0 N²/(h²(r2−r1)²) ∫0^∞ C(k) [2 sin(kh/2)/k]² [∫ r K1(kr) dr]² dk,
 * C(k) the amplitude of the rod's field K1(kr) per I1(kr) of the coil's, from A_φ and (1/µ) d(rA)/dr continuous at b (and a).
 * Source: C. V. Dodd, W. E. Deeds, J. Appl. Phys. 39 (1968) 2829; formulas re-derived.
 */
import { type Complex, MU0 } from "../../solver/index.ts";
import { besselI, besselK } from "./bessel.ts";
import { add, complex, div, exp, mul, scale, sqrt, sub } from "./complex.ts";
import { integrate, integratePanels } from "./quadrature.ts";

/** SI units; bore absent = solid rod. */
export interface CoilRoundRod {
  readonly r1: number;
  readonly r2: number;
  readonly h: number;
  readonly turns: number;
  readonly frequency: number;
  readonly resistivity: number;
  readonly mur: number;
  readonly b: number;
  readonly a?: number;
}

/** Coil impedance with the rod minus that in air, Ω. Relative error near 1e-8. */
export function coilRoundRod(p: CoilRoundRod): Complex {
  const omega = 2 * Math.PI * p.frequency;
  const far = 36 / (2 * (p.r1 - p.b));
  const integrand = (k: number): Complex => {
    const half = (k * p.h) / 2;
    const width = half === 0 ? p.h : (p.h * Math.sin(half)) / half;
    return scale(scatter(k, omega, p), (width * rK1(k, p)) ** 2);
  };
  const rough = (p.h * (p.r2 - p.r1) * p.b) ** 2 / p.r1;
  const sum = integratePanels(integrand, 1e-9 / p.r2, far, Math.PI / p.h, 1e-11 * rough);
  const turnDensity = p.turns / (p.h * (p.r2 - p.r1));
  return mul(complex(0, 2 * omega * MU0 * turnDensity ** 2), sum);
}

/** e^(kb) ∫ r K1(kr) dr over the winding. */
function rK1(k: number, p: CoilRoundRod): number {
  const f = (r: number): Complex => complex(r * Math.exp(-k * (r - p.b)) * besselK(1, complex(k * r)).re);
  const size = p.r2 * (p.r2 - p.r1) * Math.exp(-k * (p.r1 - p.b)) * besselK(1, complex(k * p.r1)).re;
  return integrate(f, p.r1, p.r2, 1e-11 * size).re;
}

/** C(k) times e^(−2kb), so that it meets the scaled winding integrals. */
function scatter(k: number, omega: number, p: CoilRoundRod): Complex {
  const alpha = sqrt(complex(k * k, (omega * MU0 * p.mur) / p.resistivity));
  const kb = complex(k * p.b);
  const wall = wallAt(k, alpha, p);
  // d(rf)/dr / r is k I0 for I1(kr), −k K0 for K1(kr).
  const top = sub(scale(mul(wall.value, besselI(0, kb)), k), mul(wall.curl, besselI(1, kb)));
  const bottom = add(mul(wall.curl, besselK(1, kb)), scale(mul(wall.value, besselK(0, kb)), k));
  return div(top, bottom);
}

/** A_φ and (1/µr)(1/r) d(rA)/dr at the outer face, to a common factor. */
function wallAt(
  k: number,
  alpha: Complex,
  p: CoilRoundRod,
): { readonly value: Complex; readonly curl: Complex } {
  const zb = scale(alpha, p.b);
  if (p.a === undefined) {
    return { value: besselI(1, zb), curl: scale(mul(alpha, besselI(0, zb)), 1 / p.mur) };
  }
  const za = scale(alpha, p.a);
  const ka = complex(k * p.a);
  // Bore: A = I1(kr). In the wall C I1(αr) + D K1(αr); match at a.
  const a0 = besselI(1, ka);
  const g0 = scale(besselI(0, ka), k * p.mur);
  const c = add(mul(mul(alpha, besselK(0, za)), a0), mul(g0, besselK(1, za)));
  const d = sub(mul(mul(alpha, besselI(0, za)), a0), mul(g0, besselI(1, za)));
  const fall = exp(scale(alpha, -2 * (p.b - p.a)));
  const dFall = mul(d, fall);
  return {
    value: add(mul(c, besselI(1, zb)), mul(dFall, besselK(1, zb))),
    curl: scale(mul(alpha, sub(mul(c, besselI(0, zb)), mul(dFall, besselK(0, zb)))), 1 / p.mur),
  };
}
