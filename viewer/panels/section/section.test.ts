import { describe, expect, it } from "vitest";
import { boxAround, type Layout } from "../../../meshes/layout.ts";
import { sketch } from "../../../meshes/sketch.ts";
import { withValueAt } from "../../pointer.ts";
import { linesOf } from "../sentence/lines.ts";
import { placesOf } from "../sentence/phrases.ts";
import { arrange, FOOT, type Laid, scaleBarMm, wordsWidth, xOf, yOf } from "./arrange.ts";
import { dimensionsOf } from "./dimensions.ts";
import { narrowestGap } from "./gap.ts";
import { nameLeaders, placeName } from "./names.ts";
import { edgePath, pathOf } from "./paths.ts";
import { refusedOf, steadied } from "./refused.ts";

const designs = Object.entries(
  import.meta.glob<object>("../../../meshes/examples/*.json", { eager: true, import: "default" }),
).map(([path, design]): [string, object] => [path.split("/").at(-1)!.replace(".json", ""), design]);
const example = (name: string): object => designs.find(([n]) => n === name)![1];

const boxOf = ({ copper, bodies }: Layout) =>
  boxAround([...(copper?.figures ?? []), ...bodies.flatMap((b) => b.pieces)])!;

const wordsOf = (name: string) => dimensionsOf(sketch(example(name))).map((d) => d.words);

describe("dimensions", () => {
  // What a winder measures on the examples, worked out by hand from their documents.
  it("say bore, pitch, height, gap and sizes", () => {
    expect(wordsOf("demo")).toEqual(["bore 42", "pitch 11", "coil 52 high", "28 across", "80 long", "gap 7"]);
    expect(wordsOf("bore-heating")).toContain("gap 5");
    expect(wordsOf("bore-heating")).toContain("bored 90");
    expect(wordsOf("pan-base")).toEqual([
      "clear 36",
      "pitch 5.2",
      "coil 158.4 across",
      "170 across",
      "5 long",
      "gap 6.5",
    ]);
    expect(wordsOf("cone").slice(0, 2)).toEqual(["top bore 30", "bottom bore 66"]);
    expect(wordsOf("stepped-shaft")).toEqual(expect.arrayContaining(["10", "10.5", "12", "gap 8"]));
    expect(wordsOf("crucible")).toEqual(
      expect.arrayContaining(["layers 12", "crucible 130 across", "charge 90 long"]),
    );
    expect(wordsOf("counter-rings")).toEqual(expect.arrayContaining(["bore 80", "coil 76 high", "gap 15"]));
    expect(wordsOf("washers")).toContain("washers 41.5 long");
  });

  it("measure the gap to a sphere along the line of centres", () => {
    const { copper, bodies } = sketch(example("ball"));
    // Turn centres at r = 33, z = ±4.5, conductor radius 3, ball radius 24.
    expect(narrowestGap(copper!, bodies)?.distance).toBeCloseTo(Math.hypot(33, 4.5) - 3 - 24, 9);
  });

  it("know no gap where something overlaps", () => {
    const { copper, bodies } = sketch(withValueAt(example("demo"), "/parts/0/diameterMm", 44));
    expect(narrowestGap(copper!, bodies)).toBeNull();
  });

  it.each(designs)("of %s lead to blanks there are", (_name, design) => {
    const blanks = linesOf(design).flatMap((l) => [l.at, ...[...l.phrases, ...l.also].flatMap(placesOf)]);
    for (const d of dimensionsOf(sketch(design))) expect(blanks).toContain(d.pointer);
  });
});

