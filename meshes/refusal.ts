/**
 * How a document is turned down: which keys, in a coil winder's words, and what would have been taken instead.
 * The doors (command line, HTTP) translate this into their own form; nobody else formats refusals.
 */

/** One fault of a document. */
export interface Fault {
  /** JSON Pointer (RFC 6901) of the value at fault; "" is the whole document. */
  readonly pointer: string;
  /** What is wrong, with the numbers. */
  readonly detail: string;
  /** What would be accepted there, where something definite can be said. */
  readonly accepted?: string;
}

/** "unparsable": not JSON, or beyond what is read at all (HTTP 400). "refused": read, but not to be solved (HTTP 422). */
export type RefusalStatus = "unparsable" | "refused";

/** Thrown for every document that cannot be solved; carries at least one fault. */
export class Refusal extends Error {
  override readonly name = "Refusal";
  readonly status: RefusalStatus;
  readonly faults: readonly Fault[];

  constructor(status: RefusalStatus, faults: readonly Fault[]) {
    super(faults.map((f) => (f.pointer === "" ? f.detail : `${f.pointer}: ${f.detail}`)).join("\n"));
    this.status = status;
    this.faults = faults;
  }
}

/** Appends keys and indices to a JSON Pointer, escaped as RFC 6901 section 3 asks. */
export function pointerTo(base: string, ...keys: readonly PropertyKey[]): string {
  return base + keys.map((k) => `/${String(k).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("");
}
