/** Examples of the OpenAPI document, invented; a test holds them to their schemas. */
import type { Job } from "./contract/job.ts";
import type { Problem } from "./contract/problem.ts";

export const designExample = {
  name: "Tarnhollow 14: ring for shrink fitting",
  coil: {
    conductor: { section: "roundTube", outsideDiameterMm: 8, wallMm: 1, material: "copper" },
    winding: { form: "helix", boreDiameterMm: 70, turns: 3, pitchMm: 12 },
  },
  parts: [
    {
      name: "ring",
      shape: "cylinder",
      diameterMm: 50,
      boreDiameterMm: 30,
      lengthMm: 20,
      material: { resistivityOhmM: 2.2e-7, relativePermeability: 80 },
    },
  ],
  drive: { frequencyHz: 10000, currentA: 300 },
  accuracyPercent: 1,
};

export const jobExample: Job = {
  id: "0f3b7a52-5d0e-4f0b-9a51-8f2c6d1e7b90",
  kind: "solve",
  name: designExample.name,
  state: "running",
  progress: 0.2,
  stage: "second grid, 16941 unknowns",
  firstDigits: {
    emptyOhm: 1.679e-3,
    emptyH: 7.285e-7,
    loadedOhm: 1.3213e-2,
    loadedH: 8.493e-7,
    withinPercent: null,
  },
  createdAt: "2026-03-02T08:15:00.000Z",
  startedAt: "2026-03-02T08:15:00.010Z",
  endedAt: null,
  problem: null,
};

export const problemExample: Problem = {
  type: "urn:emberturn:problem:unknown",
  title: "There is no such job",
  status: 404,
  detail: "No job has this id, or it has been removed.",
  errors: [],
};

export const refusalExample: Problem = {
  type: "urn:emberturn:problem:refused",
  title: "The design cannot be solved as it stands",
  status: 422,
  detail: "pin overlaps turn 3 by 0.8 mm",
  errors: [{ pointer: "/parts/0", detail: "pin overlaps turn 3 by 0.8 mm", accepted: "diameterMm below 50" }],
};
