/** `npm run validate -- --make-truth [id …]`: solves for every truth that is missing or belongs to an older design, one at a time, at lowest priority. */
import { constants, setPriority } from "node:os";
import { BATTERY, type Entry } from "./designs/index.ts";
import { readTruths, writeTruths } from "./store.ts";
import { documentText, truthOf } from "./truth.ts";

/** Ids of designs to make anew whatever is stored; none = only what is missing. Returns the number of failures. */
export function makeTruths(ids: readonly string[]): number {
  setPriority(constants.priority.PRIORITY_LOW);
  const truths = readTruths();
  const wanted = (e: Entry): boolean =>
    ids.length > 0 ? ids.includes(e.id) : truths.get(e.id)?.design !== documentText(e);
  let failures = 0;
  for (const entry of BATTERY.filter(wanted)) {
    const started = performance.now();
    try {
      const truth = truthOf(entry);
      truths.set(entry.id, truth);
      writeTruths(truths);
      const seconds = ((performance.now() - started) / 1000).toFixed(1);
      process.stderr.write(`${entry.id}: level ${truth.level}, ${truth.unknowns} unknowns, ${seconds} s\n`);
    } catch (error) {
      failures++;
      process.stderr.write(`${entry.id}: failed: ${error instanceof Error ? error.message : error}\n`);
    }
  }
  return failures;
}
