/** The few figures asked for first, beside the button, so that they are in sight without scrolling. */
import { figure, percent } from "../../../api/format/figures.ts";
import type { Result } from "../../../meshes/result.ts";

export function KeyFigures({ result: { empty, loaded, power } }: { readonly result: Result }) {
  const { resistanceOhm, inductanceH, q } = loaded ?? empty;
  const heated = loaded !== null && power.heatedW.value > 0;
  return (
    <p class="key-figures">
      {loaded === null ? "Empty" : "Loaded"}: R {figure(resistanceOhm, "Ω")}, L {figure(inductanceH, "H")}, Q{" "}
      {figure(q, "")}
      {heated && `; ${percent(power.efficiency.value)} of the power into heated parts`}
    </p>
  );
}
