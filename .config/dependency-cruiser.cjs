/** Who may import whom. One way only: solver <- meshes; solver, meshes <- validation; solver, meshes <- api <- viewer. */
/** Tests, and what only tests read. */
const test = "(\\.test|/fixtures|/drafts)\\.tsx?$|^viewer/e2e/";

/** @type {import("dependency-cruiser").IConfiguration} */
module.exports = {
  forbidden: [
    {
      name: "no-cycles",
      comment: "Data flows one way: modules that need each other are one module or need a third.",
      severity: "error",
      from: {},
      to: { circular: true },
    },
    {
      name: "solver-stands-alone",
      comment: "solver/ knows no other folder.",
      severity: "error",
      from: { path: "^solver/" },
      to: { path: "^(meshes|validation|api|viewer)/" },
    },
    {
      name: "solver-is-pure",
      comment: "solver/ runs anywhere: nothing of Node in it (its tests may).",
      severity: "error",
      from: { path: "^solver/", pathNot: test },
      to: { dependencyTypes: ["core"] },
    },
    {
      name: "solver-by-its-front-door",
      comment: "Other folders import solver/index.ts and nothing behind it.",
      severity: "error",
      from: { pathNot: "^solver/" },
      to: { path: "^solver/", pathNot: "^solver/index\\.ts$" },
    },
    {
      name: "meshes-import-only-solver",
      severity: "error",
      from: { path: "^meshes/" },
      to: { path: "^(validation|api|viewer)/" },
    },
    {
      name: "nothing-imports-validation",
      severity: "error",
      from: { pathNot: "^validation/" },
      to: { path: "^validation/" },
    },
    {
      name: "validation-imports-solver-and-meshes",
      severity: "error",
      from: { path: "^validation/" },
      to: { path: "^(api|viewer)/" },
    },
    {
      name: "api-does-not-import-viewer",
      severity: "error",
      from: { path: "^api/" },
      to: { path: "^viewer/" },
    },
    {
      name: "viewer-sees-the-contract-only",
      comment:
        "The page is built for browsers: of api/ it sees api/contract/ and api/format/, of the rest pure helpers of meshes/.",
      severity: "error",
      from: { path: "^viewer/" },
      to: { path: "^(solver|validation|api/(?!contract/|format/))" },
    },
    {
      name: "contract-and-format-run-in-browsers",
      comment: "What the page sees of api/ is free of Node, and of the rest of api/.",
      severity: "error",
      from: { path: "^api/(contract|format)/", pathNot: test },
      to: { path: "^api/(?!contract/|format/)|^node:", dependencyTypesNot: ["type-only"] },
    },
    {
      name: "no-tools-in-the-product",
      comment: "What runs for users depends on dependencies, never on devDependencies.",
      severity: "error",
      from: { path: "^(solver|meshes|api|viewer)/", pathNot: test },
      to: { dependencyTypes: ["npm-dev", "npm-no-pkg", "npm-unknown"], dependencyTypesNot: ["type-only"] },
    },
    {
      name: "everything-resolves",
      severity: "error",
      from: {},
      to: { couldNotResolve: true },
    },
  ],
  options: {
    doNotFollow: { path: "node_modules" },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: "tsconfig.json" },
    enhancedResolveOptions: { extensions: [".ts", ".tsx", ".js", ".json", ".css"] },
  },
};
