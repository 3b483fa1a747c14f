/** The heat of an answer: what is shown in a sentence, the colours, and the picture, cut away or flat. */
import { useMemo } from "preact/hooks";
import { scaleFor } from "../../../api/format/heat-scale.ts";
import type { Result } from "../../../meshes/result.ts";
import type { Heat as Cells } from "../../heat.ts";
import { HeatFlat } from "./heat-flat.tsx";
import { HeatSolid } from "./heat-solid.tsx";
import { Legend } from "./legend.tsx";

export interface HeatProps {
  readonly answer: { readonly result: Result; readonly heat: Cells };
  readonly as: "solid" | "flat";
  /** Turns the whole view to the flat map. */
  readonly onFlat: () => void;
}

export function Heat({ answer: { result, heat }, as, onFlat }: HeatProps) {
  const scale = useMemo(() => scaleFor(heat), [heat]);
  return (
    <div class="heat">
      <Legend scale={scale} result={result} />
      {as === "flat" ? (
        <HeatFlat heat={heat} scale={scale} />
      ) : (
        <HeatSolid heat={heat} scale={scale} onFlat={onFlat} />
      )}
    </div>
  );
}
