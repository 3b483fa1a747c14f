/**
 * What every entry script needs before anything is installed: the project's root, a friendly check of Node's version,
 * and an install at need. Node built-ins only, in syntax that an old Node still parses.
 */
import { spawnSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

/** The project's root folder. */
export const root = dirname(dirname(fileURLToPath(import.meta.url)));

/** The oldest Node that everything here runs on. */
const oldest = [20, 19];

/** Ends the process with friendly words when Node is too old. */
export function checkNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major > oldest[0] || (major === oldest[0] && minor >= oldest[1])) return;
  console.error(
    `emberturn needs Node ${oldest.join(".")} or newer, and this is Node ${process.versions.node}. Please update Node and try again.`,
  );
  process.exit(1);
}

/** Parsed JSON of a file under the root, or null when there is none. */
function readJson(path) {
  const file = join(root, path);
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")) : null;
}

/**
 * Whether node_modules holds what the lockfile names. Versions are compared, not dates, since a checkout moves dates;
 * packages meant for other machines (optional) and tools left out on purpose (dev, with `--omit=dev`) may be missing.
 */
function installed(needTools) {
  const wanted = readJson("package-lock.json");
  const present = readJson("node_modules/.package-lock.json");
  if (wanted === null || present === null) return false;
  return Object.entries(wanted.packages).every(([path, entry]) => {
    if (path === "" || entry.optional || (entry.dev && !needTools)) return true;
    const found = present.packages[path];
    return found !== undefined && found.version === entry.version;
  });
}

/** Runs `npm ci` when something is missing or differs from the lockfile; its words go to stderr. Ends the process when it fails. */
export function ensureInstalled({ tools }) {
  if (installed(tools)) return;
  console.error("Installing what is missing (npm ci) …");
  const npm = process.platform === "win32" ? "npm.cmd" : "npm";
  const extra = tools ? ["--include=dev"] : [];
  const run = spawnSync(npm, ["ci", "--no-audit", "--no-fund", ...extra], {
    cwd: root,
    stdio: ["ignore", 2, 2],
    shell: process.platform === "win32",
  });
  if (run.signal) process.kill(process.pid, run.signal);
  if (run.status !== 0) {
    console.error("npm ci did not succeed; its words above say why.");
    process.exit(run.status ?? 1);
  }
}
