import { describe, expect, it } from "vitest";
import { keysOf, valueAt, withValueAt } from "./pointer.ts";

describe("a JSON Pointer", () => {
  // RFC 6901, section 5: the document of the examples.
  const document = { foo: ["bar", "baz"], "": 0, "a/b": 1, "c%d": 2, "m~n": 8 };

  it("finds what RFC 6901 section 5 lists", () => {
    expect(valueAt(document, "")).toBe(document);
    expect(valueAt(document, "/foo")).toEqual(["bar", "baz"]);
    expect(valueAt(document, "/foo/0")).toBe("bar");
    expect(valueAt(document, "/")).toBe(0);
    expect(valueAt(document, "/a~1b")).toBe(1);
    expect(valueAt(document, "/c%d")).toBe(2);
    expect(valueAt(document, "/m~0n")).toBe(8);
    expect(valueAt(document, "/foo/7")).toBeUndefined();
    expect(keysOf("/~01")).toEqual(["~1"]);
  });

  it("writes a copy, and leaves the document as it was", () => {
    const written = withValueAt(document, "/foo/1", "qux");
    expect(valueAt(written, "/foo")).toEqual(["bar", "qux"]);
    expect(document.foo[1]).toBe("baz");
    expect(withValueAt({}, "/a/b", 1)).toEqual({ a: { b: 1 } });
    expect(withValueAt({ a: [1] }, "/a/-", 2)).toEqual({ a: [1, 2] });
  });

  it("takes a key or an item away where nothing is written", () => {
    expect(withValueAt({ a: 1, b: 2 }, "/a", undefined)).toEqual({ b: 2 });
    expect(withValueAt({ a: [1, 2, 3] }, "/a/1", undefined)).toEqual({ a: [1, 3] });
  });
});
