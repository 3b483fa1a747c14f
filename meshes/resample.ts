/**
 * Resamples solved states onto a grid of lines (fieldlines.ts). Nodes take ψ/r and B from the solution where they stand. Cells take the power of the
 * solver's own cells, cut into pieces and shared out by the volumes they overlap (overlap.ts), so that nothing is lost or gained:
 *
 *   p_ik V_ik = Σ_pieces P · V(piece ∩ ik)/V(piece),   |J|²_ik V_ik = Σ_pieces σ P_J · V(piece ∩ ik)/V(piece).
 */
import { heatSampler, makeLocator, makeProbe, type Place } from "../solver/index.ts";
import type { Answer, Solved } from "./answer.ts";
import { fieldLines, type Lines } from "./fieldlines.ts";
import type { FieldGrid, Fields, StateFields } from "./fields.ts";
import { ringSplitter } from "./overlap.ts";
import type { Scene } from "./scene.ts";

/** Nodes on a surface are read this far inside it, in the arrangement's half-size: far above rounding, far below any cell. */
const INSIDE = 1e-8;
/** A state is cut into about so many pieces, each cell alike, into at most so many along. */
const PIECES = 8_000;
const MOST_ALONG = 4;

/** Both states of an answer at `current` A through the coil. Throws SolverError where a node lies in no cell. */
export function resample(scene: Scene, answer: Answer, current: number): Fields {
  const lines = fieldLines(scene);
  const grid = gridOf(lines.r.at, lines.z.at);
  const nodes = readNodes(grid, lines, answer);
  const state = (s: Solved): StateFields => ({ ...nodes(s, current), ...readCells(grid, lines, s, current) });
  return {
    grid,
    loaded: answer.loaded === null ? null : state(answer.loaded),
    empty: state(answer.empty),
  };
}

function gridOf(rLines: Float64Array, zLines: Float64Array): FieldGrid {
  const [nr, nz] = [rLines.length, zLines.length];
  return {
    nr,
    nz,
    r: Float64Array.from({ length: nr * nz }, (_, n) => rLines[Math.floor(n / nz)] ?? 0),
    z: Float64Array.from({ length: nr * nz }, (_, n) => zLines[n % nz] ?? 0),
  };
}

interface TwoLines {
  readonly r: Lines;
  readonly z: Lines;
  readonly size: number;
}

type NodeFields = Pick<StateFields, "vectorPotential" | "fluxDensity">;

/** Reads states at all nodes. Both stand on one grid, so places are looked up once. */
function readNodes(
  { nr, nz }: FieldGrid,
  lines: TwoLines,
  { empty }: Answer,
): (state: Solved, current: number) => NodeFields {
  const inside = ({ at, side }: Lines): Float64Array =>
    at.map((x, i) => x + INSIDE * lines.size * (side[i] ?? 0));
  const [rs, zs] = [inside(lines.r), inside(lines.z)];
  const locate = makeLocator(empty.solution.prepared);
  const places = new Map<number, Place | null>();
  return ({ solution }, current) => {
    const count = nr * nz;
    const zeros = (n: number): NodeFields["fluxDensity"] => ({
      re: new Float64Array(n),
      im: new Float64Array(n),
    });
    const [a, b] = [zeros(count), zeros(2 * count)];
    let node = 0;
    const probe = makeProbe(solution, (r, z) => {
      const known = places.get(node);
      if (known !== undefined) return known;
      const found = locate(r, z);
      places.set(node, found);
      return found;
    });
    for (; node < count; node++) {
      const r = rs[Math.floor(node / nz)] ?? 0;
      const { psi, br, bz } = probe(r, zs[node % nz] ?? 0);
      a.re[node] = r > 0 ? (current * psi.re) / r : 0;
      a.im[node] = r > 0 ? (current * psi.im) / r : 0;
      b.re[node] = current * br.re;
      b.im[node] = current * br.im;
      b.re[count + node] = current * bz.re;
      b.im[count + node] = current * bz.im;
    }
    return { vectorPotential: a, fluxDensity: b };
  };
}

function readCells(
  { nr, nz }: FieldGrid,
  lines: TwoLines,
  { solution, losses }: Solved,
  current: number,
): Pick<StateFields, "powerDensity" | "currentDensity"> {
  const { grid } = solution.prepared;
  const powerDensity = new Float64Array((nr - 1) * (nz - 1));
  const currentDensity = new Float64Array((nr - 1) * (nz - 1));
  const hot = Array.from(grid.cellRegion.keys()).filter((c) => (losses.cellPower[c] ?? 0) > 0);
  const m = Math.min(MOST_ALONG, Math.max(1, Math.floor(Math.sqrt(PIECES / hot.length))));
  const read = heatSampler(solution, m, "middles");
  const split = ringSplitter(lines.r.at, lines.z.at);
  const corners = new Float64Array(8);
  let [watts, squares] = [0, 0];
  const add = (cell: number, share: number): void => {
    powerDensity[cell] = (powerDensity[cell] ?? 0) + share * watts;
    currentDensity[cell] = (currentDensity[cell] ?? 0) + share * squares;
  };
  for (const c of hot) {
    const samples = read(c);
    const { volume, density, joule } = samples;
    const sampled = density.reduce((sum, p, i) => sum + p * (volume[i] ?? 0), 0);
    const scale = ((losses.cellPower[c] ?? 0) * current ** 2) / sampled;
    const conductivity = solution.materials[grid.cellRegion[c] ?? 0]?.conductivity ?? 0;
    for (let p = 0; p < volume.length; p++) {
      const low = p + Math.floor(p / m);
      putCorner(corners, 0, samples, low);
      putCorner(corners, 1, samples, low + 1);
      putCorner(corners, 2, samples, low + m + 2);
      putCorner(corners, 3, samples, low + m + 1);
      watts = scale * (volume[p] ?? 0) * (density[p] ?? 0);
      squares = scale * (volume[p] ?? 0) * (joule[p] ?? 0) * conductivity;
      split(corners, add);
    }
  }
  for (let i = 0; i + 1 < nr; i++) {
    const [r0, r1] = [lines.r.at[i] ?? 0, lines.r.at[i + 1] ?? 0];
    for (let k = 0; k + 1 < nz; k++) {
      const cell = i * (nz - 1) + k;
      const volume = Math.PI * (r1 - r0) * (r1 + r0) * ((lines.z.at[k + 1] ?? 0) - (lines.z.at[k] ?? 0));
      powerDensity[cell] = (powerDensity[cell] ?? 0) / volume;
      currentDensity[cell] = Math.sqrt((currentDensity[cell] ?? 0) / volume);
    }
  }
  return { powerDensity, currentDensity };
}

function putCorner(
  corners: Float64Array,
  k: number,
  { cornerR, cornerZ }: { readonly cornerR: Float64Array; readonly cornerZ: Float64Array },
  from: number,
): void {
  corners[2 * k] = cornerR[from] ?? 0;
  corners[2 * k + 1] = cornerZ[from] ?? 0;
}
