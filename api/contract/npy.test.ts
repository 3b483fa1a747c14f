import { describe, expect, it } from "vitest";
import { encodeNpy } from "./npy.ts";

/** The file as NEP 1 (numpy.org/neps, "Format Specification: Version 1.0") writes it down, byte by byte. */
function expected(dictionary: string, headerLength: number, data: readonly number[][]): number[] {
  const header = `${dictionary}${" ".repeat(headerLength - dictionary.length - 1)}\n`;
  return [
    0x93,
    ...[..."NUMPY"].map((c) => c.charCodeAt(0)),
    1,
    0,
    headerLength % 256,
    Math.floor(headerLength / 256),
    ...[...header].map((c) => c.charCodeAt(0)),
    ...data.flat(),
  ];
}

// IEEE 754 binary64, little endian, by hand: 1 = 0x3FF0…, −2 = 0xC000…, 0.5 = 0x3FE0….
const ONE = [0, 0, 0, 0, 0, 0, 0xf0, 0x3f];
const MINUS_TWO = [0, 0, 0, 0, 0, 0, 0x00, 0xc0];
const HALF = [0, 0, 0, 0, 0, 0, 0xe0, 0x3f];
const ZERO = [0, 0, 0, 0, 0, 0, 0, 0];

describe("the .npy writer", () => {
  it("writes float64 in C order after a header that ends at a multiple of 64", () => {
    const bytes = encodeNpy([2, 2], Float64Array.of(1, -2, 0.5, 0));
    const dictionary = "{'descr': '<f8', 'fortran_order': False, 'shape': (2, 2), }";
    expect([...bytes]).toEqual(expected(dictionary, 118, [ONE, MINUS_TWO, HALF, ZERO]));
  });

  it("writes complex128 as pairs", () => {
    const bytes = encodeNpy([1, 2], Float64Array.of(1, 0.5), Float64Array.of(-2, 0));
    const dictionary = "{'descr': '<c16', 'fortran_order': False, 'shape': (1, 2), }";
    expect([...bytes]).toEqual(expected(dictionary, 118, [ONE, MINUS_TWO, HALF, ZERO]));
  });

  it("says one dimension as Python does, and takes no room where the header just fits", () => {
    const text = new TextDecoder("latin1").decode(encodeNpy([1], Float64Array.of(1)));
    expect(text.slice(10)).toMatch(/^\{'descr': '<f8', 'fortran_order': False, 'shape': \(1,\), \} *\n/);
    for (let digits = 1; digits < 16; digits++) {
      const shape = [...new Array<number>(digits).fill(1000000), 0];
      const bytes = encodeNpy(shape, new Float64Array(0));
      expect(bytes.length % 64).toBe(0);
      const header = 10 + (bytes[8] ?? 0) + 256 * (bytes[9] ?? 0);
      expect(header).toBe(bytes.length);
      expect(bytes.at(-1)).toBe(0x0a);
      expect(new TextDecoder("latin1").decode(bytes.subarray(10)).trimEnd().endsWith(", }")).toBe(true);
      expect(
        header - 10 - new TextDecoder("latin1").decode(bytes.subarray(10)).trimEnd().length,
      ).toBeLessThanOrEqual(64);
    }
  });

  it("refuses numbers that do not fill the shape", () => {
    expect(() => encodeNpy([2, 2], new Float64Array(3))).toThrow(RangeError);
    expect(() => encodeNpy([2], new Float64Array(2), new Float64Array(1))).toThrow(RangeError);
  });
});
