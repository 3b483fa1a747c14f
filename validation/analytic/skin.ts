/**
 * Skin effect in a straight round wire or tube whose current returns far away.
 *
 *   wire: Z/R0 = (γa/2) I0(γa)/I1(γa);  tube: Z' = ρ H'(a)/(2πa H(a)), H = C I1(γr) + D K1(γr), H(b) = 0;  γ = (1+j)/δ.
 * Li is the inductance of the flux inside the metal, Im Z'/ω. Sources: Lord Kelvin (1889), in W. R. Smythe, Static and Dynamic
 * Electricity; H. B. Dwight, AIEE (1922-23), re-derived.
 */
import { type Complex, MU0 } from "../../solver/index.ts";
import { besselI, besselK } from "./bessel.ts";
import { add, complex, div, exp, mul, scale, sub } from "./complex.ts";

/** √(2ρ/(ωμ0µr)), m. */
export function skinDepth(resistivity: number, frequency: number, mur: number): number {
  return Math.sqrt(resistivity / (Math.PI * frequency * MU0 * mur));
}

/** Impedance of a wire over its dc resistance, radius in skin depths. */
export function wireImpedanceRatio(aOverDelta: number): Complex {
  const z = complex(aOverDelta, aOverDelta);
  return scale(mul(z, div(besselI(0, z), besselI(1, z))), 0.5);
}

/** Impedance of a tube over its dc resistance: outer radius a, inner radius b, both in skin depths. */
export function tubeImpedanceRatio(aOverDelta: number, bOverDelta: number): Complex {
  if (bOverDelta === 0) return wireImpedanceRatio(aOverDelta);
  const za = complex(aOverDelta, aOverDelta);
  const zb = complex(bOverDelta, bOverDelta);
  // With H = I1(γr)/I1(γb) − K1(γr)/K1(γb), scaled; d = e^(−2γ(a−b)) keeps the pair in range.
  const d = exp(scale(sub(zb, za), 2));
  const alpha = besselI(1, zb);
  const beta = besselK(1, zb);
  const field = sub(mul(besselI(1, za), beta), mul(d, mul(besselK(1, za), alpha)));
  const curl = add(mul(besselI(0, za), beta), mul(d, mul(besselK(0, za), alpha)));
  const area = (aOverDelta ** 2 - bOverDelta ** 2) / (2 * aOverDelta);
  return scale(mul(complex(1, 1), div(curl, field)), area);
}

/** Li/Li0 of a wire (b = 0) or tube, radii in skin depths: Im(Z/R0) R0/ω over its dc value. */
export function internalInductanceRatio(aOverDelta: number, bOverDelta: number): number {
  const ratio = tubeImpedanceRatio(aOverDelta, bOverDelta).im;
  return ratio / ((aOverDelta ** 2 - bOverDelta ** 2) * internalInductanceDc(aOverDelta, bOverDelta));
}

/** dc internal inductance per metre over μ0/2π: ∫ (enclosed fraction)²/r dr, radii in any one unit. */
export function internalInductanceDc(a: number, b: number): number {
  if (b === 0) return 0.25;
  const s = a * a - b * b;
  return (b ** 4 * Math.log(a / b)) / s ** 2 + (a * a - 3 * b * b) / (4 * s);
}
