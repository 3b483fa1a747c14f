/** One button, one quiet line of progress, cancel; and in words what stands in the way. */
import { ended, type Job } from "../../../api/contract/job.ts";
import type { Problem } from "../../../api/contract/problem.ts";
import { answer, asItWas, asking, asSolved, cancel, job, problem, reachable, solve } from "../../jobs.ts";
import { faults } from "../../state.ts";
import { FirstDigits } from "./first-digits.tsx";
import { KeyFigures } from "./key-figures.tsx";
import "./solve-line.css";

export function SolveLine() {
  const inView = job.value;
  const busy = asking.value || (inView !== null && !ended(inView.state));
  return (
    <section class="solve" aria-label="Solve">
      <div class="solve-row">
        {busy ? <Working job={inView} /> : <SolveButton />}
        <Standing />
      </div>
      {problem.value !== null && <Trouble problem={problem.value} />}
      {!busy && inView?.state === "failed" && inView.problem !== null && <Trouble problem={inView.problem} />}
    </section>
  );
}

function SolveButton() {
  const count = faults.value.length;
  const blocked = count > 0 || reachable.value === false;
  return (
    <button type="button" class="primary" disabled={blocked} onClick={() => void solve()}>
      Solve
    </button>
  );
}

/** How the work stands, and the way to stop it. */
function Working({ job: working }: { job: Job | null }) {
  const stage = working === null || working.state === "queued" ? "waiting for its turn" : working.stage;
  return (
    <>
      <button
        type="button"
        class="secondary"
        disabled={working === null || asking.value}
        onClick={() => void cancel()}
      >
        Cancel
      </button>
      <progress aria-label="Progress of the solve" max={1} value={working?.progress ?? 0} />
      <output class="solve-stage" aria-live="polite">
        {stage}
      </output>
      {working?.firstDigits != null && <FirstDigits digits={working.firstDigits} />}
    </>
  );
}

/** What the button's neighbourhood has to say while nothing is at work. */
function Standing() {
  const inView = job.value;
  if (asking.value || (inView !== null && !ended(inView.state))) return null;
  const count = faults.value.length;
  if (count > 0) {
    const many = count === 1 ? "One blank is" : `${count} things are`;
    return <p class="standing refused">{many} refused; the words stand beneath.</p>;
  }
  if (inView?.state === "cancelled") return <p class="standing">Cancelled. Nothing of it was kept.</p>;
  if (inView?.state === "failed") return null;
  if (answer.value === null) return <p class="standing">Nothing solved yet.</p>;
  return asSolved.value ? (
    <div class="standing">
      <KeyFigures result={answer.value.result} />
      <p>The figures below belong to this design.</p>
    </div>
  ) : (
    <p class="standing changed">
      The blanks have changed since the figures below were worked out.{" "}
      <button type="button" class="plain" onClick={asItWas}>
        put the solved design back
      </button>
    </p>
  );
}

/** A problem in words, with its faults where it lists any. */
function Trouble({ problem: { title, detail, errors } }: { problem: Problem }) {
  return (
    <div class="trouble" role="alert">
      <strong>{title}.</strong> {detail}
      {errors.length > 0 && (
        <ul>
          {errors.map((fault) => (
            <li key={`${fault.pointer} ${fault.detail}`}>
              {fault.detail}
              {fault.accepted !== undefined && <> (accepted: {fault.accepted})</>}
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
