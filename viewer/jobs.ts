/** Jobs and answers of the service, as signals, and what the page can ask for. */
import { batch, computed, signal } from "@preact/signals";
import { decodeHeat } from "../api/contract/heat.ts";
import { ended, type Job } from "../api/contract/job.ts";
import type { Problem } from "../api/contract/problem.ts";
import type { Result } from "../meshes/result.ts";
import * as client from "./client.ts";
import { type Heat, heatOf } from "./heat.ts";
import { draft, verdict } from "./state.ts";

/** What was solved, and what came of it. */
export interface Answer {
  readonly id: string;
  readonly result: Result;
  readonly heat: Heat;
}

/** Whether the service answers; null before it was asked. */
export const reachable = signal<boolean | null>(null);
/** The newest jobs, newest first. */
export const shelf = signal<readonly Job[]>([]);
/** The job in view: waiting, at work, or ended. */
export const job = signal<Job | null>(null);
/** The latest answer in view; it stays while the next one is worked out. */
export const answer = signal<Answer | null>(null);
/** What went wrong with the last thing asked for, other than the job itself. */
export const problem = signal<Problem | null>(null);
/** From the press of the button until the service has accepted. */
export const asking = signal(false);

/** Whether the blanks still say what was solved. */
export const asSolved = computed(() => {
  const solved = answer.value?.result.design;
  const now = verdict.value;
  return solved !== undefined && now.fit && JSON.stringify(now.checked.design) === JSON.stringify(solved);
});

/** Does what needs the service; what goes wrong is told where it belongs. */
async function withService(action: () => Promise<void>): Promise<void> {
  problem.value = null;
  try {
    await action();
    reachable.value = true;
  } catch (error) {
    if (error instanceof client.Refused) problem.value = error.problem;
    else if (error instanceof client.Unreachable) lost();
    else problem.value = ownFault(error);
  }
}

/** What the page itself stumbled over, such as an answer of another version's: told, so that nothing hangs in silence. */
function ownFault(error: unknown): Problem {
  const detail = `${error instanceof Error ? error.message : String(error)} Reloading the page may help.`;
  return { type: "about:blank", title: "The page stumbled", status: 0, detail, errors: [] };
}

const retryMs = 1500;

/** Waits for the service to come back, then takes up what was in view. */
function lost(): void {
  if (reachable.value === false) return;
  reachable.value = false;
  const again = (): void => {
    void client.alive().then((there) => {
      if (!there) setTimeout(again, retryMs);
      else void withService(takeUp);
    });
  };
  setTimeout(again, retryMs);
}

async function takeUp(): Promise<void> {
  reachable.value = true;
  await refreshShelf();
  const inView = job.value;
  // One that ended just when the service went may not have been fetched yet.
  const missing = inView !== null && (!ended(inView.state) || answer.value?.id !== inView.id);
  if (missing) await follow(await client.jobOf(inView.id));
}

async function refreshShelf(): Promise<void> {
  shelf.value = await client.newest();
}

let stopListening: () => void = () => {};

/** Brings a job into view and goes with it to its end. */
async function follow(next: Job): Promise<void> {
  stopListening();
  job.value = next;
  if (ended(next.state)) return arrived(next);
  stopListening = client.listen(
    next.id,
    (heard) => {
      reachable.value = true;
      job.value = heard;
      if (ended(heard.state)) void withService(() => arrived(heard));
    },
    () => {
      // The browser takes the line up again by itself; only a service that is gone is told.
      void client.alive().then((there) => {
        if (!there) lost();
      });
    },
  );
}

async function arrived({ id, state }: Job): Promise<void> {
  const [loaded] = await Promise.all([state === "done" ? load(id) : null, refreshShelf()]);
  // Another job may have come into view meanwhile.
  if (loaded !== null && job.value?.id === id) answer.value = loaded;
}

async function load(id: string): Promise<Answer> {
  const [result, bytes] = await Promise.all([client.resultOf(id), client.heatBytesOf(id)]);
  return { id, result, heat: heatOf(decodeHeat(bytes)) };
}

/** Solves the draft as it stands; does nothing while it is refused. */
export async function solve(): Promise<void> {
  if (!verdict.value.fit || asking.value) return;
  const document = draft.value;
  asking.value = true;
  await withService(async () => {
    const accepted = await client.submit(document, crypto.randomUUID());
    location.hash = fragmentOf(accepted.id);
    await follow(accepted);
    await refreshShelf();
  });
  asking.value = false;
}

/** Stops the job in view. */
export function cancel(): Promise<void> {
  return withService(async () => {
    if (job.value !== null) await client.remove(job.value.id);
  });
}

/** Brings the design and the answer of a job into view. */
export function open(id: string): Promise<void> {
  return withService(async () => {
    const [found, document] = await Promise.all([client.jobOf(id), client.documentOf(id)]);
    batch(() => {
      draft.value = document;
      if (answer.value?.id !== id) answer.value = null;
    });
    await follow(found);
  });
}

/** Writes the solved design back into the blanks. */
export function asItWas(): void {
  if (answer.value !== null) draft.value = answer.value.result.design;
}

/** The address's fragment that names a job. */
export const fragmentOf = (id: string): string => `#job=${encodeURIComponent(id)}`;

function jobInAddress(): string | null {
  const match = /^#job=(.+)$/.exec(location.hash);
  return match?.[1] === undefined ? null : decodeURIComponent(match[1]);
}

/**
 * Starts the page: what the address names comes into view, else the newest answer there is. A draft kept from before goes
 * into the blanks where it was last seen beside that same job.
 */
export async function start(
  kept: { readonly job: string | null; readonly draft: unknown } | null,
): Promise<void> {
  addEventListener("hashchange", () => {
    const id = jobInAddress();
    if (id !== null && id !== job.value?.id) void open(id);
  });
  await withService(async () => {
    await refreshShelf();
    const id = jobInAddress() ?? shelf.value.find(({ state }) => state === "done" || !ended(state))?.id;
    if (id !== undefined) await open(id);
    if (kept !== null && kept.job === (id ?? null)) draft.value = kept.draft;
  });
}
