/** The OpenAPI 3.1 document: paths as written here, every schema generated from the one that checks the data. */
import * as z from "zod";
import { DesignSchema } from "../meshes/design.ts";
import { ResultSchema } from "../meshes/result.ts";
import { version } from "../package.json";
import { fieldQuantities, fieldStates } from "./contract/fields.ts";
import { JobListSchema, JobRequestSchema, JobSchema, JobStateSchema } from "./contract/job.ts";
import { MaterialListSchema } from "./contract/materials.ts";
import { ProblemSchema } from "./contract/problem.ts";
import { fieldForms } from "./engine/formed.ts";
import { designExample, jobExample, problemExample, refusalExample } from "./openapi-examples.ts";

type Json = Readonly<Record<string, unknown>>;

const schemas = {
  Design: DesignSchema,
  Result: ResultSchema,
  Job: JobSchema,
  JobRequest: JobRequestSchema,
  JobList: JobListSchema,
  MaterialList: MaterialListSchema,
  Problem: ProblemSchema,
} as const;
type SchemaName = keyof typeof schemas;

const addressOf = (name: string): string => `#/components/schemas/${name}`;
const schema = (name: SchemaName): Json => ({ $ref: addressOf(name) });

/** The document; OpenAPI 3.1 takes JSON Schema 2020-12 as it is. */
export function openApi(): Json {
  return {
    openapi: "3.1.0",
    info: {
      title: "emberturn",
      version,
      description:
        "What an induction coil will measure, and where its part gets hot: R, L, Q, powers and heat of designs, as jobs. " +
        "Lengths in documents are millimetres, temperatures degrees Celsius, all else SI; rms values.",
    },
    servers: [{ url: "/" }],
    paths: { ...jobPaths(), ...leftBehindPaths(), ...otherPaths() },
    components: { schemas: componentSchemas(), responses: { Problem: problemResponse() } },
  };
}

function componentSchemas(): Json {
  const registry = z.registry<{ id: string }>();
  for (const [id, of] of Object.entries(schemas)) registry.add(of, { id });
  const made = z.toJSONSchema(registry, { uri: addressOf, io: "input", unrepresentable: "any" }).schemas;
  return Object.fromEntries(
    // Inside components a schema has its place for a name.
    Object.entries(made).map(([id, { $schema: _, $id: __, ...rest }]) => [id, rest]),
  );
}

const json = (of: Json, example?: unknown): Json => ({
  "application/json": { schema: of, ...(example === undefined ? {} : { example }) },
});

const problemResponse = (): Json => ({
  description: "What went wrong (RFC 9457); `errors` has an entry for every fault of the document.",
  content: { "application/problem+json": { schema: schema("Problem"), example: problemExample } },
});

/** `default` stands for whatever goes wrong; the statuses in question are named in the descriptions. */
const problems = { default: { $ref: "#/components/responses/Problem" } };

const ok = (description: string, content: Json): Json => ({ "200": { description, content }, ...problems });

const jobId = {
  name: "id",
  in: "path",
  required: true,
  schema: { type: "string" },
  description: "The job's id.",
};

function query(name: string, of: Json, description: string): Json {
  return { name, in: "query", schema: of, description };
}

function jobPaths(): Json {
  return {
    "/v1/jobs": { get: listJobs(), post: submitJob() },
    "/v1/jobs/{id}": {
      parameters: [jobId],
      get: {
        operationId: "getJob",
        summary: "A job as it stands",
        responses: ok("The job.", json(schema("Job"), jobExample)),
      },
      delete: {
        operationId: "endJob",
        summary: "Cancels a live job, removes an ended one",
        responses: {
          "202": {
            description: "Cancelled: the job is so from now on, and its work stops within two seconds.",
            content: json(schema("Job")),
          },
          "204": { description: "Removed with everything it left behind." },
          ...problems,
        },
      },
    },
    "/v1/jobs/{id}/events": { parameters: [jobId], get: followJob() },
  };
}

function listJobs(): Json {
  return {
    operationId: "listJobs",
    summary: "Jobs, newest first",
    parameters: [
      query("limit", { type: "integer", minimum: 1, maximum: 200, default: 50 }, "Jobs a page."),
      query("after", { type: "string" }, "`next` of the page before."),
      query("state", { type: "string", enum: JobStateSchema.options }, "Only jobs in this state."),
    ],
    responses: ok("A page of jobs.", json(schema("JobList"), { jobs: [jobExample], next: null })),
  };
}

