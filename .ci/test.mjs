/**
 * `npm test`: installs what is missing, then runs every check, whatever the ones before it said. Its last line counts them:
 * each test of vitest is one, each other tool is one. Under CI a skipped test counts as failed; elsewhere it is counted as not
 * run, since a machine may lack the browser (the tests say how to install it). Arguments are handed to vitest.
 */
import { spawn } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { checkNode, ensureInstalled, root } from "./setup.mjs";

checkNode();
ensureInstalled({ tools: true });

/** The step's process, to be ended with us. */
let running;
for (const [signal, status] of [
  ["SIGINT", 130],
  ["SIGTERM", 143],
]) {
  process.on(signal, () => {
    running?.kill(signal);
    process.exit(status);
  });
}

/** Runs a script of package.json in the foreground; its exit status, 1 when a signal ended it. */
function npmRun(script, args = []) {
  return new Promise((resolve) => {
    const child = spawn("npm", ["run", "--silent", script, ...(args.length > 0 ? ["--", ...args] : [])], {
      cwd: root,
      stdio: ["ignore", "inherit", "inherit"],
      shell: process.platform === "win32",
    });
    running = child;
    child.on("error", () => resolve(1));
    child.on("close", (status) => resolve(status ?? 1));
  });
}

/** Counts vitest's tests from its JSON report; a file that did not load counts as one failure. */
function countTests(report, status) {
  const total = { passed: 0, failed: 0, notRun: 0 };
  for (const file of report.testResults) {
    const states = file.assertionResults.map((test) => test.status);
    const passed = states.filter((state) => state === "passed").length;
    const skipped = states.filter((state) => state === "skipped" || state === "pending").length;
    const notRun = process.env.CI ? 0 : skipped;
    total.passed += passed;
    total.notRun += notRun;
    total.failed += states.length - passed - notRun;
    if (file.status !== "passed" && passed + skipped === states.length) total.failed += 1;
  }
  if (total.passed + total.failed === 0 || (status !== 0 && total.failed === 0)) total.failed += 1;
  return total;
}

/** Runs vitest and counts its tests; no report at all counts as one failure. */
async function unitTests(args) {
  const folder = mkdtempSync(join(tmpdir(), "emberturn-test-"));
  const file = join(folder, "report.json");
  try {
    const status = await npmRun("unit", [
      "--reporter=default",
      "--reporter=json",
      `--outputFile.json=${file}`,
      ...args,
    ]);
    return countTests(JSON.parse(readFileSync(file, "utf8")), status);
  } catch {
    return { passed: 0, failed: 1, notRun: 0 };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Every step: its name for people, and what it counts. */
const tool = (name, script) => ({
  name,
  run: async () => {
    const failed = (await npmRun(script)) === 0 ? 0 : 1;
    return { passed: 1 - failed, failed, notRun: 0 };
  },
});
const steps = [
  tool("types", "typecheck"),
  tool("lint and format", "lint"),
  tool("one-way imports", "imports"),
  tool("no dead code", "dead-code"),
  { name: "tests", run: () => unitTests(process.argv.slice(2)) },
];

const total = { passed: 0, failed: 0, notRun: 0 };
const lines = [];
for (const step of steps) {
  console.log(`\n=== ${step.name}`);
  const began = Date.now();
  const count = await step.run();
  total.passed += count.passed;
  total.failed += count.failed;
  total.notRun += count.notRun;
  const seconds = ((Date.now() - began) / 1000).toFixed(1);
  const verdict = count.failed === 0 ? "ok" : "FAILED";
  lines.push(
    `${step.name.padEnd(16)} ${verdict.padEnd(6)} ${count.passed} passed, ${count.failed} failed (${seconds} s)`,
  );
}

console.log(`\n${lines.join("\n")}\n`);
if (total.notRun > 0)
  console.log(`${total.notRun} not run on this machine; the words above say what is missing.`);
console.log(`${total.passed} passed, ${total.failed} failed`);
process.exitCode = total.failed === 0 ? 0 : 1;
