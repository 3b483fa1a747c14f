/**
 * Conducting sphere and hollow sphere in a uniform field B0: dipole moment m = 2π a³ α H0.
 *
 *   A_φ outside = (B0/2)(r + α a³/r²) sin θ; in the wall C i1(γr) + D k1(γr), i1 = cosh x/x − sinh x/x², k1 = e^(−x)(1/x + 1/x²);
 *   in the cavity (B_c/2) r. B_r and H_θ continue at b and at a.  P = −2π a³ ω μ0 H0² Im α, H0 rms.
 * Sources: W. R. Smythe, Static and Dynamic Electricity; C. P. Bidinosti et al., Concepts Magn. Reson. B 31 (2007) 191; re-derived.
 */
import type { Complex } from "../../solver/index.ts";
import { add, complex, div, exp, mul, scale, sub } from "./complex.ts";

/** e^(−x) i1(x) and e^(−x) (x i1)' /x-free: value v and g = (x f)' of a wall function. */
interface WallFunction {
  readonly value: Complex;
  readonly curl: Complex;
}

/** e^(−x) i1 and e^(−x) d(x i1)/dx. */
function rising(x: Complex): WallFunction {
  const e = exp(scale(x, -2));
  const cosh = scale(add(complex(1), e), 0.5);
  const sinh = scale(sub(complex(1), e), 0.5);
  const value = sub(div(cosh, x), div(sinh, mul(x, x)));
  return { value, curl: sub(sinh, value) };
}

/** e^x k1 and e^x d(x k1)/dx. */
function falling(x: Complex): WallFunction {
  const value = add(div(complex(1), x), div(complex(1), mul(x, x)));
  return { value, curl: sub(complex(-1), value) };
}

/** α of a solid sphere; radius in skin depths. */
export function solidSphere(aOverDelta: number, mur: number): Complex {
  return dipole(rising(complex(aOverDelta, aOverDelta)), mur);
}

/** α from the wall's value and curl at the outer face: r-derivative of rA is curl/µr inside, (2 − α) outside. */
function dipole(wall: WallFunction, mur: number): Complex {
  const top = sub(scale(wall.value, 2 * mur), wall.curl);
  return div(top, add(scale(wall.value, mur), wall.curl));
}

/** α and B in the cavity over B0; outer a, inner b in skin depths. */
export function hollowSphere(
  aOverDelta: number,
  bOverDelta: number,
  mur: number,
): { readonly alpha: Complex; readonly cavity: Complex } {
  const za = complex(aOverDelta, aOverDelta);
  const zb = complex(bOverDelta, bOverDelta);
  const ib = rising(zb);
  const kb = falling(zb);
  // Cavity: A = B r/2, d(rA)/dr = 2A; so curl = 2 µr value at b.
  const c = sub(scale(kb.value, 2 * mur), kb.curl);
  const d = sub(ib.curl, scale(ib.value, 2 * mur));
  const fall = exp(sub(zb, za));
  const fall2 = mul(fall, fall);
  const ia = rising(za);
  const ka = falling(za);
  const wall = {
    value: add(mul(c, ia.value), mul(mul(d, fall2), ka.value)),
    curl: add(mul(c, ia.curl), mul(mul(d, fall2), ka.curl)),
  };
  const alpha = dipole(wall, mur);
  const atBore = add(mul(c, ib.value), mul(d, kb.value));
  const outside = scale(add(complex(1), alpha), aOverDelta);
  const cavity = scale(mul(mul(fall, div(atBore, wall.value)), outside), 1 / bOverDelta);
  return { alpha, cavity };
}
