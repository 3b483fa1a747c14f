/** What all routes have in common: which methods and types they take, and how anything thrown is told. */
import type { ErrorRequestHandler, Request, RequestHandler, Response, Router } from "express";
import { DoorError, toFailure } from "../errors.ts";

type Method = "get" | "post" | "delete";
export type Handler = (request: Request, response: Response) => void | Promise<void>;

/** Puts the handlers of one path in place; every other method is told which ones there are. */
export function door(router: Router, path: string, handlers: Partial<Record<Method, Handler>>): void {
  const route = router.route(path);
  const methods = Object.keys(handlers) as Method[];
  for (const method of methods) route[method](settled(handlers[method]!));
  const allowed = methods
    .flatMap((method) => (method === "get" ? ["GET", "HEAD"] : [method.toUpperCase()]))
    .join(", ");
  route.all((request) => {
    throw new DoorError(
      405,
      "method",
      "The method is not known here",
      `${request.method} is not known at this address; accepted: ${allowed}.`,
      { Allow: allowed },
    );
  });
}

/** A handler whose rejection goes where everything thrown goes. */
function settled(handler: Handler): RequestHandler {
  return (request, response, next) => {
    Promise.resolve()
      .then(() => handler(request, response))
      .catch(next);
  };
}

/** @throws DoorError 406 when the client takes none of `types`; else the one it likes best */
export function accepted(request: Request, types: readonly string[]): string {
  const type = request.accepts([...types]);
  if (type !== false) return type;
  throw new DoorError(
    406,
    "not-acceptable",
    "No such form",
    `This is not to be had as ${request.get("accept")}; accepted: ${types.join(", ")}.`,
  );
}

/** Sends a JSON text as it is. */
export function sendJson(request: Request, response: Response, text: string): void {
  accepted(request, ["application/json"]);
  response.type("application/json").send(text);
}

/** The last of all handlers: nothing else was at this address. */
export const nothingHere: RequestHandler = (request) => {
  throw new DoorError(404, "nowhere", "There is nothing at this address", `${request.path} leads nowhere.`);
};

/** Tells whatever was thrown as a problem document. */
export function problemHandler(log: (error: unknown) => void): ErrorRequestHandler {
  // Express knows an error handler by its four parameters.
  return (error: unknown, _request, response, _next) => {
    const told = fromFramework(error) ?? error;
    const { problem } = toFailure(told);
    if (problem.status >= 500 && !(told instanceof DoorError)) log(error);
    if (response.headersSent) {
      response.destroy();
      return;
    }
    if (told instanceof DoorError) response.set(told.headers);
    response.status(problem.status).type("application/problem+json").send(JSON.stringify(problem));
  };
}

/** What the framework itself turns down: an address that cannot be decoded, a range that is not there. */
function fromFramework(error: unknown): DoorError | null {
  if (!(error instanceof Error) || error instanceof DoorError || !("status" in error)) return null;
  const status = Number(error.status);
  if (!(status >= 400 && status < 500)) return null;
  return new DoorError(status, "request", "The request is not understood", error.message);
}
