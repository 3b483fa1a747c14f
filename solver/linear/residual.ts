/** r = b − A x for A = Σ_e P_eᵀ A_e P_e, and the backward error max_i |r_i| / (|A| |x| + |b|)_i. */
import type { ComplexVector } from "../types.ts";
import type { ElementStructure, ElementValues } from "./structure.ts";

/** A residual and how large it is. */
export interface Residual {
  readonly r: ComplexVector;
  /**
   * max_i |r_i| / (Σ_e |A_e| |x| + |b|)_i: the componentwise relative change of A and b that makes x exact (Oettli & Prager,
   * Numer. Math. 6 (1964) 405, from memory), with |A| taken element by element. Free of units and of row scaling.
   * Moduli are |re| + |im|, within √2 of the true ones.
   */
  readonly error: number;
}

/** b − A x and its scaled size. */
export function residual(
  structure: ElementStructure,
  values: ElementValues,
  x: ComplexVector,
  b: ComplexVector,
): Residual {
  const n = structure.unknowns;
  const r = { re: b.re.slice(), im: b.im.slice() };
  const size = new Float64Array(n);
  const scale = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    size[i] = Math.abs(x.re[i]) + Math.abs(x.im[i]);
    scale[i] = Math.abs(b.re[i]) + Math.abs(b.im[i]);
  }
  subtractElements(structure, values, x, size, r, scale);
  let error = 0;
  for (let i = 0; i < n; i++) {
    const ri = Math.abs(r.re[i]) + Math.abs(r.im[i]);
    if (ri > error * scale[i]) error = ri / scale[i];
    if (!(ri < Infinity)) return { r, error: Infinity };
  }
  return { r, error };
}

/** r −= A x, scale += |A| size. One loop over the packed triangles. */
function subtractElements(
  structure: ElementStructure,
  values: ElementValues,
  x: ComplexVector,
  size: Float64Array,
  r: ComplexVector,
  scale: Float64Array,
): void {
  const { start, ids } = structure;
  const rr = r.re;
  const ri = r.im;
  let v = 0;
  for (let e = 0; e + 1 < start.length; e++) {
    for (let p = start[e]; p < start[e + 1]; p++) {
      const i = ids[p];
      for (let q = start[e]; q <= p; q++) {
        const j = ids[q];
        const ar = values.re[v];
        const ai = values.im[v++];
        const a = Math.abs(ar) + Math.abs(ai);
        rr[i] -= ar * x.re[j] - ai * x.im[j];
        ri[i] -= ar * x.im[j] + ai * x.re[j];
        scale[i] += a * size[j];
        if (q === p) continue;
        rr[j] -= ar * x.re[i] - ai * x.im[i];
        ri[j] -= ar * x.im[i] + ai * x.re[i];
        scale[j] += a * size[i];
      }
    }
  }
}
