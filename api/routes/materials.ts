/** `/v1/materials`: the library, a citation per number. */
import type { Router } from "express";
import { materialList } from "../format/materials.ts";
import { door, sendJson } from "./door.ts";

export function materialRoutes(router: Router): void {
  const text = JSON.stringify(materialList());
  door(router, "/v1/materials", { get: (request, response) => sendJson(request, response, text) });
}
