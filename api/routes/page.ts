/** The page: plain files, built beforehand. */
import { fileURLToPath } from "node:url";
import express, { type Router } from "express";
import type { Service } from "./service.ts";

/** Serves index.html at "/" and what it names under "/assets/": these files bear their content's hash, so they may be kept for ever. */
export function pageRoutes(router: Router, { viewer }: Service): void {
  const folder = fileURLToPath(viewer);
  router.use(
    "/assets",
    express.static(fileURLToPath(new URL("assets/", viewer)), {
      index: false,
      redirect: false,
      immutable: true,
      maxAge: "365d",
    }),
  );
  router.get("/", (_request, response, next) => {
    response.set("Cache-Control", "no-cache");
    response.sendFile("index.html", { root: folder }, (error) => {
      if (error) next();
    });
  });
}
