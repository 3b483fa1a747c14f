/** The page's start. */
import { render } from "preact";
import { start } from "./jobs.ts";
import { keepDraft, keptDraft } from "./kept.ts";
import { Page, unfolded } from "./page.tsx";
import { pause } from "./pause.ts";

const kept = keptDraft();
render(<Page />, document.getElementById("page")!);
await start(kept);
keepDraft();
// One piece a task: drawn all at once, the page would not answer for a moment.
for (const pieces of [1, 2, 3] as const) {
  await pause();
  unfolded.value = pieces;
}
