/** Where to start from: a design solved before, or one of the examples. */
import type { Job, JobState } from "../../../api/contract/job.ts";
import { fragmentOf, job, shelf } from "../../jobs.ts";
import { draft } from "../../state.ts";
import "./shelf.css";

const examples = import.meta.glob<{ default: unknown }>("../../../meshes/examples/*.json");

/** "../../../meshes/examples/pan-base.json" as "pan base". */
const nameOf = (path: string): string =>
  path.slice(path.lastIndexOf("/") + 1, -".json".length).replaceAll("-", " ");

export function Shelf() {
  return (
    <nav class="shelf" aria-label="Designs">
      <Examples />
      <Solved />
    </nav>
  );
}

function Examples() {
  const take = async (path: string): Promise<void> => {
    const found = await examples[path]?.();
    if (found !== undefined) draft.value = found.default;
  };
  return (
    <label>
      Start from{" "}
      <select
        value=""
        onChange={(event) => {
          void take(event.currentTarget.value);
          event.currentTarget.value = "";
        }}
      >
        <option value="">an example …</option>
        {Object.keys(examples).map((path) => (
          <option key={path} value={path}>
            {nameOf(path)}
          </option>
        ))}
      </select>
    </label>
  );
}

const stateWords: Record<JobState, string> = {
  queued: "waiting",
  running: "at work",
  done: "",
  failed: "failed",
  cancelled: "cancelled",
};

function Solved() {
  const jobs = shelf.value;
  return (
    <details class="solved">
      <summary>Solved before ({jobs.length})</summary>
      {jobs.length === 0 ? (
        <p>Nothing yet. What you solve is kept here.</p>
      ) : (
        <ol>
          {jobs.map((each) => (
            <SolvedItem key={each.id} item={each} />
          ))}
        </ol>
      )}
    </details>
  );
}

function SolvedItem({ item }: { item: Job }) {
  const when = new Date(item.createdAt).toLocaleString([], { dateStyle: "medium", timeStyle: "short" });
  const words = [when, stateWords[item.state]].filter((word) => word !== "").join(", ");
  return (
    <li>
      <a href={fragmentOf(item.id)} aria-current={item.id === job.value?.id ? "true" : undefined}>
        {item.name}
      </a>{" "}
      <span class="when">{words}</span>
    </li>
  );
}
