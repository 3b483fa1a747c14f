/** What outlives a reload, in this browser alone: the blanks as they stand, with the job they were last seen beside. */
import { effect } from "@preact/signals";
import { job } from "./jobs.ts";
import { draft } from "./state.ts";

const place = "emberturn:draft";

interface Kept {
  readonly job: string | null;
  readonly draft: unknown;
}

/** The kept draft; null where there is none, or where this browser keeps nothing. */
export function keptDraft(): Kept | null {
  try {
    const text = localStorage.getItem(place);
    return text === null ? null : (JSON.parse(text) as Kept);
  } catch {
    return null;
  }
}

/** Keeps the draft from now on. */
export function keepDraft(): void {
  effect(() => {
    const kept: Kept = { job: job.value?.id ?? null, draft: draft.value };
    try {
      localStorage.setItem(place, JSON.stringify(kept));
    } catch {
      // A browser that keeps nothing, or is full: the page works without.
    }
  });
}
