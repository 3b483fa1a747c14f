/** `/healthz`: the process answers. `/readyz`: it takes jobs. */
import type { Router } from "express";
import { DoorError } from "../errors.ts";
import { door, sendJson } from "./door.ts";
import type { Service } from "./service.ts";

export function healthRoutes(router: Router, service: Service): void {
  door(router, "/healthz", {
    get: (request, response) => sendJson(request, response, JSON.stringify({ status: "alive" })),
  });
  door(router, "/readyz", {
    get(request, response) {
      if (!service.ready()) throw notReady();
      sendJson(request, response, JSON.stringify({ status: "ready" }));
    },
  });
}

export function notReady(): DoorError {
  return new DoorError(
    503,
    "not-ready",
    "The service is not ready",
    "The service is starting or shutting down. Try again in a moment.",
    { "Retry-After": "2", Connection: "close" },
  );
}
