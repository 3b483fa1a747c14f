/** `/v1/jobs`: submit, list, look, cancel and remove, and what a job leaves behind. */
import { promisify } from "node:util";
import { gunzip } from "node:zlib";
import type { Request, Response, Router } from "express";
import * as z from "zod";
import { JobStateSchema } from "../contract/job.ts";
import { DoorError } from "../errors.ts";
import type { Page } from "../store/store.ts";
import { bodyReader } from "./body.ts";
import { accepted, door, sendJson } from "./door.ts";
import { streamEvents } from "./events.ts";
import { fieldRoutes } from "./fields.ts";
import type { Service } from "./service.ts";

const unzipped = promisify(gunzip);

export function jobRoutes(router: Router, service: Service): void {
  const { jobs } = service;
  const readBody = bodyReader(service.settings.bodyBytes);

  door(router, "/v1/jobs", {
    async get(request, response) {
      sendJson(request, response, JSON.stringify(await jobs.list(pageOf(request))));
    },
    async post(request, response) {
      accepted(request, ["application/json"]);
      const key = clientKey(request);
      const job = await jobs.submit(await readBody(request, response), key);
      response.status(202).location(`/v1/jobs/${job.id}`).json(job);
    },
  });
  door(router, "/v1/jobs/:id", {
    async get(request, response) {
      sendJson(request, response, JSON.stringify(await jobs.known(idOf(request))));
    },
    async delete(request, response) {
      const job = await jobs.end(idOf(request));
      if (job === null) response.status(204).end();
      else response.status(202).json(job);
    },
  });
  door(router, "/v1/jobs/:id/events", {
    get: (request, response) => streamEvents(service, request, response),
  });
  door(router, "/v1/jobs/:id/document", {
    async get(request, response) {
      sendJson(request, response, await jobs.document(idOf(request)));
    },
  });
  door(router, "/v1/jobs/:id/result", {
    async get(request, response) {
      sendJson(request, response, await jobs.result(idOf(request)));
    },
  });
  door(router, "/v1/jobs/:id/heat", {
    async get(request, response) {
      accepted(request, ["application/octet-stream"]);
      await sendZipped(request, response, await jobs.heat(idOf(request)));
    },
  });
  fieldRoutes(router, service);
}

/** Sends stored bytes as they lie there where the client unpacks them itself. */
async function sendZipped(request: Request, response: Response, bytes: Buffer): Promise<void> {
  response.type("application/octet-stream").vary("Accept-Encoding");
  if (request.acceptsEncodings("gzip") === "gzip") response.set("Content-Encoding", "gzip").send(bytes);
  else response.send(await unzipped(bytes));
}

const idOf = (request: Request): string => String(request.params["id"]);

const PageSchema = z.object({
  limit: z.coerce.number().int().min(1).max(200).default(50),
  after: z.coerce.number().int().min(0).nullable().default(null),
  state: JobStateSchema.nullable().default(null),
});

/** What a list's query asks for. @throws DoorError 400 */
function pageOf(request: Request): Page {
  const query = PageSchema.safeParse(request.query);
  if (query.success) {
    const { limit, after, state } = query.data;
    return { limit, before: after, state };
  }
  const names = [...new Set(query.error.issues.map((issue) => String(issue.path[0])))].join(", ");
  throw new DoorError(
    400,
    "query",
    "The query is not understood",
    `Not understood: ${names}. Accepted: limit 1 to 200, after as given by next, state one of ${JobStateSchema.options.join(", ")}.`,
  );
}

/** The request's Idempotency-Key, null without. @throws DoorError 400 for one that is none */
function clientKey(request: Request): string | null {
  const key = request.get("idempotency-key");
  if (key === undefined) return null;
  if (/^[\x21-\x7e]{1,255}$/.test(key)) return key;
  throw new DoorError(
    400,
    "key",
    "The Idempotency-Key is not understood",
    "An Idempotency-Key has 1 to 255 visible ASCII characters without spaces.",
  );
}
