/** Text of a `POST /v1/jobs` → a job to store, or a refusal with every fault, its pointers counted from the document. */
import { createHash, randomUUID } from "node:crypto";
import type * as z from "zod";
import { checkDesign } from "../../meshes/check.ts";
import { readJson } from "../../meshes/json.ts";
import { type Fault, Refusal } from "../../meshes/refusal.ts";
import { carryKnownKeys, faultsFromIssues } from "../../meshes/words.ts";
import { JobRequestSchema } from "../contract/job.ts";
import { type Failure, toFailure } from "../errors.ts";
import type { Draft } from "../store/store.ts";

const documentPointer = "/document";

export interface RequestText {
  readonly text: string;
  /** Its Idempotency-Key, null without. */
  readonly clientKey: string | null;
}

/** Plain data, since it may come from another thread. */
export type Drafted = { readonly draft: Draft } | { readonly failure: Failure };

/** The job a request asks for, or why there is none. */
export function drafted(request: RequestText): Drafted {
  try {
    return { draft: draftOf(request) };
  } catch (error) {
    return { failure: toFailure(error) };
  }
}

/** @throws Refusal when the text, the request or the document is not fit */
function draftOf({ text, clientKey }: RequestText): Draft {
  const body = fromDocument(() => readJson(text));
  const request = JobRequestSchema.safeParse(body, { error: carryKnownKeys });
  if (!request.success) throw new Refusal("refused", requestFaults(request.error.issues, body));
  const { kind, document } = request.data;
  const { design } = checkDesign(document);
  return {
    id: randomUUID(),
    kind,
    name: design.name,
    document: JSON.stringify(design),
    clientKey,
    fingerprint: createHash("sha256").update(JSON.stringify({ kind, document })).digest("hex"),
  };
}

/** A document may be anything as far as the request goes, except missing: the schema's words for that are not a winder's. */
function requestFaults(issues: readonly z.core.$ZodIssue[], body: unknown): Fault[] {
  return faultsFromIssues(issues, body).map((fault) =>
    fault.pointer === documentPointer
      ? { pointer: fault.pointer, detail: "document is missing", accepted: "the design document" }
      : fault,
  );
}

/** Faults found while reading point into the request; where they point into the document, they are told from there. */
function fromDocument<T>(read: () => T): T {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    throw new Refusal(error.status, error.faults.map(inDocument));
  }
}

function inDocument(fault: Fault): Fault {
  const inside = fault.pointer.startsWith(`${documentPointer}/`);
  return inside ? { ...fault, pointer: fault.pointer.slice(documentPointer.length) } : fault;
}
