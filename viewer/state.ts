/**
 * What the page knows, as signals. The draft is the design document as it stands in the blanks, fit or not; what it is found
 * to be follows from it by the very schema the service uses. Jobs and results come from the service (jobs.ts).
 */
import { computed, signal } from "@preact/signals";
import { type Checked, checkDesign } from "../meshes/check.ts";
import demo from "../meshes/examples/demo.json";
import { type Fault, Refusal } from "../meshes/refusal.ts";
import { withValueAt } from "./pointer.ts";

/** The design document being written; what was typed and is no number stays there as text, and is refused at its place. */
export const draft = signal<unknown>(demo);

/** What the draft is found to be. */
export type Verdict =
  | { readonly fit: true; readonly checked: Checked }
  | { readonly fit: false; readonly faults: readonly Fault[] };

function judge(document: unknown): Verdict {
  try {
    return { fit: true, checked: checkDesign(document) };
  } catch (error) {
    if (error instanceof Refusal) return { fit: false, faults: error.faults };
    throw error;
  }
}

export const verdict = computed(() => judge(draft.value));

/** All faults of the draft; none when it is fit. */
export const faults = computed(() => (verdict.value.fit ? [] : verdict.value.faults));

/** Writes one value of the draft; undefined takes the key away. */
export function write(pointer: string, value: unknown): void {
  draft.value = withValueAt(draft.value, pointer, value);
}

/** What the stage shows. */
export type View = "drawing" | "solid" | "flat";

export const view = signal<View>("drawing");
