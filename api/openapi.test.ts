/** The OpenAPI document: valid by a public validator, true to the routes there are, its examples true to their schemas. */
import { Validator } from "@seriousme/openapi-schema-validator";
import express, { type Router } from "express";
import { expect, it } from "vitest";
import { checkDesign } from "../meshes/check.ts";
import { JobSchema } from "./contract/job.ts";
import { ProblemSchema } from "./contract/problem.ts";
import { openApi } from "./openapi.ts";
import { designExample, jobExample, problemExample, refusalExample } from "./openapi-examples.ts";
import { apiRoutes } from "./routes/api.ts";

const document = JSON.parse(JSON.stringify(openApi())) as {
  paths: Record<string, Record<string, unknown>>;
  components: { schemas: Record<string, unknown> };
};

it("is valid OpenAPI 3.1", async () => {
  const validator = new Validator();
  const { valid, errors } = await validator.validate(document);
  expect(errors).toBeUndefined();
  expect(valid).toBe(true);
  expect(validator.version).toBe("3.1");
});

/** "GET /v1/jobs/{id}" for every handler of a router. */
function handled(router: Router): string[] {
  return router.stack.flatMap(({ route }) =>
    (route?.stack ?? []).flatMap(({ method }) =>
      // Without a method: what turns down all others.
      method === undefined ? [] : [`${method.toUpperCase()} ${route!.path.replace(/:(\w+)/g, "{$1}")}`],
    ),
  );
}

it("names every route there is, and none else", () => {
  const router = express.Router();
  apiRoutes(router, { settings: { bodyBytes: 1 } } as never);
  const told = Object.entries(document.paths).flatMap(([path, item]) =>
    Object.keys(item)
      .filter((key) => key !== "parameters")
      .map((method) => `${method.toUpperCase()} ${path}`),
  );
  expect(told.sort()).toEqual(handled(router).sort());
});

it("refers only to what is there", () => {
  const references = [...JSON.stringify(document).matchAll(/"\$ref":"#([^"]*)"/g)].map(([, path]) => path!);
  expect(references.length).toBeGreaterThan(10);
  for (const path of references) {
    const found = path
      .split("/")
      .slice(1)
      .reduce<unknown>((at, key) => (at as Record<string, unknown> | undefined)?.[key], document);
    expect(found, path).toBeDefined();
  }
});

it("gives examples that hold", () => {
  expect(checkDesign(designExample).design.name).toBe(designExample.name);
  expect(JobSchema.parse(jobExample)).toEqual(jobExample);
  for (const example of [problemExample, refusalExample])
    expect(ProblemSchema.parse(example)).toEqual(example);
});
