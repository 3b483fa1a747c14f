/**
 * Reads JSON text (RFC 8259) as documents need it: the place of a fault by line and column, a bound on size and nesting before
 * anything is built, and a refusal of keys given twice, of which JSON.parse would silently drop one.
 */
import { pointerTo, Refusal } from "./refusal.ts";

/** Bounds on what is read at all. */
export const textLimits = { bytes: 1_000_000, depth: 32 } as const;

const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
// biome-ignore lint/suspicious/noControlCharactersInRegex: JSON strings may not hold bare control characters
const STRING = /"(?:[^"\\\u0000-\u001f]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const WORDS: ReadonlyMap<string, unknown> = new Map<string, unknown>([
  ["true", true],
  ["false", false],
  ["null", null],
]);
const WORD = /[A-Za-z]+/y;
const SPACE = /[ \t\n\r]*/y;

class Reader {
  private at = 0;

  constructor(private readonly text: string) {}

  /** The whole text as one value. */
  document(): unknown {
    const value = this.value("", 0);
    this.space();
    if (this.at < this.text.length) this.fail("nothing may follow the end of the document");
    return value;
  }

  private value(pointer: string, depth: number): unknown {
    this.space();
    const c = this.text[this.at];
    if (c === "{" || c === "[") {
      if (depth === textLimits.depth) this.fail(`nested deeper than ${textLimits.depth} levels`);
      return c === "{" ? this.object(pointer, depth + 1) : this.list(pointer, depth + 1);
    }
    if (c === '"') return this.string();
    const number = this.match(NUMBER);
    if (number !== null) return Number(number);
    const before = this.at;
    const word = this.match(WORD);
    if (word !== null && WORDS.has(word)) return WORDS.get(word);
    this.at = before;
    return this.fail(word === null ? "a value is missing" : `${word.slice(0, 20)} is no JSON value`);
  }

  private object(pointer: string, depth: number): unknown {
    const result: Record<string, unknown> = {};
    this.items("}", () => {
      if (this.text[this.at] !== '"') this.fail("a key in double quotes is missing");
      const line = this.line();
      const key = this.string();
      const here = pointerTo(pointer, key);
      if (Object.hasOwn(result, key)) {
        throw new Refusal("refused", [
          {
            pointer: here,
            detail: `${key} is given a second time in line ${line}`,
            accepted: "each key once",
          },
        ]);
      }
      this.space();
      this.expect(":");
      const value = this.value(here, depth);
      // Not by assignment: "__proto__" has to become a key like any other, to be refused as unknown.
      Object.defineProperty(result, key, { value, enumerable: true, writable: true, configurable: true });
    });
    return result;
  }

  private list(pointer: string, depth: number): unknown[] {
    const result: unknown[] = [];
    this.items("]", () => {
      result.push(this.value(pointerTo(pointer, result.length), depth));
    });
    return result;
  }

  /** Items between commas up to the closing bracket. */
  private items(close: string, item: () => void): void {
    this.at += 1;
    this.space();
    if (this.text[this.at] === close) {
      this.at += 1;
      return;
    }
    for (;;) {
      this.space();
      item();
      this.space();
      if (this.text[this.at] === close) break;
      this.expect(",");
    }
    this.at += 1;
  }

  private string(): string {
    const quoted = this.match(STRING);
    return quoted === null ? this.fail("this text in quotes does not end properly") : JSON.parse(quoted);
  }

  private expect(mark: string): void {
    if (this.text[this.at] !== mark) this.fail(`“${mark}” is missing`);
    this.at += 1;
  }

  private space(): void {
    this.match(SPACE);
  }

  private match(pattern: RegExp): string | null {
    pattern.lastIndex = this.at;
    const found = pattern.exec(this.text);
    if (found === null) return null;
    this.at = pattern.lastIndex;
    return found[0];
  }

  private line(): number {
    return this.text.slice(0, this.at).split("\n").length;
  }

  private fail(what: string): never {
    const column = this.at - this.text.lastIndexOf("\n", this.at - 1);
    const where =
      this.at >= this.text.length ? "at the end of the text" : `in line ${this.line()}, column ${column}`;
    throw new Refusal("unparsable", [{ pointer: "", detail: `not JSON: ${what} (${where})` }]);
  }
}

/**
 * The value a JSON text stands for.
 * @throws Refusal "unparsable" with the place, for text that is no JSON, too long or too deeply nested; "refused" for a key given twice.
 */
export function readJson(text: string): unknown {
  const bytes = new TextEncoder().encode(text).length;
  if (bytes > textLimits.bytes) {
    const detail = `the document has ${bytes} bytes; at most ${textLimits.bytes} are read`;
    throw new Refusal("unparsable", [{ pointer: "", detail }]);
  }
  return new Reader(text.startsWith("\ufeff") ? text.slice(1) : text).document();
}
