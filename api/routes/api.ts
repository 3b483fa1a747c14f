/** All routes but the page: what the OpenAPI document names. */
import type { Router } from "express";
import { healthRoutes } from "./health.ts";
import { jobRoutes } from "./jobs.ts";
import { materialRoutes } from "./materials.ts";
import { openApiRoutes } from "./openapi.ts";
import type { Service } from "./service.ts";

export function apiRoutes(router: Router, service: Service): void {
  healthRoutes(router, service);
  jobRoutes(router, service);
  materialRoutes(router);
  openApiRoutes(router);
}
