/**
 * Adaptive Gauss–Kronrod quadrature (7 and 15 points) of complex functions of a real variable.
 * Nodes and weights: R. Piessens et al., QUADPACK (1983). A panel is halved until its two values agree.
 */
import type { Complex } from "../../solver/index.ts";
import { abs, add, complex, scale, sub } from "./complex.ts";

const NODES = [
  0.9914553711208126, 0.9491079123427585, 0.8648644233597691, 0.7415311855993945, 0.5860872354676911,
  0.4058451513773972, 0.2077849550078985, 0,
];
const KRONROD = [
  0.0229353220105292, 0.0630920926299786, 0.1047900103222502, 0.1406532597159259, 0.1690047266392679,
  0.1903505780647854, 0.2044329400752989, 0.2094821410847278,
];
const GAUSS = [0.1294849661688697, 0.2797053914892767, 0.3818300505051189, 0.4179591836734694];

/** ∫ f over [a, b]; every panel's estimate differs by less than `tolerance` (absolute). */
export function integrate(
  f: (x: number) => Complex,
  a: number,
  b: number,
  tolerance: number,
  depth = 12,
): Complex {
  const middle = (a + b) / 2;
  const half = (b - a) / 2;
  let fine = complex(0);
  let coarse = complex(0);
  for (let i = 0; i < 8; i++) {
    const x = half * NODES[i]!;
    const value = i === 7 ? f(middle) : add(f(middle - x), f(middle + x));
    fine = add(fine, scale(value, KRONROD[i]!));
    if (i % 2 === 1) coarse = add(coarse, scale(value, GAUSS[(i - 1) / 2]!));
  }
  if (depth === 0 || half * abs(sub(fine, coarse)) < tolerance) return scale(fine, half);
  return add(integrate(f, a, middle, tolerance, depth - 1), integrate(f, middle, b, tolerance, depth - 1));
}

/** ∫ over consecutive panels of width `panel` from `from` to `to`: for integrands that oscillate at a known pace. */
export function integratePanels(
  f: (x: number) => Complex,
  from: number,
  to: number,
  panel: number,
  tolerance: number,
): Complex {
  const count = Math.max(1, Math.ceil((to - from) / panel));
  let sum = complex(0);
  for (let i = 0; i < count; i++) {
    const a = from + ((to - from) * i) / count;
    const b = from + ((to - from) * (i + 1)) / count;
    sum = add(sum, integrate(f, a, b, tolerance));
  }
  return sum;
}
