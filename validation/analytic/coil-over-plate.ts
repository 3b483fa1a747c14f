/**
 * Impedance a conducting half-space or plate adds to a coil of rectangular section (r1..r2 by height h, N turns, uniform current
 * density, near face l1 above the surface):
 *   ΔZ = jω π μ0 N²/(h²(r2−r1)²) ∫0^∞ R(k) [e^(−k l1) (1 − e^(−kh))/k]² F(k)² dk,  F(k) = ∫ r J1(kr) dr,
 *   R = (µr k − α)/(µr k + α) for the half-space, R (1 − e^(−2αc))/(1 − R² e^(−2αc)) for a plate of thickness c, α² = k² + jωμσ.
 * Source: C. V. Dodd, W. E. Deeds, J. Appl. Phys. 39 (1968) 2829; formulas re-derived.
 */
import { type Complex, MU0 } from "../../solver/index.ts";
import { integralTJ1 } from "./bessel.ts";
import { add, complex, div, exp, mul, scale, sqrt, sub } from "./complex.ts";
import { integratePanels } from "./quadrature.ts";

/** SI units; thickness absent or infinite = half-space. */
export interface CoilOverPlate {
  readonly r1: number;
  readonly r2: number;
  readonly l1: number;
  readonly h: number;
  readonly turns: number;
  readonly frequency: number;
  readonly resistivity: number;
  readonly mur: number;
  readonly thickness?: number;
}

/** Coil impedance with the plate minus that in air, Ω. Relative error near 1e-8. */
export function coilOverPlate(p: CoilOverPlate): Complex {
  const omega = 2 * Math.PI * p.frequency;
  const far = 36 / (2 * p.l1);
  const integrand = (k: number): Complex => {
    const section = rJ1(k, p.r1, p.r2);
    const stack = -Math.expm1(-k * p.h) / k;
    return scale(reflection(k, omega, p), Math.exp(-2 * k * p.l1) * section ** 2 * stack ** 2);
  };
  const rough = ((p.r2 - p.r1) * (p.r1 + p.r2) * p.h) ** 2 / (16 * p.r2);
  const sum = integratePanels(integrand, 0, far, Math.PI / p.r2, 1e-11 * rough);
  const turnDensity = p.turns / (p.h * (p.r2 - p.r1));
  return mul(complex(0, omega * Math.PI * MU0 * turnDensity ** 2), sum);
}

/** What the plate sends back of each wave number. */
function reflection(k: number, omega: number, p: CoilOverPlate): Complex {
  const alpha = sqrt(complex(k * k, (omega * MU0 * p.mur) / p.resistivity));
  const air = complex(k * p.mur);
  const single = div(sub(air, alpha), add(air, alpha));
  if (p.thickness === undefined) return single;
  const round = exp(scale(alpha, -2 * p.thickness));
  const through = sub(complex(1), round);
  return div(mul(single, through), sub(complex(1), mul(mul(single, single), round)));
}

/** ∫ r J1(kr) dr over the winding. */
function rJ1(k: number, r1: number, r2: number): number {
  return (integralTJ1(k * r2) - integralTJ1(k * r1)) / (k * k);
}
