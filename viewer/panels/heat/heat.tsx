/** The heat of an answer: what is shown in a sentence, the colours, and the picture, cut away or flat. */
import { useEffect, useState } from "preact/hooks";
import { type HeatScale, scaleFor } from "../../../api/format/heat-scale.ts";
import type { Result } from "../../../meshes/result.ts";
import type { Heat as Cells } from "../../heat.ts";
import { HeatFlat } from "./heat-flat.tsx";
import { HeatSolid } from "./heat-solid.tsx";
import { Legend } from "./legend.tsx";

interface HeatAnswer {
  readonly result: Result;
  readonly heat: Cells;
}

export interface HeatProps {
  readonly answer: HeatAnswer;
  readonly as: "solid" | "flat";
  /** Turns the whole view to the flat map. */
  readonly onFlat: () => void;
}

/** An answer with its colours. */
interface Coloured extends HeatAnswer {
  readonly scale: HeatScale | null;
}

export function Heat({ answer, as, onFlat }: HeatProps) {
  const shown = useColoured(answer);
  if (shown === null) return <p class="heat-waiting">Colouring the heat …</p>;
  const { heat, scale, result } = shown;
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

/** The answer with its colours, worked out in a task of its own; until then the one before stays, view and all. */
function useColoured(answer: HeatAnswer): Coloured | null {
  const [shown, setShown] = useState<Coloured | null>(null);
  useEffect(() => {
    const { heat, result } = answer;
    const soon = setTimeout(() => setShown({ heat, result, scale: scaleFor(heat) }));
    return () => clearTimeout(soon);
  }, [answer]);
  return shown;
}
