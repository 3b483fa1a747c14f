import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { checkDesign, readDesign } from "./check.ts";

const folder = new URL("./examples/", import.meta.url);
const files = readdirSync(folder).filter((name) => name.endsWith(".json"));
const designs = files.map((name) => readDesign(readFileSync(new URL(name, folder), "utf8")));

describe("the gallery", () => {
  test.each(files)("%s is accepted and named in the gallery's list", (name) => {
    const list = readFileSync(new URL("README.md", folder), "utf8");
    expect(list).toContain(`| ${name.replace(".json", "")} |`);
  });

  test("covers every winding, section, shape and drive", () => {
    const bodies = designs.flatMap((d) => [...d.parts, ...d.guides]);
    const seen = new Set<string>([
      ...designs.flatMap((d) => [d.coil.winding.form, d.coil.conductor.section]),
      ...bodies.map((b) => b.shape),
      ...designs.flatMap((d) => Object.keys(d.drive)),
    ]);
    const all =
      "helix spiral layers cone rings roundTube roundBar rectTube rectBar cylinder sphere outline stack currentA partPowerW coilVoltageV";
    for (const word of all.split(" ")) expect(seen).toContain(word);
  });

  test("completed designs come back unchanged", () => {
    for (const design of designs) expect(checkDesign(structuredClone(design)).design).toEqual(design);
  });
});
