import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  numberIn,
  type Quantity,
  quantities as q,
  readEntry,
  readList,
  readRows,
  showEntry,
  showList,
  stepped,
} from "./entry.ts";

describe("a number as typed", () => {
  it("takes decimal comma and point, signs, powers and fractions", () => {
    expect(numberIn("10.5")).toBe(10.5);
    expect(numberIn(" 10,5 ")).toBe(10.5);
    expect(numberIn("−3")).toBe(-3);
    expect(numberIn("2.5e-7")).toBe(2.5e-7);
    expect(numberIn(",5")).toBe(0.5);
    expect(numberIn("10.")).toBe(10);
    expect(numberIn("3/8")).toBe(0.375);
    expect(numberIn("1 3/8")).toBe(1.375);
  });

  it("leaves alone what is none", () => {
    for (const text of ["", "ten", "1.2.3", "1,2,3", "1e999", "--1", "0x10", "3/0", "Infinity"]) {
      expect(numberIn(text), text).toBeNull();
    }
  });
});

describe("a blank's entry", () => {
  it("is in the shown unit, or in the unit that stands after it", () => {
    expect(readEntry("8", q.frequency)).toBe(8000);
    expect(readEntry("9,5", q.frequency)).toBe(9500);
    expect(readEntry("50 Hz", q.frequency)).toBe(50);
    expect(readEntry("0.4MHz", q.frequency)).toBe(400_000);
    expect(readEntry("3/8 in", q.size)).toBe(9.525);
    expect(readEntry('2"', q.size)).toBe(50.8);
    expect(readEntry("4 kW", q.power)).toBe(4000);
    expect(readEntry("20 °C", q.temperature)).toBe(20);
  });

  it("reads a resistivity as tables print it", () => {
    expect(readEntry("0.25", q.resistivity)).toBe(2.5e-7);
    expect(readEntry("2.5e-7", q.resistivity)).toBe(2.5e-7);
    expect(readEntry("25 µΩ·cm", q.resistivity)).toBe(2.5e-7);
    expect(readEntry("2.5e-7 Ω·m", q.resistivity)).toBe(2.5e-7);
    expect(readEntry("2.5e-7 Ω m", q.resistivity)).toBe(2.5e-7);
  });

  it("keeps as text what is no number of the quantity", () => {
    for (const text of ["abc", "8 kg", "8 constructor", "12 V", ""])
      expect(readEntry(text, q.size)).toBe(text);
  });

  it("comes back as it was shown (seed 71)", () => {
    const all: readonly Quantity[] = Object.values(q);
    fc.assert(
      fc.property(fc.double({ min: 1e-3, max: 1e4 }), fc.constantFrom(...all), (x, quantity) => {
        const value = Number(x.toPrecision(6));
        expect(readEntry(showEntry(value, quantity), quantity)).toBe(value);
      }),
      { seed: 71 },
    );
  });
});

describe("arrow keys", () => {
  it("go by the quantity's step, ten with Shift", () => {
    expect(stepped(1, 1, q.wall)).toBe(1.1);
    expect(stepped(42, -10, q.size)).toBe(32);
    expect(stepped(8000, 1, q.frequency)).toBe(9000);
    expect(stepped(0, -1, q.position)).toBe(-1);
    expect(stepped(2.5e-7, 1, q.resistivity)).toBe(2.6e-7);
  });

  it("never take a positive quantity to nothing", () => {
    for (const quantity of [q.wall, q.size, q.frequency, q.current, q.count] as readonly Quantity[]) {
      let value = 3 * (quantity.units[quantity.unit] ?? 1);
      for (let i = 0; i < 60; i++) value = stepped(value, -1, quantity);
      expect(value).toBeGreaterThan(0);
    }
  });
});

describe("a list", () => {
  it("is told from a decimal comma", () => {
    expect(readList("10, 10, 12")).toEqual([10, 10, 12]);
    expect(readList("10,10,12")).toEqual([10, 10, 12]);
    expect(readList("10 10,5 12")).toEqual([10, 10.5, 12]);
    expect(readList("10,5; 11")).toEqual([10.5, 11]);
    expect(readList("10.5,11")).toEqual([10.5, 11]);
    expect(readList("10,5")).toEqual([10.5]);
    expect(readList("10,5", 2)).toEqual([10, 5]);
    expect(readList("40,-20")).toEqual([40, -20]);
    expect(readList("10, x")).toEqual([10, "x"]);
    expect(showList([10, 10.5, "x"])).toBe("10, 10.5, x");
  });

  it("of points has one a line", () => {
    expect(readRows("0, -30\n24 -30\n\n24,5 -22\n1,2", 2)).toEqual([
      [0, -30],
      [24, -30],
      [24.5, -22],
      [1, 2],
    ]);
    expect(readRows("0, -30\nhalf", 2)).toEqual([[0, -30], "half"]);
  });
});
