/** The whole page in the winder's order: describe, solve, look, change. */
import { answer, reachable } from "./jobs.ts";
import { Reading } from "./panels/reading/reading.tsx";
import { Sentence } from "./panels/sentence/sentence.tsx";
import { Shelf } from "./panels/shelf/shelf.tsx";
import { SolveLine } from "./panels/solve/solve-line.tsx";
import { Stage } from "./panels/stage/stage.tsx";

export function Page() {
  return (
    <>
      <header class="masthead">
        <h1>emberturn</h1>
        <Shelf />
      </header>
      {reachable.value === false && <Gone />}
      <main>
        <section class="describe" aria-label="Describe the design">
          <Sentence />
        </section>
        <SolveLine />
        <Stage />
        <section class="look" aria-label="What the coil will measure">
          {answer.value === null ? <NothingYet /> : <Reading result={answer.value.result} />}
        </section>
      </main>
      <footer>
        Calculated, not measured. Follow local codes; have a qualified person check voltages, fields and
        cooling.
      </footer>
    </>
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