function submitJob(): Json {
  return {
    operationId: "submitJob",
    summary: "Submits a job",
    description:
      "400 for what cannot be parsed, 422 for a document that cannot be solved, with a pointer and words for every fault; " +
      "413 beyond 16 MB; 415 for a body that is not JSON.",
    parameters: [
      {
        name: "Idempotency-Key",
        in: "header",
        schema: { type: "string", minLength: 1, maxLength: 255 },
        description: "The same key with the same request gives the same job; with another request 422.",
      },
    ],
    requestBody: {
      required: true,
      content: json(schema("JobRequest"), { kind: "solve", document: designExample }),
    },
    responses: {
      "202": {
        description: "Accepted and stored: the job will end as done, failed or cancelled.",
        headers: { Location: { schema: { type: "string" }, description: "The job's address." } },
        content: json(schema("Job"), jobExample),
      },
      "422": {
        description: "Refused, with every fault.",
        content: { "application/problem+json": { schema: schema("Problem"), example: refusalExample } },
      },
      ...problems,
    },
  };
}

function followJob(): Json {
  return {
    operationId: "followJob",
    summary: "A job's events to its end",
    description:
      "Server-sent events named progress, then one of done, failed, cancelled, which ends the stream. The data of each is the job. " +
      "Whoever comes back with Last-Event-ID is told what is newer, after the last event 204.",
    parameters: [
      {
        name: "Last-Event-ID",
        in: "header",
        schema: { type: "string" },
        description: "Id of the last event seen.",
      },
    ],
    responses: {
      "200": { description: "The events.", content: { "text/event-stream": { schema: { type: "string" } } } },
      "204": { description: "There is nothing after the last event." },
      ...problems,
    },
  };
}

function leftBehindPaths(): Json {
  const bytes = { "application/octet-stream": { schema: { type: "string", format: "binary" } } };
  return {
    "/v1/jobs/{id}/document": {
      parameters: [jobId],
      get: {
        operationId: "getDocument",
        summary: "The design as accepted, defaults filled in",
        responses: ok("The design.", json(schema("Design"), designExample)),
      },
    },
    "/v1/jobs/{id}/result": {
      parameters: [jobId],
      get: {
        operationId: "getResult",
        summary: "The result document",
        description: "409 before the end, and for a job that left none.",
        responses: ok("The result.", json(schema("Result"))),
      },
    },
    "/v1/jobs/{id}/heat": {
      parameters: [jobId],
      get: {
        operationId: "getHeat",
        summary: "Where the heat sits, as the page draws it",
        responses: ok("Cells, power densities and outlines, packed.", bytes),
      },
    },
    "/v1/jobs/{id}/fields/{quantity}": { parameters: [jobId, quantityParameter], get: getField() },
  };
}

const quantityParameter = {
  name: "quantity",
  in: "path",
  required: true,
  schema: { type: "string", enum: fieldQuantities },
  description: "Which field.",
};

function getField(): Json {
  const forms = Object.fromEntries(
    fieldForms.map((form) => [
      form,
      { schema: form === "application/json" ? { type: "object" } : { type: "string" } },
    ]),
  );
  return {
    operationId: "getField",
    summary: "A solved field on a grid of lines in r and z, as JSON, CSV or NumPy's .npy",
    description:
      "Nodes: grid, vectorPotential, fluxDensity; cells: powerDensity, currentDensity. Resampled from the solver's own grid.",
    parameters: [
      query("state", { type: "string", enum: fieldStates }, "Default: loaded, or empty without a part."),
    ],
    responses: ok("The array.", forms),
  };
}

function otherPaths(): Json {
  const status = { type: "object", properties: { status: { type: "string" } }, required: ["status"] };
  const get = (operationId: string, summary: string, description: string, content: Json): Json => ({
    get: { operationId, summary, responses: ok(description, content) },
  });
  return {
    "/v1/materials": get(
      "listMaterials",
      "The library of materials, a citation per number",
      "The materials.",
      json(schema("MaterialList")),
    ),
    "/openapi.json": get("getOpenApi", "This document", "OpenAPI 3.1.", json({ type: "object" })),
    "/healthz": get("isAlive", "Whether the process answers", "It does.", json(status, { status: "alive" })),
    "/readyz": get(
      "isReady",
      "Whether it takes jobs; 503 while starting and ending",
      "It does.",
      json(status, { status: "ready" }),
    ),
  };
}
