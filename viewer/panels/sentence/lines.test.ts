import { describe, expect, it } from "vitest";
import { checkDesign } from "../../../meshes/check.ts";
import { type Fault, Refusal } from "../../../meshes/refusal.ts";
import { valueAt, withValueAt } from "../../pointer.ts";
import { placeFaults } from "./fault-places.ts";
import { faultWords } from "./fault-words.ts";
import { linesOf } from "./lines.ts";
import { type Blank, isBlank, type Line, type Phrase } from "./phrases.ts";

const designs = Object.entries(
  import.meta.glob<object>("../../../meshes/examples/*.json", { eager: true, import: "default" }),
).map(([path, design]): [string, object] => [path.split("/").at(-1)!.replace(".json", ""), design]);
const example = (name: string): object => designs.find(([n]) => n === name)![1];

function faultsOf(document: unknown): readonly Fault[] {
  try {
    checkDesign(document);
    return [];
  } catch (error) {
    if (error instanceof Refusal) return error.faults;
    throw error;
  }
}

const phrasesOf = (line: Line): readonly Phrase[] => [...line.phrases, ...line.also];
const blanksOf = (document: unknown): Blank[] => linesOf(document).flatMap(phrasesOf).filter(isBlank);
const blankAt = (document: unknown, at: string): Blank => blanksOf(document).find((b) => b.at === at)!;

/** The sentence as it reads. */
function read(document: unknown, label: string): string {
  const line = linesOf(document).find((l) => l.label === label)!;
  return line.phrases
    .map((p) => {
      if (typeof p === "string") return /^[.,:;]/.test(p) ? p : ` ${p}`;
      if (p.kind === "action") return "";
      if (p.kind === "choice") return ` ${p.options.find(([value]) => value === p.value)?.[1] ?? p.value}`;
      return ` ${p.show(document) || p.empty}${p.unit === "" ? "" : ` ${p.unit}`}`;
    })
    .join("")
    .trim();
}

describe("the sentence", () => {
  it("reads as a winder says it", () => {
    expect(read(example("demo"), "Coil")).toBe(
      "Wind 5 turns of round tube 8 mm, wall 1 mm, of copper, as a helix on a bore of 42 mm at a pitch of 11 mm.",
    );
    expect(read(example("demo"), "Part 1")).toBe(
      "Heat chisel shank, a cylinder 28 mm across and 80 mm long, bore 0 mm, its middle at z = -12 mm, of a conducting material with resistivity 0.35 µΩ·m and relative permeability 40.",
    );
    expect(read(example("demo"), "Drive")).toBe(
      "Drive it with 4000 W of heat in the parts to be heated at 8 kHz.",
    );
    expect(read(example("stepped-shaft"), "Coil")).toMatch(/at a pitch of 10, 10.5, 12, 10.5, 10 mm\.$/);
    expect(read(example("washers"), "Part 1")).toMatch(
      /^Heat washers, a stack of 12 pieces, 0.5 mm clear between them, each a cylinder 40 mm/,
    );
    expect(read(example("pan-base"), "Guide 1")).toMatch(
      /relative permeability 1800 and loss tangent 0.004\.$/,
    );
    expect(read(example("counter-rings"), "Coil")).toContain("45, -33\n45, -20\n45, 20, -1\n45, 33, -1");
  });

  it.each(designs)("of %s writes back what it shows", (_name, design) => {
    for (const blank of blanksOf(design)) {
      expect(blank.put(design, blank.show(design)), blank.at).toEqual(design);
    }
  });

  it.each(designs)("of %s has a blank or a choice for every value", (_name, design) => {
    const owned = new Set(
      linesOf(design)
        .flatMap(phrasesOf)
        .flatMap((p) =>
          typeof p === "string" || p.kind === "action" ? [] : [p.at, ...(isBlank(p) ? (p.owns ?? []) : [])],
        ),
    );
    const missing: string[] = [];
    const visit = (value: unknown, at: string): void => {
      if (owned.has(at) && (typeof value !== "object" || Array.isArray(value))) return;
      if (value !== null && typeof value === "object") {
        for (const [key, inner] of Object.entries(value)) visit(inner, `${at}/${key}`);
      } else missing.push(at);
    };
    visit(design, "");
    expect(missing).toEqual(["/format"]);
  });

  it("has labels of their own", () => {
    for (const [, design] of designs) {
      const labels = linesOf(design)
        .flatMap(phrasesOf)
        .flatMap((p) => (typeof p === "string" ? [] : [p.label]));
      expect(new Set(labels).size).toBe(labels.length);
    }
  });

  it("comes to something for any draft", () => {
    for (const draft of [
      undefined,
      null,
      3,
      "text",
      [],
      {},
      { coil: { winding: { form: "knot" } }, parts: [null, 4] },
    ]) {
      expect(linesOf(draft).length).toBeGreaterThan(3);
      expect(() => placeFaults(faultsOf(draft), linesOf(draft))).not.toThrow();
    }
  });
});

