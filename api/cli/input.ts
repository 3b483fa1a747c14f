/** Reading a document from a file or from standard input; everything that can go wrong there is a refusal in words. */
import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import type { Readable } from "node:stream";
import { Refusal } from "../../meshes/refusal.ts";

/** More than any document needs; what is larger is surely another file. */
const mostBytes = 16e6;

function unreadable(detail: string, accepted?: string): Refusal {
  return new Refusal("unparsable", [
    { pointer: "", detail, ...(accepted === undefined ? {} : { accepted }) },
  ]);
}

/** Why a file could not be read, in words. */
function reason(path: string, error: unknown): Refusal {
  const code = error instanceof Error && "code" in error ? String(error.code) : "";
  const said: Record<string, string> = {
    ENOENT: `there is no file ${path}`,
    ENOTDIR: `there is no file ${path}`,
    EACCES: `${path} may not be read by this user`,
    EPERM: `${path} may not be read by this user`,
    EISDIR: `${path} is a folder, not a design file`,
  };
  return unreadable(said[code] ?? `${path} could not be read${code === "" ? "" : ` (${code})`}`);
}

/** All bytes of a stream, up to the limit, as UTF-8 text (a byte order mark is dropped). */
async function textOf(stream: Readable, name: string): Promise<string> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of stream) {
    const bytes = Buffer.isBuffer(chunk) ? chunk : Buffer.from(String(chunk));
    size += bytes.length;
    if (size > mostBytes)
      throw unreadable(`${name} is larger than ${mostBytes / 1e6} MB`, "a design document");
    chunks.push(bytes);
  }
  if (size === 0) throw unreadable(`${name} is empty`, "a design document in JSON");
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(Buffer.concat(chunks));
  } catch {
    throw unreadable(`${name} is not UTF-8 text`, "a design document in JSON");
  }
}

/**
 * The text of a document.
 * @param path a file's path, or "-" for `stdin`
 * @throws Refusal when there is no such file, it is a folder, unreadable, empty, too large, or no text
 */
export async function readText(path: string, stdin: Readable): Promise<string> {
  try {
    if (path === "-") return await textOf(stdin, "standard input");
    if ((await stat(path)).isDirectory()) throw unreadable(`${path} is a folder, not a design file`);
    return await textOf(createReadStream(path), path);
  } catch (error) {
    throw error instanceof Refusal ? error : reason(path === "-" ? "standard input" : path, error);
  }
}
