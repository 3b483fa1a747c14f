/** The doors of the service, over HTTP, with the real application, store and threads. */
import { once } from "node:events";
import { get } from "node:http";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { DesignSchema } from "../meshes/design.ts";
import { ResultSchema } from "../meshes/result.ts";
import { decodeHeat } from "./contract/heat.ts";
import { type Job, JobListSchema, JobSchema } from "./contract/job.ts";
import { MaterialListSchema } from "./contract/materials.ts";
import { ProblemSchema } from "./contract/problem.ts";
import { emptyDesign, quickDesign, type TestService, temporaryFolder, testService } from "./fixtures.ts";

const folder = temporaryFolder();
let service: TestService;
beforeAll(async () => {
  service = await testService(folder.path);
});
afterAll(async () => {
  await service.close();
  folder.remove();
});

/** The problem document of an answer, which has to say its own status. */
async function problemOf(response: Response) {
  expect(response.headers.get("content-type")).toMatch(/^application\/problem\+json/);
  const problem = ProblemSchema.parse(await response.json());
  expect(problem.status).toBe(response.status);
  expect(problem.detail).not.toMatch(/\n\s+at |node_modules/);
  return problem;
}

describe("a job", () => {
  it("is accepted, done, and leaves document, result, heat and fields behind", async () => {
    const response = await service.post({ kind: "solve", document: quickDesign() });
    expect(response.status).toBe(202);
    const job = JobSchema.parse(await response.json());
    expect(job).toMatchObject({ kind: "solve", name: quickDesign().name, problem: null });
    expect(response.headers.get("location")).toBe(`/v1/jobs/${job.id}`);

    const over = await service.end(job.id);
    expect(over).toMatchObject({ state: "done", progress: 1 });
    expect(await (await service.ask(`/v1/jobs/${job.id}`)).json()).toEqual(over);

    const document = await (await service.ask(`/v1/jobs/${job.id}/document`)).json();
    expect(document).toEqual(DesignSchema.parse(quickDesign()));
    const result = ResultSchema.parse(await (await service.ask(`/v1/jobs/${job.id}/result`)).json());
    expect(result.design).toEqual(document);
    expect(result.numerics.peakMemoryBytes).toBeGreaterThan(1e7);

    const heat = decodeHeat(await (await service.ask(`/v1/jobs/${job.id}/heat`)).arrayBuffer());
    expect(heat.density.length).toBe(heat.cells.length / 4);
    expect(heat.outlines.map(({ name }) => name)).toContain("billet");
  });

  it("has its heat sent packed and plain, the same either way", async () => {
    const { id } = await service.submit(quickDesign());
    await service.end(id);
    const sent = async (coding: string) => {
      const response = await service.ask(`/v1/jobs/${id}/heat`, { headers: { "Accept-Encoding": coding } });
      return [response.headers.get("content-encoding"), Buffer.from(await response.arrayBuffer())] as const;
    };
    const [packed, plain] = [await sent("gzip"), await sent("identity")];
    expect(packed[0]).toBe("gzip");
    expect(plain[0]).toBeNull();
    expect(packed[1].equals(plain[1])).toBe(true);
  });

  it("has its fields sent as JSON, CSV and npy, of the state asked for", async () => {
    const { id } = await service.submit(quickDesign());
    await service.end(id);
    const field = (path: string, accept: string) =>
      service.ask(`/v1/jobs/${id}/fields/${path}`, { headers: { Accept: accept } });
    const answer = await field("fluxDensity?state=empty", "application/json");
    const json = (await answer.json()) as { shape: number[]; re: number[][][] };
    expect(json).toMatchObject({ quantity: "fluxDensity", state: "empty", unit: "T" });
    const [components, nr, nz] = json.shape as [number, number, number];
    expect([json.re.length, json.re[0]!.length, json.re[0]![0]!.length]).toEqual([components, nr, nz]);
    const csv = await (await field("powerDensity", "text/csv")).text();
    expect(csv.split("\r\n").length).toBe(1 + (nr - 1) * (nz - 1) + 1);
    const npy = Buffer.from(await (await field("grid", "application/octet-stream")).arrayBuffer());
    expect(npy.subarray(0, 6).toString("latin1")).toBe("\x93NUMPY");
    expect(npy.length % 64).toBe((2 * nr * nz * 8) % 64);
    expect((await problemOf(await field("grid", "image/png"))).status).toBe(406);
    expect((await problemOf(await field("temperature", "*/*"))).status).toBe(404);
    expect((await problemOf(await field("grid?state=hot", "*/*"))).status).toBe(400);
  });

  it("without a part has the empty state only", async () => {
    const { id } = await service.submit(emptyDesign());
    await service.end(id);
    const loaded = await service.ask(`/v1/jobs/${id}/fields/fluxDensity?state=loaded`);
    expect((await problemOf(loaded)).type).toMatch(/no-part$/);
    expect(await (await service.ask(`/v1/jobs/${id}/fields/fluxDensity`)).json()).toMatchObject({
      state: "empty",
    });
  });

  it("is removed with all it left", async () => {
    const { id } = await service.submit(quickDesign());
    await service.end(id);
    expect((await service.ask(`/v1/jobs/${id}`, { method: "DELETE" })).status).toBe(204);
    for (const path of ["", "/result", "/heat", "/document", "/events", "/fields/grid"]) {
      expect((await problemOf(await service.ask(`/v1/jobs/${id}${path}`))).status).toBe(404);
    }
    expect((await problemOf(await service.ask(`/v1/jobs/${id}`, { method: "DELETE" }))).status).toBe(404);
  });
});

