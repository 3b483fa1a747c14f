/**
 * Modified Bessel functions of integer order and complex argument, Re z ≥ 0, scaled so that nothing overflows:
 *   besselI(n, z) = e^(−z) I_n(z),  besselK(n, z) = e^z K_n(z);  J_n follows by J_n(z) = jⁿ I_n(−jz).
 *
 * |z| < 40: I_n by downward recurrence I_{m−1} = I_{m+1} + (2m/z) I_m, normed by e^z = I_0 + 2 Σ I_m (NIST DLMF 10.35.5; no
 * cancellation where Re z ≥ 0). Beyond: Hankel's asymptotic series (DLMF 10.40.5), both exponentials, error below 1e-15.
 * K_n (|arg z| ≤ π/4): trapezoidal rule for ∫ exp(−z (cosh t − 1)) cosh nt dt (DLMF 10.32.9), which converges like e^(−4.9/h).
 */
import type { Complex } from "../../solver/index.ts";
import { abs, add, complex, div, exp, mul, scale, sqrt } from "./complex.ts";

const ASYMPTOTIC_FROM = 40;

/** e^(−z) I_n(z), Re z ≥ 0. */
export function besselI(n: number, z: Complex): Complex {
  if (abs(z) === 0) return complex(n === 0 ? 1 : 0);
  if (abs(z) >= ASYMPTOTIC_FROM) return asymptoticI(n, z);
  const start = n + 30 + Math.ceil(1.6 * abs(z));
  let upper = complex(0);
  let here = complex(1e-100);
  let sum = complex(0);
  let wanted = complex(0);
  for (let m = start; m >= 0; m--) {
    if (m === n) wanted = here;
    sum = add(sum, scale(here, m === 0 ? 1 : 2));
    if (m === 0) break;
    const lower = add(upper, scale(div(here, z), 2 * m));
    upper = here;
    here = lower;
    // Small arguments climb steeply: pull all running values back before they overflow.
    if (abs(here) > 1e100) {
      upper = scale(upper, 1e-150);
      here = scale(here, 1e-150);
      sum = scale(sum, 1e-150);
      wanted = scale(wanted, 1e-150);
    }
  }
  return div(wanted, sum);
}

function asymptoticI(n: number, z: Complex): Complex {
  const rising = hankelSum(n, z, -1);
  const falling = hankelSum(n, z, 1);
  const sign = (z.im >= 0 ? 1 : -1) * (n % 2 === 0 ? 1 : -1);
  const decayed = mul(mul(exp(scale(z, -2)), falling), complex(0, sign));
  return div(add(rising, decayed), sqrt(scale(z, 2 * Math.PI)));
}

/** Σ sign^k a_k(n) / z^k, stopped at its smallest term. */
function hankelSum(n: number, z: Complex, sign: 1 | -1): Complex {
  let term = complex(1);
  let sum = term;
  for (let k = 1; k < 80; k++) {
    const factor = (sign * (4 * n * n - (2 * k - 1) ** 2)) / (8 * k);
    const next = div(scale(term, factor), z);
    if (abs(next) >= abs(term) || abs(next) < 1e-17) break;
    term = next;
    sum = add(sum, term);
  }
  return sum;
}

/** e^z K_n(z), |arg z| ≤ π/4. */
export function besselK(n: number, z: Complex): Complex {
  const step = Math.min(0.08, 0.5 / Math.sqrt(abs(z)));
  let sum = complex(0.5);
  for (let i = 1; i < 4000; i++) {
    const t = i * step;
    const fall = 2 * Math.sinh(t / 2) ** 2;
    if (z.re * fall - n * t > 40) break;
    sum = add(sum, scale(exp(scale(z, -fall)), Math.cosh(n * t)));
  }
  return scale(sum, step);
}

/** J_n(z) unscaled, |Im z| up to about 600. */
export function besselJ(n: number, z: Complex): Complex {
  // I_n wants Re ≥ 0: −jz where Im z ≥ 0, else the mirror image jz.
  const down = z.im >= 0;
  const w = down ? complex(z.im, -z.re) : complex(-z.im, z.re);
  const value = mul(exp(w), besselI(n, w));
  const turns = down ? n : -n;
  return mul(value, quarterTurns(turns));
}

/** j^n. */
function quarterTurns(n: number): Complex {
  const k = ((n % 4) + 4) % 4;
  return [complex(1), complex(0, 1), complex(-1), complex(0, -1)][k]!;
}

/**
 * ∫0^x t J1(t) dt = 2 Σ J_(2k+1)(x) − x J0(x) for real x ≥ 0 (NIST DLMF 10.22.1 and 10.22.9), all J_n by one downward
 * recurrence normed by J0 + 2 Σ J_(2k) = 1.
 */
export function integralTJ1(x: number): number {
  if (x < 0.02) return (x ** 3 / 6) * (1 - (x * x * 3) / 40);
  const start = 2 * Math.ceil((1.2 * x + 40) / 2);
  let upper = 0;
  let here = 1e-100;
  let even = 0;
  let odd = 0;
  for (let m = start; m > 0; m--) {
    if (m % 2 === 0) even += 2 * here;
    else odd += 2 * here;
    const lower = ((2 * m) / x) * here - upper;
    upper = here;
    here = lower;
    if (Math.abs(here) > 1e100) {
      upper *= 1e-150;
      here *= 1e-150;
      even *= 1e-150;
      odd *= 1e-150;
    }
  }
  return (odd - x * here) / (even + here);
}
