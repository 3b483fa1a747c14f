/** Reads a request's body as text: JSON by its type, UTF-8, within the limit. */
import express, { type Request, type RequestHandler, type Response } from "express";
import { DoorError } from "../errors.ts";

const types = ["application/json", "application/*+json"];

/**
 * The body of a request as text.
 * @throws DoorError 415 for another type or coding, 413 beyond the limit, 400 for what is no text or breaks off
 */
export function bodyReader(limit: number): (request: Request, response: Response) => Promise<string> {
  const parse: RequestHandler = express.raw({ type: types, limit });
  return async (request, response) => {
    if (request.is(types) === false) throw wrongType(request.get("content-type") ?? "nothing");
    await new Promise<void>((resolve, reject) => {
      parse(request, response, (error?: unknown) => (error ? reject(told(error, limit)) : resolve()));
    });
    const body: unknown = request.body;
    if (!Buffer.isBuffer(body) || body.length === 0) throw unreadable("The request has no body.");
    try {
      return new TextDecoder("utf-8", { fatal: true }).decode(body);
    } catch {
      throw unreadable("The body is not UTF-8 text.");
    }
  };
}

function unreadable(detail: string): DoorError {
  return new DoorError(400, "unparsable", "The request cannot be read", detail);
}

function wrongType(type: string): DoorError {
  return new DoorError(
    415,
    "media-type",
    "The body's type is not known here",
    `The body is said to be ${type}; accepted: application/json.`,
    { "Accept-Post": "application/json" },
  );
}

function told(error: unknown, limit: number): unknown {
  const type = error instanceof Error && "type" in error ? error.type : undefined;
  if (type === "entity.too.large") {
    const detail = `The body is larger than ${limit / 1e6} MB, more than any document needs.`;
    return new DoorError(413, "too-large", "The body is too large", detail);
  }
  if (type === "encoding.unsupported") {
    const detail = "The body's Content-Encoding is not known here; accepted: gzip, deflate, br, or none.";
    return new DoorError(415, "coding", "The body's coding is not known here", detail);
  }
  // What else the reader finds (a body that breaks off, a broken compression) is the request's own fault.
  return unreadable(
    error instanceof Error ? `The body cannot be read: ${error.message}.` : "The body cannot be read.",
  );
}
