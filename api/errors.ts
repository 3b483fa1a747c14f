/**
 * The one mapper from anything thrown to what the doors say: a problem document (RFC 9457), an exit status, and words.
 * No door formats errors itself, and no stack trace ever leaves here.
 */
import type { Fault } from "../meshes/refusal.ts";
import { Refusal } from "../meshes/refusal.ts";
import type { Problem } from "./contract/problem.ts";

/** Exit statuses of the command line (contract section 4). */
export const exitStatus = { done: 0, failed: 1, refused: 2, shortOfAccuracy: 3 } as const;

/** What went wrong, said for every door. Plain data: it crosses thread boundaries unchanged. */
export interface Failure {
  readonly problem: Problem;
  readonly exit: 1 | 2;
  /** For people, several lines, no line break at the end. */
  readonly words: string;
}

/** An error that has already been mapped, on the other side of a thread boundary. */
export class MappedError extends Error {
  override readonly name = "MappedError";
  readonly failure: Failure;

  constructor(failure: Failure) {
    super(failure.problem.detail);
    this.failure = failure;
  }
}

/** A command line that says something we do not understand. */
export class UsageError extends Error {
  override readonly name = "UsageError";
}

/** What a door turns down or cannot do, in its own words: no document is to blame. */
export class DoorError extends Error {
  override readonly name = "DoorError";
  /** Last piece of the problem's type. */
  readonly code: string;
  readonly title: string;
  /** The HTTP status. */
  readonly status: number;
  /** Response headers that belong to it, e.g. Allow. */
  readonly headers: Readonly<Record<string, string>>;

  constructor(status: number, code: string, title: string, detail: string, headers = {}) {
    super(detail);
    this.status = status;
    this.code = code;
    this.title = title;
    this.headers = headers;
  }
}

/** Why the service could not start, in words. */
export const notStarted = (detail: string): DoorError =>
  new DoorError(500, "start", "The service could not start", detail);

/** Errors of Node that mean "no memory left" rather than a mistake of ours. */
const memoryCodes = new Set(["ERR_WORKER_OUT_OF_MEMORY", "ERR_MEMORY_ALLOCATION_FAILED"]);

/** Maps anything thrown. */
export function toFailure(error: unknown): Failure {
  if (error instanceof MappedError) return error.failure;
  if (error instanceof Refusal) return refused(error);
  if (error instanceof UsageError) return misused(error);
  if (error instanceof DoorError) return failed(error.code, error.title, error.message, error.status);
  if (outOfMemory(error)) {
    return failed(
      "memory",
      "Not enough memory",
      "There is not enough memory for this design at the asked accuracy. A larger accuracyPercent needs less.",
    );
  }
  if (error instanceof Error && error.name === "SolverError" && "code" in error) {
    return failed(String(error.code), "The design could not be solved", error.message);
  }
  const reason = error instanceof Error ? error.message : String(error);
  return failed(
    "internal",
    "Something went wrong inside emberturn",
    `This is our fault, not the design's: ${reason}`,
  );
}

function misused({ message }: UsageError): Failure {
  const title = "The command line is not understood";
  const problem = { type: "urn:emberturn:problem:usage", title, status: 400, detail: message, errors: [] };
  return { problem, exit: exitStatus.refused, words: `${title}: ${message}\nSee emberturn --help.` };
}

function outOfMemory(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const code = "code" in error ? String(error.code) : "";
  return (
    memoryCodes.has(code) ||
    (error instanceof RangeError && /allocation failed|array length/i.test(error.message))
  );
}

function refused(refusal: Refusal): Failure {
  const unparsable = refusal.status === "unparsable";
  const title = unparsable ? "The document cannot be read" : "The design cannot be solved as it stands";
  const count = refusal.faults.length;
  const problem = {
    type: `urn:emberturn:problem:${refusal.status}`,
    title,
    status: unparsable ? 400 : 422,
    detail: count === 1 ? refusal.faults[0]!.detail : `${count} faults, listed in errors`,
    errors: [...refusal.faults],
  };
  return {
    problem,
    exit: exitStatus.refused,
    words: [`${title}:`, ...refusal.faults.map(faultLine)].join("\n"),
  };
}

/** One fault for people: where, what, and what would do instead. */
function faultLine(fault: Fault): string {
  const where = fault.pointer === "" ? "" : `${fault.pointer}: `;
  const instead = fault.accepted === undefined ? "" : ` (accepted: ${fault.accepted})`;
  return `  ${where}${fault.detail}${instead}`;
}

function failed(code: string, title: string, detail: string, status = 500): Failure {
  const problem = { type: `urn:emberturn:problem:${code}`, title, status, detail, errors: [] };
  return { problem, exit: exitStatus.failed, words: `${title}: ${detail}` };
}
