/** What the bench needs besides: the stray field where it was asked for, the copper to cut, the leads. */
import { plain, plainFigure, prefixed } from "../../../api/format/figures.ts";
import type { Copper, LeadsResult, StrayField } from "../../../meshes/result.ts";
import { metresFromMm } from "../../../meshes/units.ts";
import { Figure } from "./figure.tsx";

export function Stray({ points }: { readonly points: readonly StrayField[] }) {
  const mm = (x: number): string => plain(x, 5).replace("-", "−");
  return (
    <section aria-label="Stray field">
      <h2>Stray field</h2>
      <table class="reading-grid">
        <caption>Flux density, rms</caption>
        <thead>
          <tr>
            <th scope="col">r, mm</th>
            <th scope="col">z, mm</th>
            <th scope="col">B</th>
          </tr>
        </thead>
        <tbody>
          {points.map(({ rMm, zMm, fluxDensityT }) => (
            <tr key={`${rMm} ${zMm}`}>
              <td>{mm(rMm)}</td>
              <td>{mm(zMm)}</td>
              <td>
                <Figure of={fluxDensityT} unit={prefixed("T", [fluxDensityT.value])} />
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

export interface BenchProps {
  readonly copper: Copper;
  readonly leads: LeadsResult | null;
}

export function Bench({ copper, leads }: BenchProps) {
  const helix = copper.helixExtraOhm !== 0 || copper.helixExtraH !== 0;
  return (
    <section aria-label="Copper and leads">
      <h2>Copper and leads</h2>
      <p>
        Copper to cut: <b>{plain(metresFromMm(copper.lengthMm), 4)} m</b>.{" "}
        {helix &&
          `The helix adds about ${plainFigure(copper.helixExtraOhm, "Ω", 2)} and ${plainFigure(copper.helixExtraH, "H", 2)} to closed rings (not added above). `}
        {leads === null
          ? "No leads in the design."
          : `Leads, counted in all figures above: ${plainFigure(leads.resistanceOhm, "Ω", 3)}, ${plainFigure(leads.inductanceH, "H", 3)}.`}
      </p>
    </section>
  );
}
