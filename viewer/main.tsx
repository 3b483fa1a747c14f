/** The page's start. */
import { render } from "preact";
import { start } from "./jobs.ts";
import { keepDraft, keptDraft } from "./kept.ts";
import { Page } from "./page.tsx";

const kept = keptDraft();
render(<Page />, document.getElementById("page")!);
await start(kept);
keepDraft();
