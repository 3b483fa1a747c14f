import { describe, expect, it } from "vitest";
import { Refusal } from "../meshes/refusal.ts";
import { MappedError, toFailure } from "./errors.ts";

describe("the mapper of errors", () => {
  it("turns a refusal into RFC 9457 members, exit 2, and words with pointer, numbers and what would do", () => {
    const failure = toFailure(
      new Refusal("refused", [
        { pointer: "/parts/0", detail: "pin overlaps turn 3 by 0.8 mm", accepted: "diameterMm below 50" },
        { pointer: "/drive", detail: "two drive quantities" },
      ]),
    );
    expect(failure.exit).toBe(2);
    expect(Object.keys(failure.problem)).toEqual(["type", "title", "status", "detail", "errors"]);
    expect(failure.problem.status).toBe(422);
    expect(failure.problem.errors).toHaveLength(2);
    expect(failure.words.split("\n").slice(1)).toEqual([
      "  /parts/0: pin overlaps turn 3 by 0.8 mm (accepted: diameterMm below 50)",
      "  /drive: two drive quantities",
    ]);
  });

  it("answers 400 to what cannot be parsed", () => {
    const { problem } = toFailure(new Refusal("unparsable", [{ pointer: "", detail: "not JSON" }]));
    expect([problem.status, problem.detail]).toEqual([400, "not JSON"]);
  });

  it("never shows a stack trace, whatever was thrown", () => {
    for (const thrown of [
      new TypeError("x is not a function"),
      "text",
      undefined,
      new RangeError("Array buffer allocation failed"),
    ]) {
      const { words, exit, problem } = toFailure(thrown);
      expect(exit).toBe(1);
      expect(problem.status).toBe(500);
      expect(words).not.toMatch(/\n\s+at /);
    }
    expect(toFailure(new RangeError("Array buffer allocation failed")).problem.title).toBe(
      "Not enough memory",
    );
  });

  it("keeps what was mapped on the other side of a thread", () => {
    const failure = toFailure(new Refusal("refused", [{ pointer: "/coil", detail: "d" }]));
    expect(toFailure(new MappedError(failure))).toBe(failure);
  });
});