describe("an Idempotency-Key", () => {
  const request = { kind: "solve", document: quickDesign("Tarnhollow: once") };

  it("gives the same job to the same request, even sent twice at once and spaced otherwise", async () => {
    const key = { "Idempotency-Key": "order-17" };
    const both = await Promise.all([service.post(request, key), service.post(request, key)]);
    const spaced = await service.post(JSON.stringify(request, null, 3), key);
    const jobs = await Promise.all([...both, spaced].map(async (r) => (await r.json()) as Job));
    expect(new Set(jobs.map(({ id }) => id)).size).toBe(1);
    expect(both.map(({ status }) => status)).toEqual([202, 202]);
  });

  it("refuses another request, and what is no key", async () => {
    const other = { ...request, document: quickDesign("Tarnhollow: another") };
    expect((await service.post(request, { "Idempotency-Key": "order-18" })).status).toBe(202);
    const taken = await problemOf(await service.post(other, { "Idempotency-Key": "order-18" }));
    expect(taken).toMatchObject({ status: 422, type: "urn:emberturn:problem:key-taken" });
    const long = await service.post(request, { "Idempotency-Key": "x".repeat(300) });
    expect((await problemOf(long)).status).toBe(400);
  });
});

describe("the list", () => {
  it("goes page by page, newest first, each job once, and by state", async () => {
    const ids: string[] = [];
    for (const name of ["a", "b", "c", "d", "e"]) ids.push((await service.submit(quickDesign(name))).id);
    for (const id of ids) await service.end(id);
    const page = async (query: string) =>
      JobListSchema.parse(await (await service.ask(`/v1/jobs?${query}`)).json());
    const seen: string[] = [];
    let after = "";
    do {
      const { jobs, next } = await page(`limit=2${after}`);
      expect(jobs.length).toBeGreaterThan(0);
      seen.push(...jobs.map(({ id }) => id));
      after = next === null ? "" : `&after=${next}`;
    } while (after !== "");
    expect(seen.slice(0, 5)).toEqual([...ids].reverse());
    expect(new Set(seen).size).toBe(seen.length);
    expect((await page("state=failed")).jobs).toEqual([]);
    expect((await page("state=done&limit=3")).jobs.every(({ state }) => state === "done")).toBe(true);
  });

  it.each(["limit=0", "limit=many", "state=lost", "after=x", "limit=1&limit=2"])(
    "refuses ?%s",
    async (query) => {
      const problem = await problemOf(await service.ask(`/v1/jobs?${query}`));
      expect(problem).toMatchObject({ status: 400, type: "urn:emberturn:problem:query" });
    },
  );
});

