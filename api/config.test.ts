/** Settings: what is taken, what is refused and in which words. */
import { isAbsolute } from "node:path";
import { expect, it } from "vitest";
import { settingsOf } from "./config.ts";

it("has defaults that keep to this machine", () => {
  const settings = settingsOf({}, {});
  expect(settings).toMatchObject({ host: "127.0.0.1", port: 7420, demo: null, logLevel: "warn" });
  expect(isAbsolute(settings.data)).toBe(true);
  expect(settings.workers).toBeGreaterThanOrEqual(1);
});

it.each(["127.0.0.1", "127.1.2.3", "localhost", "::1"])("listens on %s", (host) => {
  expect(settingsOf({ host }, {}).host).toBe(host);
});

it.each([
  [{ host: "0.0.0.0" }, {}, /--host: 0\.0\.0\.0 is not this machine alone/],
  [{ host: "::" }, {}, /--host: :: is not this machine alone/],
  [{ host: "127.0.0.1.example" }, {}, /not this machine alone/],
  [{ port: "70000" }, {}, /--port: 70000 is no port/],
  [{ port: "http" }, {}, /--port: http is no port/],
  [{ port: "-1" }, {}, /--port: -1 is no port/],
  [{}, { EMBERTURN_LOG: "loud" }, /EMBERTURN_LOG: loud is not known; accepted are silent/],
])("refuses %j %j", (options, env, words) => {
  expect(() => settingsOf(options, env)).toThrow(words);
});
