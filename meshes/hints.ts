/** What would be accepted in place of a body that is in the way: the one measure of its own that needs the smallest change. */
import { boxAround, type Copper, type Placed } from "./layout.ts";
import type { Box, Xy } from "./planar.ts";
import { figureBox, toFigure } from "./shapes.ts";

interface Hint {
  readonly words: string;
  /** How far a surface has to move, mm. */
  readonly change: number;
}

/** A measure that takes `placed` out of the coil's way; undefined for outlines, whose points we do not rearrange. */
export function clearOfCopper(copper: Copper, placed: Placed): string | undefined {
  const { body } = placed;
  const solid = body.shape === "stack" ? body.of : body;
  if (solid.shape === "outline") return undefined;
  const prefix = body.shape === "stack" ? "of/" : "";
  const turns = copper.figures.map(figureBox);
  if (solid.shape === "sphere") {
    const centres = placed.pieces.flatMap((p): Xy[] => (p.kind === "disc" ? [[p.r, p.z]] : []));
    const room = 2 * Math.min(...centres.flatMap((c) => copper.figures.map((f) => toFigure(c, f))));
    return room > 0 ? `${prefix}diameterMm below ${below(room)}` : undefined;
  }
  const own = boxAround(placed.pieces);
  if (own === null) return undefined;
  const level = turns.filter((t) => t.low < own.high && t.high > own.low);
  const hints = [
    ...diameterHints(solid, level).map((h) => ({ ...h, words: prefix + h.words })),
    ...heightHints(own, turns, solid.centreZMm).map((h) => ({ ...h, words: prefix + h.words })),
  ];
  return least(hints);
}

/** A height at which `later` stands clear of `earlier` by their boxes. */
export function beside(later: Placed, earlier: Placed): string | undefined {
  const solid = later.body.shape === "stack" ? later.body.of : later.body;
  const [own, other] = [boxAround(later.pieces), boxAround(earlier.pieces)];
  if (solid.shape === "outline" || own === null || other === null) return undefined;
  const hint = least(heightHints(own, [other], solid.centreZMm));
  if (hint === undefined) return undefined;
  return (
    (later.body.shape === "stack" ? "of/" : "") +
    hint.replace("above", "at least").replace("below", "at most")
  );
}

function diameterHints(c: { diameterMm: number; boreDiameterMm: number }, level: readonly Box[]): Hint[] {
  if (level.length === 0) return [];
  const room = 2 * Math.min(...level.map((t) => t.left));
  const reach = 2 * Math.max(...level.map((t) => t.right));
  const hints: Hint[] = [];
  if (room > c.boreDiameterMm && room <= c.diameterMm) {
    hints.push({ words: `diameterMm below ${below(room)}`, change: (c.diameterMm - room) / 2 });
  }
  if (reach < c.diameterMm && reach >= c.boreDiameterMm) {
    hints.push({ words: `boreDiameterMm above ${above(reach)}`, change: (reach - c.boreDiameterMm) / 2 });
  }
  return hints;
}

function heightHints(own: Box, others: readonly Box[], centreZMm: number): Hint[] {
  const inTheWay = others.filter((o) => o.left < own.right && o.right > own.left);
  if (inTheWay.length === 0) return [];
  const up = Math.max(...inTheWay.map((o) => o.high)) - own.low;
  const down = own.high - Math.min(...inTheWay.map((o) => o.low));
  return [
    { words: `centreZMm above ${above(centreZMm + up)}`, change: up },
    { words: `centreZMm below ${below(centreZMm - down)}`, change: down },
  ];
}

function least(hints: readonly Hint[]): string | undefined {
  let best: Hint | undefined;
  for (const hint of hints) if (best === undefined || hint.change < best.change) best = hint;
  return best?.words;
}

/** Rounded towards the acceptable side, to six digits; noise of the last bits is no digit. */
function below(x: number): string {
  return rounded(x, Math.floor);
}

function above(x: number): string {
  return rounded(x, Math.ceil);
}

function rounded(x: number, towards: (x: number) => number): string {
  const near = Number(x.toPrecision(12));
  const unit = 10 ** (Math.floor(Math.log10(Math.abs(near) || 1)) - 5);
  const steps = near / unit;
  const whole = Math.abs(steps - Math.round(steps)) < 1e-6 ? Math.round(steps) : towards(steps);
  return String(Number((whole * unit).toPrecision(6)));
}