describe("requests that are turned down", () => {
  it("name every fault of the document, from the document's own root", async () => {
    const document = { ...quickDesign(), colour: "red", drive: { frequencyHz: -1, currentA: 1 } };
    const problem = await problemOf(await service.post({ kind: "solve", document }));
    expect(problem.status).toBe(422);
    expect(problem.errors.map(({ pointer }) => pointer).sort()).toEqual(["/colour", "/drive/frequencyHz"]);
    const twice = await service.post('{"kind":"solve","document":{"parts":[],"parts":[]}}');
    expect((await problemOf(twice)).errors[0]!.pointer).toBe("/parts");
  });

  it("that are long are turned down alike, and meanwhile others are answered", async () => {
    const strange = Object.fromEntries(Array.from({ length: 50_000 }, (_, k) => [`key${k}`, 1]));
    const refused = service.post({ kind: "solve", document: { ...quickDesign(), ...strange } });
    const waits: number[] = [];
    let over = false;
    const told = refused.then((response) => {
      over = true;
      return response;
    });
    while (!over) {
      const asked = performance.now();
      await service.ask("/healthz");
      waits.push(performance.now() - asked);
    }
    expect(waits.length).toBeGreaterThan(3);
    const problem = await problemOf(await told);
    expect(problem.status).toBe(422);
    expect(problem.errors[0]).toMatchObject({
      pointer: "/key0",
      detail: expect.stringContaining("key0 is not a key"),
    });
  });

  it.each([
    ["no JSON", "7 turns, please", 400, "unparsable"],
    ["no body", "", 400, "unparsable"],
    ["no kind", '{"document":{}}', 422, "refused"],
    ["another kind", '{"kind":"guess","document":{}}', 422, "refused"],
    ["no document", '{"kind":"solve"}', 422, "refused"],
    ["a key too many", '{"kind":"solve","document":{},"urgent":true}', 422, "refused"],
    ["a list", "[]", 422, "refused"],
    ["deep nesting", "[".repeat(1000), 400, "unparsable"],
    ["a megabyte and more", `"${"x".repeat(2e6)}"`, 400, "unparsable"],
    ["more than any document needs", " ".repeat(17e6), 413, "too-large"],
  ])("say so: %s", async (_, body, status, code) => {
    const problem = await problemOf(await service.post(body));
    expect(problem).toMatchObject({ status, type: `urn:emberturn:problem:${code}` });
  });

  it("say so: bytes that are no text, other types, other codings, broken compression", async () => {
    const post = async (body: string | Uint8Array<ArrayBuffer>, headers: Record<string, string>) =>
      problemOf(await service.ask("/v1/jobs", { method: "POST", body, headers }));
    const json = "application/json";
    expect((await post(Uint8Array.of(0xff, 0xfe), { "Content-Type": json })).status).toBe(400);
    expect((await post("a=1", { "Content-Type": "text/plain" })).status).toBe(415);
    expect((await post("{}", { "Content-Type": json, "Content-Encoding": "lzma" })).status).toBe(415);
    expect((await post("{}", { "Content-Type": json, "Content-Encoding": "gzip" })).status).toBe(400);
  });

  it.each([
    ["PUT", "/v1/jobs", 405],
    ["POST", "/v1/jobs/x", 405],
    ["DELETE", "/healthz", 405],
    ["GET", "/v1/jobs/x", 404],
    ["GET", "/v1/nothing", 404],
    ["GET", "/assets/../../package.json", 404],
    ["GET", "/assets/%2e%2e/made-from.json", 404],
    ["GET", "/v1/jobs/%E0%A4%A", 400],
    ["DELETE", "/v1/jobs/x", 404],
  ])("%s %s is answered with %d", async (method, path, status) => {
    const response = await service.ask(path, { method });
    expect((await problemOf(response)).status).toBe(status);
    if (status === 405) expect(response.headers.get("allow")).toMatch(/GET|POST|DELETE/);
  });

  it("are told which forms there are", async () => {
    const response = await service.ask("/v1/jobs", { headers: { Accept: "text/html" } });
    expect((await problemOf(response)).detail).toContain("application/json");
    expect(response.status).toBe(406);
  });
});

describe("besides", () => {
  it("the library of materials is told with its sources", async () => {
    const { materials } = MaterialListSchema.parse(await (await service.ask("/v1/materials")).json());
    // IEC 60028: 1/58 µΩ·m at 20 °C.
    const copper = materials.find(({ id }) => id === "copper")!;
    expect(copper.resistivity).toMatchObject({ law: "linear", referenceC: { value: 20 } });
    expect(copper.resistivity).toHaveProperty("atReferenceOhmM.value", 1e-6 / 58);
    expect(copper.range).toMatchObject({ fromC: -50, toC: 250 });
  });

  it("health is told, and the headers keep foreign scripts out", async () => {
    expect(await (await service.ask("/healthz")).json()).toEqual({ status: "alive" });
    const ready = await service.ask("/readyz");
    expect(await ready.json()).toEqual({ status: "ready" });
    const policy = ready.headers.get("content-security-policy")!;
    expect(policy).toContain("default-src 'self'");
    expect(policy).not.toMatch(/unsafe|upgrade-insecure|https?:/);
    expect(ready.headers.get("x-powered-by")).toBeNull();
  });

  it("an answer already known is not sent again", async () => {
    const { id } = await service.submit(quickDesign());
    await service.end(id);
    const first = await service.ask(`/v1/jobs/${id}/result`);
    // Not by fetch, which asks for a fresh answer whenever it is given a tag.
    const headers = { "If-None-Match": first.headers.get("etag")! };
    const [again] = await once(
      get(new URL(`/v1/jobs/${id}/result`, service.address), { headers }),
      "response",
    );
    again.resume();
    expect(again.statusCode).toBe(304);
  });
});
