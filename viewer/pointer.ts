/** Reading and writing a JSON document at a JSON Pointer (RFC 6901), without changing the document it came from. */

/** The keys of a pointer; [] for "". */
export function keysOf(pointer: string): string[] {
  if (pointer === "") return [];
  return pointer
    .slice(1)
    .split("/")
    .map((key) => key.replaceAll("~1", "/").replaceAll("~0", "~"));
}

type Node = Readonly<Record<string, unknown>> | readonly unknown[];

const isNode = (value: unknown): value is Node => typeof value === "object" && value !== null;

/** The value at `pointer`; undefined where there is none. */
export function valueAt(document: unknown, pointer: string): unknown {
  let value = document;
  for (const key of keysOf(pointer)) {
    if (!isNode(value) || !Object.hasOwn(value, key)) return undefined;
    value = (value as Record<string, unknown>)[key];
  }
  return value;
}

/** `document` with `value` at `pointer`, objects on the way made where missing; undefined takes the key away. */
export function withValueAt(document: unknown, pointer: string, value: unknown): unknown {
  return set(document, keysOf(pointer), value);
}

function set(node: unknown, keys: readonly string[], value: unknown): unknown {
  const [key, ...rest] = keys;
  if (key === undefined) return value;
  if (Array.isArray(node)) return setItem(node, key, rest, value);
  const before = isNode(node) ? (node as Record<string, unknown>) : {};
  const inner = set(before[key], rest, value);
  if (inner !== undefined) return { ...before, [key]: inner };
  const { [key]: _gone, ...others } = before;
  return others;
}

function setItem(list: readonly unknown[], key: string, rest: readonly string[], value: unknown): unknown[] {
  const at = key === "-" ? list.length : Number(key);
  const inner = set(list[at], rest, value);
  return inner === undefined ? list.filter((_, i) => i !== at) : Object.assign([...list], { [at]: inner });
}
