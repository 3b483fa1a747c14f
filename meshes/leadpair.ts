/**
 * A straight pair of leads, go and return side by side, as two rings of very large radius with opposed currents: the same
 * solution then holds the skin and proximity effect of any section. Bending a pair of spacing s to radius r changes R and L per length by
 * parts of the order (s/r)²: those of the order s/r change sign with the side it is bent to.
 */
import { countNodes, cutGrid, type GridAnswer, MU0, prepare, refine, solveState } from "../solver/index.ts";
import { build } from "./build.ts";
import { fallsOf } from "./falls.ts";
import { FARTHEST } from "./leads.ts";
import type { Scene } from "./scene.ts";

/** Radius of the rings in spacings and sections. */
const RADIUS = 100;
/** Bars of the pair against the accuracy asked of the coil: well below, so that the pair never keeps a coil from reaching it. */
const SHARE = 0.3;
/** No grid of the pair beyond the second is made larger than this. */
const MOST_UNKNOWNS = 60_000;

export interface LeadPair {
  /** Ω and H of go and return together; bars as half-widths. */
  readonly resistance: number;
  readonly resistanceBar: number;
  readonly inductance: number;
  readonly inductanceBar: number;
}

/** Resistance and inductance of the scene's leads at its frequency, bars within its accuracy; zeros without leads. Rectangular ones lie one above the other. */
export function leadPair(scene: Scene): LeadPair {
  const { leads, section } = scene;
  if (leads === null) return { resistance: 0, resistanceBar: 0, inductance: 0, inductanceBar: 0 };
  const across = section.kind === "round" ? 2 * section.radius : Math.max(section.width, section.height);
  const spacing = Math.min(leads.spacing, FARTHEST * across);
  const beyond = leads.length * (MU0 / Math.PI) * Math.log(leads.spacing / spacing);
  const r = RADIUS * (spacing + across);
  const pair: Scene = {
    ...scene,
    turns: [
      { r, z: -spacing / 2 },
      { r, z: spacing / 2 },
    ],
    circuit: { turns: 2, path: new Int32Array(2), sense: Int8Array.from([1, -1]) },
    advance: [
      { axial: 0, radial: 0 },
      { axial: 0, radial: 0 },
    ],
    leads: null,
    bodies: [],
    strayPoints: [],
  };
  const built = build(pair);
  const materials = built.materials("empty");
  const falls = fallsOf([]);
  const omega = 2 * Math.PI * scene.frequency;
  const solveAt = (level: number): GridAnswer => {
    const prepared = prepare(
      cutGrid(built.mesh, level),
      materials.map((m) => m.turn),
    );
    const { impedance } = solveState(prepared, { materials, omega }, pair.circuit);
    return {
      level,
      unknowns: prepared.system.structure.unknowns,
      values: new Map([
        ["R", impedance.re],
        ["X", impedance.im],
      ]),
      parts: new Map(),
      falls: new Map([
        ["R", falls.resistance],
        ["X", falls.energy],
      ]),
    };
  };
  const { finest, bars } = refine(
    solveAt,
    (level) => countNodes(built.mesh, level),
    (answer, found) => worstBar(answer, found) / (SHARE * scene.accuracy),
    MOST_UNKNOWNS,
  );
  const scale = leads.length / (2 * Math.PI * r);
  const value = (name: string): number => scale * (finest.values.get(name) ?? 0);
  const bar = (name: string): number => scale * (bars.get(name) ?? 0);
  return {
    resistance: value("R"),
    resistanceBar: bar("R"),
    inductance: value("X") / omega + beyond,
    inductanceBar: bar("X") / omega,
  };
}

/** Largest relative bar. */
function worstBar(answer: GridAnswer, bars: ReadonlyMap<string, number>): number {
  const parts = [...answer.values].map(([name, value]) => (bars.get(name) ?? 0) / Math.abs(value));
  return Math.max(...parts);
}
