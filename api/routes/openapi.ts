/** `/openapi.json`: what there is, for programs. */
import type { Router } from "express";
import { openApi } from "../openapi.ts";
import { door, sendJson } from "./door.ts";

export function openApiRoutes(router: Router): void {
  let text: string | undefined;
  door(router, "/openapi.json", {
    get(request, response) {
      text ??= JSON.stringify(openApi());
      sendJson(request, response, text);
    },
  });
}
