/** The figures as a winder notes them: empty beside loaded, each with its ±; nothing finer than its ± allows. */
import { plain } from "../../../api/format/figures.ts";
import type { Result } from "../../../meshes/result.ts";
import { Bench, Stray } from "./bench.tsx";
import { Cautions } from "./cautions.tsx";
import { PartHeat } from "./part-heat.tsx";
import { Powers } from "./powers.tsx";
import { Terminals } from "./terminals.tsx";
import { Turns } from "./turns.tsx";
import "./reading.css";

export function Reading({ result }: { readonly result: Result }) {
  const { design, loaded, numerics, parts, strayField } = result;
  // What is said of one part begins with its name, and stands with it.
  const ofPart = (name: string): string[] => result.cautions.filter((text) => text.startsWith(`${name}: `));
  const general = result.cautions.filter((text) => !parts.some(({ name }) => text.startsWith(`${name}: `)));
  return (
    <article class="reading" aria-label="Reading">
      {!numerics.accuracyMet && <Short asked={design.accuracyPercent} />}
      <Terminals empty={result.empty} loaded={loaded} />
      {loaded === null && (
        <p>No part in the coil: there is no loaded column, and all power is the coil's own.</p>
      )}
      <Powers power={result.power} bare={parts.length === 0} />
      <Cautions cautions={general} />
      {parts.map((part, k) => (
        <PartHeat key={k} part={part} shape={design.parts[k]} cautions={ofPart(part.name)} />
      ))}
      <Turns turns={result.turns} />
      {strayField.length > 0 && <Stray points={strayField} />}
      <Bench copper={result.copper} leads={result.leads} />
      <Numerics result={result} />
      <p class="reading-small">
        Calculated, not measured. Follow local codes; have a qualified person check voltages, fields and
        cooling.
      </p>
    </article>
  );
}

/** What is told before any figure. */
function Short({ asked }: { readonly asked: number }) {
  return (
    <p class="reading-short" role="alert">
      <strong>The asked {plain(asked, 3)} % was not reached.</strong> The figures stand, but only as well as
      the ± beside each says.
    </p>
  );
}

/** How the figures came about, for who wants to know how far to trust them. */
function Numerics({ result: { numerics: n, design } }: { readonly result: Result }) {
  const asked = `${plain(design.accuracyPercent, 3)} %`;
  return (
    <p class="reading-small">
      Each ± should hold in at least 95 of 100 designs; the asked {asked}{" "}
      {n.accuracyMet ? "holds" : "was not reached"}. {n.unknowns} unknowns on the finest of {n.grids} grids,
      solved in {n.seconds.toFixed(1)} s.
    </p>
  );
}
