/** The design of `--demo` as a request: with a key made from its content, it is solved once a store. */
import { createHash } from "node:crypto";
import { checkDesign } from "../../meshes/check.ts";
import { readJson } from "../../meshes/json.ts";
import { readText } from "./input.ts";

/** @throws Refusal when the file is no design */
export async function demoRequest(path: string): Promise<{ text: string; key: string }> {
  const { design } = checkDesign(readJson(await readText(path, process.stdin)));
  const text = JSON.stringify({ kind: "solve", document: design });
  return { text, key: `demo-${createHash("sha256").update(text).digest("hex").slice(0, 32)}` };
}
