/** A value with its small ±. */
import { show, type Unit } from "../../../api/format/figures.ts";
import type { Uncertain } from "../../../meshes/result.ts";

export interface FigureProps {
  readonly of: Uncertain;
  readonly unit: Unit;
  /** Leaves the unit out, where a column or row says it. */
  readonly bare?: boolean;
}

export function Figure({ of, unit, bare = false }: FigureProps) {
  const { value, bar } = show(of, unit);
  return (
    <span class="figure">
      <span class="figure-value">{value.replace("-", "−")}</span>
      {bar !== "" && <small> ± {bar}</small>}
      {!bare && unit.symbol !== "" && <span class="figure-unit"> {unit.symbol}</span>}
    </span>
  );
}
