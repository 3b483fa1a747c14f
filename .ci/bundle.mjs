/**
 * Builds a TypeScript entry into one file of plain JavaScript, only when something it was made from has changed.
 * The list of those files, with their sizes and dates, is the bundle's own last line: bundle and list can never disagree.
 */
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { pathToFileURL } from "node:url";
import { root } from "./setup.mjs";

const mark = "\n//# made-from ";

/** Size and date of a file under the root; 0 for a file that is not there. */
function stamp(path) {
  const stat = statSync(join(root, path), { throwIfNoEntry: false });
  return stat ? [stat.size, stat.mtimeMs] : [0, 0];
}

/** Whether the bundle exists and every file it was made from is as it was. */
function fresh(file) {
  if (!existsSync(file)) return false;
  const text = readFileSync(file, "utf8");
  const at = text.lastIndexOf(mark);
  if (at < 0) return false;
  return JSON.parse(text.slice(at + mark.length)).every(([path, size, date]) => {
    const now = stamp(path);
    return now[0] === size && now[1] === date;
  });
}

/** The bundled text of an entry, its list of sources as the last line. */
async function bundle(entry) {
  const started = Date.now();
  const { build } = await import("esbuild");
  const made = await build({
    absWorkingDir: root,
    entryPoints: [entry],
    bundle: true,
    write: false,
    metafile: true,
    platform: "node",
    format: "esm",
    target: "node20",
    minify: true,
    legalComments: "none",
    logLevel: "silent",
    // CommonJS packages in the bundle ask for Node's own modules with require, which a module file does not have.
    banner: {
      js: 'import { createRequire as makeRequire } from "node:module"; const require = makeRequire(import.meta.url);',
    },
  });
  const own = [".ci/bundle.mjs", "package.json", "package-lock.json"];
  const sources = [...Object.keys(made.metafile.inputs), ...own].map((path) => {
    const [size, date] = stamp(path);
    // A file written while we built may have been read before or after: distrust it, so that the next start builds again.
    return [path, size, date > started ? -1 : date];
  });
  return `${made.outputFiles[0].text}${mark}${JSON.stringify(sources)}`;
}

/** Puts the text in place in one step, so that two starts at once never read half a file. */
function put(file, text) {
  mkdirSync(dirname(file), { recursive: true });
  const draft = `${file}.${process.pid}.tmp`;
  try {
    writeFileSync(draft, text);
    renameSync(draft, file);
  } finally {
    rmSync(draft, { force: true });
  }
}

/** Path of the up-to-date bundle of `entry` (a path under the root), called `name`, built at need. */
async function bundled(entry, name) {
  const file = join(root, "dist", `${name}.mjs`);
  if (fresh(file)) return file;
  const text = await bundle(entry);
  try {
    put(file, text);
    return file;
  } catch (error) {
    if (!["EACCES", "EROFS", "EPERM"].includes(error.code)) throw error;
    const folder = mkdtempSync(join(tmpdir(), "emberturn-"));
    process.on("exit", () => rmSync(folder, { recursive: true, force: true }));
    const elsewhere = join(folder, `${name}.mjs`);
    writeFileSync(elsewhere, text);
    return elsewhere;
  }
}

/** What to say when building fails: esbuild's own findings with their places, or what kept it from starting. */
function words(error) {
  if (error.code === "ERR_MODULE_NOT_FOUND") return "the packages are not installed yet: run `npm ci` first";
  if (!error.errors) return error.message;
  return error.errors
    .map(({ text, location }) => (location ? `${location.file}:${location.line}: ${text}` : text))
    .join("\n");
}

/** Runs a TypeScript entry in this process, with the given arguments as its command line. */
export async function runBundled(entry, name, args) {
  let file;
  try {
    file = await bundled(entry, name);
  } catch (error) {
    console.error(`emberturn could not be built: ${words(error)}`);
    process.exitCode = 1;
    return;
  }
  process.argv = [process.argv[0], file, ...args];
  await import(pathToFileURL(file).href);
}
