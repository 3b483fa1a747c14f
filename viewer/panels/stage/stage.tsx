/** The large picture: the drawing of what stands in the blanks, or the heat of what was solved. */
import { useSignalEffect } from "@preact/signals";
import { useRef } from "preact/hooks";
import { answer, asSolved } from "../../jobs.ts";
import { type View, view } from "../../state.ts";
import { Heat } from "../heat/heat.tsx";
import { HalfSection } from "../section/half-section.tsx";
import "./stage.css";

const views: readonly (readonly [View, string])[] = [
  ["drawing", "Drawing"],
  ["solid", "Heat, cut away"],
  ["flat", "Heat, flat"],
];

export function Stage() {
  useFittingView();
  return (
    <section class="stage" aria-label="Drawing and heat">
      <fieldset class="views">
        <legend class="unseen">What to show</legend>
        {views.map(([name, words]) => (
          <label key={name}>
            <input
              type="radio"
              name="view"
              checked={view.value === name}
              onChange={() => {
                view.value = name;
              }}
            />
            {words}
          </label>
        ))}
      </fieldset>
      <div class="picture">
        <Picture />
      </div>
    </section>
  );
}

function Picture() {
  const shown = view.value;
  if (shown === "drawing") return <HalfSection />;
  const solved = answer.value;
  if (solved === null) {
    return <p class="nothing">No heat to look at yet: it will be drawn here when the design is solved.</p>;
  }
  return <Heat answer={solved} as={shown} onFlat={() => showFlat()} />;
}

function showFlat(): void {
  view.value = "flat";
}

/** Turns to the heat when an answer arrives, and back to the drawing when the blanks are changed. */
function useFittingView(): void {
  const heatView = useRef<View>("solid");
  const seen = useRef<string | null>(null);
  const wasSolved = useRef(false);
  useSignalEffect(() => {
    if (view.value !== "drawing") heatView.current = view.value;
  });
  useSignalEffect(() => {
    const id = answer.value?.id ?? null;
    if (id !== null && id !== seen.current) view.value = heatView.current;
    seen.current = id;
  });
  useSignalEffect(() => {
    const now = asSolved.value;
    if (wasSolved.current && !now) view.value = "drawing";
    wasSolved.current = now;
  });
}