describe("typing", () => {
  const design = example("demo");

  it("keeps as text what is no number, and takes the key away where the blank is emptied", () => {
    const pitch = blankAt(design, "/coil/winding/pitchMm");
    expect(valueAt(pitch.put(design, "abc"), "/coil/winding/pitchMm")).toBe("abc");
    expect(valueAt(pitch.put(design, "10, 10, 11, 12"), "/coil/winding/pitchMm")).toEqual([10, 10, 11, 12]);
    expect(valueAt(pitch.put(design, "10,5"), "/coil/winding/pitchMm")).toBe(10.5);
    expect(valueAt(pitch.put(design, ""), "/coil/winding/pitchMm")).toBeUndefined();
    const resistivity = blankAt(design, "/parts/0/material/resistivityOhmM");
    expect(valueAt(resistivity.put(design, ""), "/parts/0/material/resistivityOhmM")).toBe("");
  });

  it("writes strands, rings with their sense, and no stray points", () => {
    const two = example("two-strands");
    expect(valueAt(blankAt(two, "/coil/strands").put(two, "0 1 2; 3,4"), "/coil/strands")).toEqual([
      [0, 1, 2],
      [3, 4],
    ]);
    const rings = example("counter-rings");
    const put = blankAt(rings, "/coil/winding/centresMm").put(rings, "45 -20\n45, 20");
    expect(valueAt(put, "/coil/winding")).toEqual({
      form: "rings",
      centresMm: [
        [45, -20],
        [45, 20],
      ],
    });
    expect(valueAt(blankAt(design, "/strayPointsMm").put(design, " "), "/strayPointsMm")).toBeUndefined();
  });
});

describe("a refusal", () => {
  /** Wrong documents, and the blank (or line:) each refusal belongs to. */
  const cases: readonly [string, unknown, string][] = [
    ["demo", withValueAt(example("demo"), "/coil/winding/pitchMm", 7), "/coil/winding/pitchMm"],
    ["uneven", withValueAt(example("stepped-shaft"), "/coil/winding/pitchMm/1", 7), "/coil/winding/pitchMm"],
    ["sense", withValueAt(example("counter-rings"), "/coil/winding/sense/1", 3), "/coil/winding/centresMm"],
    [
      "ring",
      withValueAt(example("counter-rings"), "/coil/winding/centresMm/1", [45, -30]),
      "/coil/winding/centresMm",
    ],
    ["strands", withValueAt(example("two-strands"), "/coil/strands/1/2", 2), "/coil/strands"],
    ["overlap", withValueAt(example("demo"), "/parts/0/diameterMm", 44), "line /parts/0"],
    ["unknown key", withValueAt(example("demo"), "/parts/0/colour", "red"), "line /parts/0"],
    ["no drive", withValueAt(example("demo"), "/drive/partPowerW", undefined), "/drive"],
    ["leads", withValueAt(example("demo"), "/coil/leads/spacingMm", 5), "/coil/leads/spacingMm"],
    [
      "curve",
      withValueAt(example("dome-punch"), "/parts/0/material", {
        curve: [
          [0, 0],
          [100, "x"],
        ],
      }),
      "/parts/0/material/curve",
    ],
    ["piece", withValueAt(example("washers"), "/parts/0/of/lengthMm", "x"), "/parts/0/of/lengthMm"],
    ["format", withValueAt(example("demo"), "/format", "emberturn/9"), "rest"],
    ["no coil", withValueAt(example("demo"), "/coil", undefined), "line /coil"],
    ["no list", withValueAt(example("demo"), "/parts", 3), "line /parts"],
  ];

  it.each(cases)("of %s is told where it belongs", (_name, document, place) => {
    const { blanks, lines, rest } = placeFaults(faultsOf(document), linesOf(document));
    const found = [
      ...blanks.keys(),
      ...[...lines.keys()].map((l) => `line ${l}`),
      ...(rest.length > 0 ? ["rest"] : []),
    ];
    expect(found).toContain(place);
  });

  it("is never lost: every value of every design made wrong in turn", () => {
    let told = 0;
    for (const [, design] of designs.filter(([name]) => name !== "dome-punch")) {
      const visit = (value: unknown, at: string): void => {
        for (const wrong of ["x", null, -1e9, {}]) {
          const document = at === "" ? wrong : withValueAt(design, at, wrong);
          const faults = faultsOf(document);
          const { blanks, lines, rest } = placeFaults(faults, linesOf(document));
          const placed = [...blanks.values(), ...lines.values(), rest].flat();
          expect(placed).toHaveLength(faults.length);
          told += placed.length;
        }
        if (value !== null && typeof value === "object") {
          for (const [key, inner] of Object.entries(value)) visit(inner, `${at}/${key}`);
        }
      };
      visit(design, "");
    }
    expect(told).toBeGreaterThan(1000);
  });

  it("speaks the sentence's words", () => {
    const words = (document: unknown) => faultsOf(document).map(faultWords).join(" ");
    expect(words(withValueAt(example("demo"), "/coil/conductor/wallMm", "x"))).toBe(
      "the wall is the text “x”. Accepted: a number of mm.",
    );
    expect(words(withValueAt(example("demo"), "/coil/winding/turns", undefined))).toMatch(
      /^the number of turns is missing/,
    );
    expect(words(withValueAt(example("demo"), "/parts/0/diameterMm", 44))).toMatch(
      /Accepted: the diameter below 42\./,
    );
    expect(words(withValueAt(example("demo"), "/parts/0/colour", "red"))).toMatch(
      /^colour is not a key known here/,
    );
  });
});
