/**
 * Long conducting cylinder or tube in a uniform axial field, H(a) = H0.
 *
 *   solid: µ_eff = µr 2 I1(γa)/(γa I0(γa));
 *   hollow: H = C I0(γr) + D K0(γr), H'(b) = γ² b H(b)/(2µr) (the bore's flux drives the wall's inner face);
 *   µ_eff = mean B over π a² / (μ0 H0) = 2µr H'(a)/(γ² a H0);  power per metre = ω μ0 π a² H0² µ'', H0 rms.
 * Sources: F. Förster, K. Stambke, Z. Metallkunde 45 (1954) (from memory); W. R. Smythe, Static and Dynamic Electricity; re-derived.
 */
import type { Complex } from "../../solver/index.ts";
import { besselI, besselK } from "./bessel.ts";
import { add, complex, div, exp, mul, scale, sub } from "./complex.ts";

/** µ_eff = µ' − jµ'' of a solid cylinder; radius in skin depths. */
export function solidCylinder(aOverDelta: number, mur: number): Complex {
  const z = complex(aOverDelta, aOverDelta);
  return scale(div(besselI(1, z), mul(z, besselI(0, z))), 2 * mur);
}

/** H(r)/H0 in a solid cylinder; radii in skin depths. */
export function solidCylinderField(rOverDelta: number, aOverDelta: number): Complex {
  const z = complex(rOverDelta, rOverDelta);
  const za = complex(aOverDelta, aOverDelta);
  return mul(exp(sub(z, za)), div(besselI(0, z), besselI(0, za)));
}

/** µ_eff of a tube and the field in its bore over H0; outer a and inner b in skin depths. */
export function hollowCylinder(
  aOverDelta: number,
  bOverDelta: number,
  mur: number,
): { readonly muEff: Complex; readonly bore: Complex } {
  const za = complex(aOverDelta, aOverDelta);
  const zb = complex(bOverDelta, bOverDelta);
  const half = scale(zb, 1 / (2 * mur));
  // C (I1 − half·I0)(zb) = D (K1 + half·K0)(zb), both scaled; H at b over their Wronskian is 1/(zb·…) without cancellation.
  const c = add(besselK(1, zb), mul(half, besselK(0, zb)));
  const d = sub(besselI(1, zb), mul(half, besselI(0, zb)));
  const fall = exp(sub(zb, za));
  const fall2 = mul(fall, fall);
  const surface = add(mul(c, besselI(0, za)), mul(mul(d, fall2), besselK(0, za)));
  const slope = sub(mul(c, besselI(1, za)), mul(mul(d, fall2), besselK(1, za)));
  const atBore = add(mul(c, besselI(0, zb)), mul(d, besselK(0, zb)));
  return {
    muEff: scale(div(slope, mul(za, surface)), 2 * mur),
    bore: mul(fall, div(atBore, surface)),
  };
}
