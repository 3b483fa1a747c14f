import { describe, expect, it } from "vitest";
import { checkDesign } from "../../../meshes/check.ts";
import { Refusal } from "../../../meshes/refusal.ts";
import { valueAt } from "../../pointer.ts";
import { bodyShapes, reshapeBody, solidShapes, withGuide, withPart } from "./reshape-body.ts";
import {
  driveKeys,
  reshapeDrive,
  reshapeLeads,
  reshapeMaterial,
  reshapeSection,
  reshapeStrands,
  sections,
} from "./reshape-coil.ts";
import { reshapeWinding, turnAbout, windingForms } from "./reshape-winding.ts";

const examples = Object.entries(
  import.meta.glob<object>("../../../meshes/examples/*.json", { eager: true, import: "default" }),
).map(([path, design]): [string, object] => [path.split("/").at(-1) ?? "", design]);

function faultsOf(document: unknown): string {
  try {
    checkDesign(document);
    return "";
  } catch (error) {
    if (error instanceof Refusal) return error.message;
    throw error;
  }
}

/** Where geometry does not allow it: between pan and plate, between a ring and its bore's coil, under a yoke there is no room. */
const noRoom = new Set([
  "pan-base.json helix",
  "pan-base.json layers",
  "pan-base.json cone",
  "bore-heating.json spiral",
  "undercut-hub.json spiral",
]);

describe.each(examples)("%s", (file, design) => {
  it.each(windingForms)("wound as %s is accepted, geometry allowing", (form) => {
    const wound = reshapeWinding(design, form);
    expect(valueAt(wound, "/coil/winding/form")).toBe(form);
    if (noRoom.has(`${file} ${form}`)) expect(faultsOf(wound)).toMatch(/overlaps turn/);
    else expect(faultsOf(wound)).toBe("");
  });

  it.each(sections)("of %s is accepted", (section) => {
    const made = reshapeSection(design, section);
    expect(valueAt(made, "/coil/conductor/section")).toBe(section);
    expect(faultsOf(made)).toBe("");
  });

  it.each(bodyShapes)("with its last part a %s is accepted, geometry allowing", (shape) => {
    const at = `/parts/${(valueAt(design, "/parts") as unknown[]).length - 1}`;
    const made = reshapeBody(design, at, shape);
    expect(valueAt(made, `${at}/shape`)).toBe(shape);
    expect(valueAt(made, `${at}/material`)).toEqual(valueAt(design, `${at}/material`));
    expect(faultsOf(made)).toBe("");
  });

  it("takes one more part, one more guide, leads and strands", () => {
    expect(faultsOf(withPart(design))).toBe("");
    expect(faultsOf(withGuide(design))).toBe("");
    const more = withPart(withPart(withGuide(withGuide(design))));
    expect(faultsOf(more)).toBe("");
    const names = (valueAt(more, "/parts") as { name: string }[]).map((p) => p.name);
    expect(new Set(names).size).toBe(names.length);
    expect(faultsOf(reshapeLeads(design, true))).toBe("");
    expect(faultsOf(reshapeStrands(design, true))).toBe("");
    expect(faultsOf(reshapeStrands(reshapeLeads(design, false), false))).toBe("");
    for (const key of driveKeys) expect(faultsOf(reshapeDrive(design, key))).toBe("");
  });

  it("takes each kind of material where it may stand", () => {
    for (const kind of ["copper", "conducting"]) {
      expect(faultsOf(reshapeMaterial(design, "/coil/conductor/material", kind))).toBe("");
      expect(faultsOf(reshapeMaterial(design, "/parts/0/material", kind))).toBe("");
    }
    const other = reshapeMaterial(reshapeDrive(design, "currentA"), "/parts/0/material", "other");
    expect(faultsOf(other)).toBe("");
  });
});

describe("what is carried over", () => {
  const design = examples.find(([file]) => file === "stepped-shaft.json")![1];

  it("from form to form and back is the winding it was", () => {
    const back = reshapeWinding(reshapeWinding(design, "spiral"), "helix");
    expect(valueAt(back, "/coil/winding")).toEqual({
      form: "helix",
      boreDiameterMm: 64,
      turns: 6,
      pitchMm: 12.5,
      centreZMm: 5,
    });
    const cone = reshapeWinding(design, "cone");
    expect(valueAt(cone, "/coil/winding/pitchMm")).toEqual([10, 10.5, 12, 10.5, 10]);
  });

  it("into rings is every turn's place", () => {
    const rings = valueAt(reshapeWinding(design, "rings"), "/coil/winding/centresMm") as number[][];
    expect(rings.map((c) => c[1])).toEqual([-21.5, -11.5, -1, 11, 21.5, 31.5]);
  });

  it("of a stack of washers is their height, and of a bar cut to washers its length", () => {
    const washers = examples.find(([file]) => file === "washers.json")![1];
    expect(valueAt(reshapeBody(washers, "/parts/0", "cylinder"), "/parts/0/lengthMm")).toBe(
      12 * 3 + 11 * 0.5,
    );
    const cut = valueAt(reshapeBody(washers, "/parts/1", "stack"), "/parts/1") as {
      count: number;
      gapMm: number;
      of: { lengthMm: number };
    };
    expect(cut.count * cut.of.lengthMm + (cut.count - 1) * cut.gapMm).toBeCloseTo(70, 5);
  });

  it("inside a stack goes piece by piece", () => {
    const balls = examples.find(([file]) => file === "ball-string.json")![1];
    for (const shape of solidShapes) expect(faultsOf(reshapeBody(balls, "/parts/0/of", shape))).toBe("");
  });

  it("as strands stays where the turns are as many, and is shared out anew where not", () => {
    expect(turnAbout(5, 2)).toEqual([
      [0, 2, 4],
      [1, 3],
    ]);
    const two = examples.find(([file]) => file === "two-strands.json")![1];
    expect(valueAt(reshapeWinding(two, "cone"), "/coil/strands")).toEqual(valueAt(two, "/coil/strands"));
    expect((valueAt(reshapeWinding(two, "layers"), "/coil/strands") as unknown[][]).flat()).toHaveLength(20);
  });

  it("comes to something also from a draft that says nothing", () => {
    for (const draft of [null, {}, { coil: 3, parts: "none" }]) {
      for (const form of windingForms)
        expect(valueAt(reshapeWinding(draft, form), "/coil/winding/form")).toBe(form);
      for (const s of sections) expect(valueAt(reshapeSection(draft, s), "/coil/conductor/section")).toBe(s);
      expect(valueAt(withPart(draft), "/parts/0/shape")).toBe("cylinder");
      expect(valueAt(withGuide(draft), "/guides/0/shape")).toBe("cylinder");
    }
  });
});
