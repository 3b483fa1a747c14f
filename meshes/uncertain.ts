/** Numbers with half-widths, and how these add up. Sums take the sum: errors of one grid are not independent. */
import type { Uncertain } from "./result.ts";

export type { Uncertain };

export const sure = (value: number): Uncertain => ({ value, plusMinus: 0 });

/** Relative half-width; 0 of nothing is nothing. */
export function relative(u: Uncertain): number {
  return u.plusMinus === 0 ? 0 : u.plusMinus / Math.abs(u.value);
}

export function plus(a: Uncertain, b: Uncertain): Uncertain {
  return { value: a.value + b.value, plusMinus: a.plusMinus + b.plusMinus };
}

export function times(factor: number, u: Uncertain): Uncertain {
  return { value: factor * u.value, plusMinus: Math.abs(factor) * u.plusMinus };
}

export function product(a: Uncertain, b: Uncertain): Uncertain {
  return {
    value: a.value * b.value,
    plusMinus: Math.abs(a.value) * b.plusMinus + Math.abs(b.value) * a.plusMinus,
  };
}

/** a / b; 0 where both are 0. */
export function ratio(a: Uncertain, b: Uncertain): Uncertain {
  if (b.value === 0) return sure(0);
  const value = a.value / b.value;
  return { value, plusMinus: (a.plusMinus + Math.abs(value) * b.plusMinus) / Math.abs(b.value) };
}

/** √(a² + b²). */
export function magnitude(a: Uncertain, b: Uncertain): Uncertain {
  const value = Math.hypot(a.value, b.value);
  const moved = Math.abs(a.value) * a.plusMinus + Math.abs(b.value) * b.plusMinus;
  return { value, plusMinus: value === 0 ? 0 : moved / value };
}

/** √a, a ≥ 0. */
export function root(a: Uncertain): Uncertain {
  const value = Math.sqrt(a.value);
  return { value, plusMinus: value === 0 ? 0 : a.plusMinus / (2 * value) };
}
