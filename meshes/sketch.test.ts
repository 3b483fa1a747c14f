import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { block, outline, varied } from "./drafts.ts";
import { sketch } from "./sketch.ts";

const folder = new URL("examples/", import.meta.url);
const examples = readdirSync(folder).filter((f) => f.endsWith(".json"));
const read = (file: string) => JSON.parse(readFileSync(new URL(file, folder), "utf8"));

describe("a sketch", () => {
  it.each(examples)("shows all of %s", (file) => {
    const design = read(file);
    const { copper, bodies } = sketch(design);
    expect(copper).not.toBeNull();
    expect(bodies.map((b) => b.pointer)).toEqual([
      ...(design.parts ?? []).map((_: unknown, i: number) => `/parts/${i}`),
      ...(design.guides ?? []).map((_: unknown, i: number) => `/guides/${i}`),
    ]);
  });

  // The places of contract section 1: turn k of N at z = centre + (k − (N−1)/2)·pitch, half a conductor outside the bore.
  it("puts copper where the contract says", () => {
    const turns = sketch(varied(() => {})).copper!.turns;
    expect(turns.map((t) => t.z)).toEqual([-31.5, -21, -10.5, 0, 10.5, 21, 31.5]);
    expect(turns.every((t) => t.r === 29)).toBe(true);
  });

  it("does not need what drawing does not need", () => {
    const { copper, bodies } = sketch(
      varied((d) => {
        d.coil.conductor.material = "unobtainium";
        d.coil.conductor.temperatureC = "warm";
        d.coil.winding.colour = "red";
        d.parts[0].material = { resistivityOhmM: "2.5e" };
        d.parts[0].name = 7;
        d.drive = null;
      }),
    );
    expect(copper?.turns).toHaveLength(7);
    expect(bodies).toHaveLength(1);
    expect(bodies[0]?.label).toBe("part 0");
  });

  it("shows what overlaps, and outlines that cross themselves", () => {
    const bowTie = outline("tie", [
      [0, 0],
      [10, 10],
      [10, 0],
      [0, 10],
    ]);
    const { bodies } = sketch(
      varied((d) => {
        d.parts.push(block("wedge", 5, 60, -5, 5), bowTie);
      }),
    );
    expect(bodies.map((b) => b.label)).toEqual(["pin", "wedge", "tie"]);
  });

  it("draws a bore that leaves nothing, and a wall that leaves no bore, as solid", () => {
    const { copper, bodies } = sketch(
      varied((d) => {
        d.coil.conductor.wallMm = 5;
        d.parts[0].boreDiameterMm = 30;
      }),
    );
    expect(copper?.section.wallMm).toBe(0);
    expect(bodies[0]?.pieces[0]).toMatchObject({
      points: [
        [0, -45],
        [15, -45],
        [15, 45],
        [0, 45],
      ],
    });
  });

  it("leaves out what says nothing", () => {
    for (const value of [undefined, null, 3, "text", [], {}, { coil: [], parts: {}, guides: [null, 4] }]) {
      expect(sketch(value)).toEqual({ copper: null, bodies: [] });
    }
    expect(sketch(varied((d) => (d.coil.winding.turns = "seven"))).copper).toBeNull();
  });
});
