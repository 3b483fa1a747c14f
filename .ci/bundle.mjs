/**
 * Builds at need what has to be built: the program (TypeScript to plain JavaScript in dist/) and the page (dist/viewer/).
 * Each is built again only when a file it was made from has changed. The list of those files, with their sizes and dates,
 * lies inside what was built, in the file that is put in place last: outcome and list can never disagree.
 */
import {
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  renameSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { basename, dirname, join, relative } from "node:path";
import { pathToFileURL } from "node:url";
import { root } from "./setup.mjs";

const mark = "\n//# made-from ";

/** Size and date of a file under the root; 0 for a file that is not there. */
function stamp(path) {
  const stat = statSync(join(root, path), { throwIfNoEntry: false });
  return stat ? [stat.size, stat.mtimeMs] : [0, 0];
}

/** The files `paths` with size and date; one written while we built may have been read before or after and is distrusted. */
function stamped(paths, started) {
  const own = [".ci/bundle.mjs", "package.json", "package-lock.json"];
  return [...new Set([...paths, ...own])].map((path) => {
    const [size, date] = stamp(path);
    return [path, size, date > started ? -1 : date];
  });
}

/** Whether every file of a list is as it was. */
const unchanged = (sources) =>
  sources.every(([path, size, date]) => {
    const now = stamp(path);
    return now[0] === size && now[1] === date;
  });

/** Whether the bundle exists and every file it was made from is as it was. */
function fresh(file) {
  if (!existsSync(file)) return false;
  const text = readFileSync(file, "utf8");
  const at = text.lastIndexOf(mark);
  return at >= 0 && unchanged(JSON.parse(text.slice(at + mark.length)));
}

/** Packages that only the service needs; they stay in node_modules, so that a single solve starts without reading them. */
const external = [
  "better-sqlite3",
  "better-sse",
  "compression",
  "express",
  "helmet",
  "kysely",
  "pino",
  "pino-http",
  "piscina",
];

/** The bundled files of the entries { name: path }, as [file name, text], pieces in common first. */
async function bundle(entries) {
  const started = Date.now();
  const { build } = await import("esbuild");
  const made = await build({
    absWorkingDir: root,
    entryPoints: entries,
    outdir: join(root, "dist"),
    outExtension: { ".js": ".mjs" },
    entryNames: "[name]",
    chunkNames: "pieces/[hash]",
    bundle: true,
    splitting: true,
    write: false,
    metafile: true,
    platform: "node",
    format: "esm",
    target: "node20",
    minify: true,
    legalComments: "none",
    logLevel: "silent",
    external,
    // CommonJS packages in the bundle ask for Node's own modules with require, which a module file does not have.
    banner: {
      js: 'import { createRequire as makeRequire } from "node:module"; const require = makeRequire(import.meta.url);',
    },
  });
  const note = `${mark}${JSON.stringify(stamped(Object.keys(made.metafile.inputs), started))}`;
  const names = Object.keys(entries).map((name) => `${name}.mjs`);
  return made.outputFiles
    .map(({ path, text }) => [relative(join(root, "dist"), path), text])
    .map(([name, text]) => (names.includes(name) ? [name, text + note] : [name, text]))
    .sort(([a], [b]) => names.indexOf(a) - names.indexOf(b));
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

/**
 * Folder of the up-to-date bundles `entries` ({ name: path under the root }), built at need. Files are put in place in the
 * bundle's order; the entries come last, and what they import has its content's hash for a name.
 */
async function bundled(entries) {
  const folder = join(root, "dist");
  if (Object.keys(entries).every((name) => fresh(join(folder, `${name}.mjs`)))) return folder;
  const files = await bundle(entries);
  try {
    for (const [name, text] of files) put(join(folder, name), text);
    return folder;
  } catch (error) {
    if (!["EACCES", "EROFS", "EPERM"].includes(error.code)) throw error;
    const elsewhere = mkdtempSync(join(tmpdir(), "emberturn-"));
    process.on("exit", () => rmSync(elsewhere, { recursive: true, force: true }));
    for (const [name, text] of files) put(join(elsewhere, name), text);
    // The service finds its packages and the page beside its bundle.
    symlinkSync(join(root, "node_modules"), join(elsewhere, "node_modules"));
    symlinkSync(join(folder, "viewer"), join(elsewhere, "viewer"));
    return elsewhere;
  }
}

/** Builds the page into dist/viewer/ at need. */
export async function builtViewer() {
  const note = join(root, "dist/viewer/made-from.json");
  if (existsSync(note) && unchanged(JSON.parse(readFileSync(note, "utf8")))) return;
  const started = Date.now();
  const { build } = await import("vite");
  const draft = join(root, `dist/viewer.${process.pid}.tmp`);
  const sources = new Set();
  const list = {
    name: "made-from",
    generateBundle() {
      for (const id of this.getModuleIds()) {
        const path = relative(root, id.split("?")[0]);
        if (!path.startsWith("..") && !path.startsWith("\0")) sources.add(path);
      }
    },
  };
  try {
    await build({
      configFile: join(root, ".config/vite.config.ts"),
      build: { outDir: draft, emptyOutDir: true },
      plugins: [list],
      // A thread of the page is built apart, from files of its own.
      worker: { plugins: () => [list] },
      logLevel: "error",
    });
    const made = stamped(
      [...sources].filter((path) => existsSync(join(root, path))),
      started,
    );
    writeFileSync(join(draft, basename(note)), JSON.stringify(made));
    rmSync(dirname(note), { recursive: true, force: true });
    renameSync(draft, dirname(note));
  } finally {
    rmSync(draft, { recursive: true, force: true });
  }
}

/** What to say when building fails: the builder's own findings with their places, or what kept it from starting. */
function words(error) {
  if (error.code === "ERR_MODULE_NOT_FOUND") return "the packages are not installed yet: run `npm ci` first";
  if (!error.errors) return error.message;
  return error.errors
    .map(({ text, message, location }) =>
      location ? `${location.file}:${location.line}: ${text}` : (text ?? message),
    )
    .join("\n");
}

/** Builds what `needed` builds; in words on stderr, with status 1, when it cannot. */
async function built(needed) {
  try {
    return await needed();
  } catch (error) {
    console.error(`emberturn could not be built: ${words(error)}`);
    process.exitCode = 1;
    return null;
  }
}

/** Runs the bundle `name` in this process, with the given arguments as its command line. */
async function run(folder, name, args) {
  const file = join(folder, `${name}.mjs`);
  process.argv = [process.argv[0], file, ...args];
  await import(pathToFileURL(file).href);
}

/** Runs the command line in this process; with the page built where `args` start the service. */
export async function runEmberturn(args) {
  const folder = await built(async () => {
    if (args[0] === "serve") await builtViewer();
    return bundled({ emberturn: "api/cli/main.ts", pooled: "api/engine/pooled.ts" });
  });
  if (folder !== null) await run(folder, "emberturn", args);
}

/** Runs a TypeScript entry of its own in this process, with the given arguments as its command line. */
export async function runBundled(entry, name, args) {
  const folder = await built(() => bundled({ [name]: entry }));
  if (folder !== null) await run(folder, name, args);
}
