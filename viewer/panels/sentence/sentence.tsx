/** The design as a short text whose blanks are the inputs, bound to the draft; every refusal stands where it belongs. */
import { draft, faults } from "../../state.ts";
import { FaultList } from "./fault-list.tsx";
import { placeFaults } from "./fault-places.ts";
import { SentenceLine } from "./line.tsx";
import { linesOf } from "./lines.ts";
import "./sentence.css";

export function Sentence() {
  const lines = linesOf(draft.value);
  const places = placeFaults(faults.value, lines);
  return (
    <section class="sentence" aria-label="Design">
      {lines.map((line) => (
        <SentenceLine key={line.at} line={line} places={places} />
      ))}
      <FaultList groups={places.rest.length === 0 ? [] : [["", places.rest]]} />
    </section>
  );
}