interface Rect {
  readonly what: string;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

function wordsRect({ dimension, x, y }: Laid, fontPx: number): Rect {
  const upright = dimension.side === "left" || dimension.side === "right";
  const [w, h] = [wordsWidth(dimension.words, fontPx) / 2, fontPx / 2 + 1];
  const [a, b] = upright ? [h, w] : [w, h];
  return { what: dimension.words, left: x - a, right: x + a, top: y - b, bottom: y + b };
}

const meet = (a: Rect, b: Rect): boolean =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom;

const pictures = [
  { width: 360, height: 400, fontPx: 12 },
  { width: 640, height: 560, fontPx: 13 },
  { width: 1200, height: 900, fontPx: 13 },
];

describe.each(designs)("the drawing of %s", (_name, design) => {
  const layout = sketch(design);
  const box = boxOf(layout);

  it.each(pictures)("has room for all its words at $width × $height px", (picture) => {
    const measures = dimensionsOf(layout);
    const leaders = nameLeaders(layout.bodies, arrange(box, measures, picture).view, picture.fontPx);
    const { view, laid } = arrange(box, [...measures, ...leaders], picture);
    const figures: Rect = {
      what: "figures",
      left: xOf(view, -box.right),
      right: xOf(view, box.right),
      top: yOf(view, box.high),
      bottom: yOf(view, box.low),
    };
    const rects = [figures, ...laid.map((l) => wordsRect(l, picture.fontPx))];
    rects.forEach((a, i) => {
      for (const b of rects.slice(i + 1)) expect(meet(a, b), `${a.what} over ${b.what}`).toBe(false);
      expect(a.left, a.what).toBeGreaterThanOrEqual(0);
      expect(a.right, a.what).toBeLessThanOrEqual(picture.width);
      expect(a.top, a.what).toBeGreaterThanOrEqual(0);
      expect(a.bottom, a.what).toBeLessThanOrEqual(picture.height - FOOT / 2);
    });
    expect(figures.right - figures.left).toBeGreaterThan(0.2 * Math.min(picture.width, picture.height));
  });
});

describe("the view", () => {
  it("is to scale, and its scale bar a round length", () => {
    const box = { left: 0, right: 50, low: -40, high: 40 };
    const { view } = arrange(box, [], { width: 800, height: 600, fontPx: 13 });
    expect(xOf(view, 10) - xOf(view, 0)).toBeCloseTo(yOf(view, 0) - yOf(view, 10), 9);
    expect(xOf(view, 50)).toBeLessThanOrEqual(800);
    const bar = scaleBarMm(view, 800);
    expect([1, 2, 5, 10, 20, 50]).toContain(bar);
    expect(bar * view.scale).toBeLessThanOrEqual(160);
  });

  it("draws no surface along the axis", () => {
    const view = { scale: 1, axisX: 0, zeroY: 0 };
    const bar = {
      kind: "polygon",
      points: [
        [0, 0],
        [5, 0],
        [5, 9],
        [0, 9],
      ],
    } as const;
    expect(pathOf([bar], view)).toBe("M0 0L5 0L5 -9L0 -9Z");
    expect(edgePath([bar], view)).toBe("M0 0L5 0L5 -9L0 -9");
    expect(edgePath([{ kind: "disc", r: 0, z: 0, radius: 2 }], view)).not.toContain("Z");
  });

  it("puts a name into the right half, across the axis of what is solid, upright in what is narrow, and else outside", () => {
    const view = { scale: 2, axisX: 100, zeroY: 100 };
    const piece = (a: number, b: number, low: number, high: number) =>
      [
        {
          kind: "polygon",
          points: [
            [a, low],
            [b, low],
            [b, high],
            [a, high],
          ],
        },
      ] as const;
    expect(placeName(piece(0, 30, -20, 20), "billet", view, 12)).toEqual({ x: 130, y: 100, upright: false });
    expect(placeName(piece(0, 20, -20, 20), "billet", view, 12)).toEqual({ x: 100, y: 100, upright: false });
    expect(placeName(piece(20, 30, -40, 40), "billet", view, 12)?.upright).toBe(true);
    expect(placeName(piece(20, 24, -10, 10), "billet", view, 12)).toBeNull();
  });
});

describe("what is refused", () => {
  const fault = (pointer: string) => ({ pointer, detail: "" });

  it("is hatched at its place", () => {
    const { turn, bodies } = refusedOf([
      fault("/coil/winding/centresMm/3"),
      fault("/parts/1/diameterMm"),
      fault("/guides/0/of/pointsMm/3"),
    ]);
    expect([0, 1, 2, 3, 4].filter(turn)).toEqual([3]);
    expect([...bodies]).toEqual(["/parts/1", "/guides/0"]);
    expect([0, 1, 2, 3].filter(refusedOf([fault("/coil/winding/pitchMm/1")]).turn)).toEqual([1, 2]);
    expect(
      refusedOf([fault("/coil/conductor/wallMm")]).turn(7) &&
        refusedOf([fault("/coil/winding/boreDiameterMm")]).turn(0),
    ).toBe(true);
  });

  it("is not hatched for what has no place", () => {
    const { turn, bodies } = refusedOf([
      fault("/coil/conductor/temperatureC"),
      fault("/coil/strands"),
      fault("/parts/0/material/resistivityOhmM"),
      fault("/parts/0/colour"),
      fault("/drive"),
    ]);
    expect(turn(0)).toBe(false);
    expect(bodies.size).toBe(0);
  });

  it("stays as it was drawn last while a blank is half typed", () => {
    const design = example("crucible");
    const before = sketch(design);
    const typing = withValueAt(
      withValueAt(design, "/coil/winding/turnsPerLayer", ""),
      "/parts/1/diameterMm",
      "8 k",
    );
    expect(sketch(typing).copper).toBeNull();
    const last = { document: design, layout: before };
    const shown = steadied(sketch(typing), last, typing);
    expect(shown.copper).toBe(before.copper);
    expect(shown.bodies.map((b) => b.pointer)).toEqual(["/parts/0", "/parts/1"]);
    const taken = withValueAt(design, "/parts/1", undefined);
    expect(steadied(sketch(taken), last, taken).bodies.map((b) => b.pointer)).toEqual(["/parts/0"]);
    const other = withValueAt(typing, "/name", "another design");
    expect(steadied(sketch(other), last, other).copper).toBeNull();
  });
});
