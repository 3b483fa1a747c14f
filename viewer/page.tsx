/** The whole page in the winder's order: describe, solve, look, change. */
import { signal } from "@preact/signals";
import { answer, reachable } from "./jobs.ts";
import { Reading } from "./panels/reading/reading.tsx";
import { Sentence } from "./panels/sentence/sentence.tsx";
import { Shelf } from "./panels/shelf/shelf.tsx";
import { SolveLine } from "./panels/solve/solve-line.tsx";
import { Stage } from "./panels/stage/stage.tsx";

/** How much of the page stands: the describing, then the picture, then the reading. */
export const unfolded = signal<0 | 1 | 2 | 3>(0);

export function Page() {
  const pieces = unfolded.value;
  return (
    <>
      <header class="masthead">
        <h1>emberturn</h1>
        <Shelf />
      </header>
      {reachable.value === false && <Gone />}
      <main>
        {pieces === 0 && <p class="nothing">Opening …</p>}
        {pieces >= 1 && (
          <section class="describe" aria-label="Describe the design">
            <Sentence />
          </section>
        )}
        {pieces >= 1 && <SolveLine />}
        {pieces >= 2 && <Stage />}
        {pieces >= 3 && <Look />}
      </main>
      <footer>
        Calculated, not measured. Follow local codes; have a qualified person check voltages, fields and
        cooling.
      </footer>
    </>
  );
}

function Look() {
  return (
    <section class="look" aria-label="What the coil will measure">
      {answer.value === null ? <NothingYet /> : <Reading result={answer.value.result} />}
    </section>
  );
}

/** The service does not answer. */
function Gone() {
  return (
    <p class="gone" role="alert">
      <strong>The service does not answer.</strong> Start it again with <code>npm start</code> and this page
      finds it by itself. What stands in the blanks is kept in this browser, and accepted work goes on when
      the service is back.
    </p>
  );
}

function NothingYet() {
  return (
    <p class="nothing">
      Here R, L, Q, powers and the heat of the part will stand, empty beside loaded, each with its ±. Press
      Solve.
    </p>
  );
}
