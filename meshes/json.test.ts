import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { readDesign } from "./check.ts";
import { plainDesign } from "./drafts.ts";
import { readJson, textLimits } from "./json.ts";
import { Refusal } from "./refusal.ts";

function refusalOf(text: string): Refusal {
  try {
    readJson(text);
  } catch (error) {
    if (error instanceof Refusal) return error;
    throw error;
  }
  throw new Error("accepted");
}

describe("what is not JSON is refused with its place", () => {
  test.each([
    ["", "a value is missing (at the end of the text)"],
    ["{", "a key in double quotes is missing (at the end of the text)"],
    ['{"a": 1,}', "a key in double quotes is missing (in line 1, column 9)"],
    ['{"a": 1\n "b": 2}', "“,” is missing (in line 2, column 2)"],
    ['{"a" 1}', "“:” is missing (in line 1, column 6)"],
    ["[1, 2", "“,” is missing (at the end of the text)"],
    ["[1 2]", "“,” is missing (in line 1, column 4)"],
    ['{"a": NaN}', "NaN is no JSON value (in line 1, column 7)"],
    ['{"a": -Infinity}', "a value is missing (in line 1, column 7)"],
    ["{'a': 1}", "a key in double quotes is missing (in line 1, column 2)"],
    ["[01]", "“,” is missing (in line 1, column 3)"],
    ['["open]', "this text in quotes does not end properly (in line 1, column 2)"],
    ['["a\nb"]', "this text in quotes does not end properly (in line 1, column 2)"],
    ["{} {}", "nothing may follow the end of the document (in line 1, column 4)"],
    ["// note\n{}", "a value is missing (in line 1, column 1)"],
  ])("%j", (text, words) => {
    const refusal = refusalOf(text);
    expect(refusal.status).toBe("unparsable");
    expect(refusal.faults).toEqual([{ pointer: "", detail: `not JSON: ${words}` }]);
  });
});

test("nesting is bounded before anything is built", () => {
  const nested = (depth: number) => "[".repeat(depth) + "]".repeat(depth);
  expect(readJson(nested(textLimits.depth))).toBeDefined();
  expect(refusalOf(nested(textLimits.depth + 1)).status).toBe("unparsable");
  expect(refusalOf("[".repeat(500_000)).message).toContain("deeper than 32 levels");
  expect(refusalOf('{"a":'.repeat(100_000)).message).toContain("deeper than 32 levels");
});

test("size is bounded, in bytes", () => {
  const text = (bytes: number) => `"${"é".repeat((bytes - 2) / 2)}"`;
  expect(readJson(text(textLimits.bytes))).toBeDefined();
  expect(refusalOf(text(textLimits.bytes + 2)).message).toContain("1000002 bytes; at most 1000000");
});

test("a key given twice is refused at its pointer", () => {
  const refusal = refusalOf('{"coil": {"turns": 7,\n "turns": 8}}');
  expect(refusal.status).toBe("refused");
  expect(refusal.faults[0]).toMatchObject({
    pointer: "/coil/turns",
    detail: "turns is given a second time in line 2",
  });
});

test("numbers beyond all doubles come through as infinite, for the schema to refuse", () => {
  expect(readJson("[1e999, -1e999, 1e-999]")).toEqual([Infinity, -Infinity, 0]);
});

test("a byte order mark is no fault", () => {
  expect(readJson("\ufeff{}")).toEqual({});
});

// The platform's own reader is the outside truth: whatever it writes, ours reads to the same value.
test("reads what JSON.stringify writes (seed 1301)", () => {
  fc.assert(
    fc.property(fc.jsonValue({ maxDepth: 6 }), fc.constantFrom(0, 1, "\t"), (value, space) => {
      const text = JSON.stringify(value, null, space);
      expect(readJson(text)).toEqual(JSON.parse(text));
    }),
    { seed: 1301, numRuns: 300 },
  );
});

test("accepts and rejects as JSON.parse does (seed 1303)", () => {
  const piece = fc.constantFrom(
    ...'{}[],:"\\0123456789.eE+- \ntrufalsn',
    '"a"',
    "null",
    "true",
    "\\u00e9",
    "1.5",
  );
  fc.assert(
    fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => {
      const text = pieces.join("");
      let truth: unknown;
      try {
        truth = JSON.parse(text);
      } catch {
        expect(refusalOf(text).status).toBe("unparsable");
        return;
      }
      // Keys given twice are the one intended difference.
      if (!/"a".*"a"/s.test(text)) expect(readJson(text)).toEqual(truth);
    }),
    { seed: 1303, numRuns: 5000 },
  );
});

test("readDesign completes a design's text", () => {
  const design = readDesign(JSON.stringify(plainDesign()));
  expect(design.accuracyPercent).toBe(0.2);
  expect(design.parts[0]?.heated).toBe(true);
});

test("a key named like an object's prototype is unknown like any other", () => {
  const text = JSON.stringify(plainDesign()).replace("{", '{"__proto__": {"name": "x"}, "constructor": 1,');
  try {
    readDesign(text);
    expect.unreachable();
  } catch (error) {
    expect((error as Refusal).faults.map((f) => f.pointer)).toEqual(["/__proto__", "/constructor"]);
  }
});
