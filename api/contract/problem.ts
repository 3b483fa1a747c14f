/** The wire form of what went wrong: an `application/problem+json` body (RFC 9457 section 3.1) with our `errors`. */
import * as z from "zod";

/** One fault of a document: where (JSON Pointer, RFC 6901), what, and what would be accepted there. */
const FaultSchema = z.object({
  pointer: z.string(),
  detail: z.string(),
  accepted: z.string().optional(),
});

export const ProblemSchema = z.object({
  type: z.string(),
  title: z.string(),
  /** The HTTP status. */
  status: z.int(),
  detail: z.string(),
  /** One entry a fault; empty when no document is to blame. */
  errors: z.array(FaultSchema),
});

export type Problem = z.infer<typeof ProblemSchema>;
