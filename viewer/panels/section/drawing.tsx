/** The drawing itself as SVG: both halves, centre line, hatching, turn numbers, names, dimension lines, scale bar. */
import type { Copper, Layout, Placed } from "../../../meshes/layout.ts";
import type { Box } from "../../../meshes/planar.ts";
import { type Figure, figureBox } from "../../../meshes/shapes.ts";
import { type Arranged, FOOT, type Laid, scaleBarMm, type View, wordsWidth, xOf, yOf } from "./arrange.ts";
import { mm } from "./dimensions.ts";
import { placeName } from "./names.ts";
import { borePath, dimensionPath, edgePath, pathOf } from "./paths.ts";
import type { Refused } from "./refused.ts";

interface Props {
  readonly layout: Layout;
  readonly box: Box;
  readonly refused: Refused;
  readonly arranged: Arranged;
  readonly picture: { readonly width: number; readonly height: number; readonly fontPx: number };
  /** Pointers of bodies whose names stand outside. */
  readonly told: ReadonlySet<string>;
  readonly label: string;
}

export function Drawing({ layout, box, refused, arranged, picture, told, label }: Props) {
  const { view, laid } = arranged;
  const { width, height, fontPx } = picture;
  return (
    <svg
      role="img"
      aria-label={label}
      viewBox={`0 0 ${width} ${height}`}
      width={width}
      height={height}
      font-size={fontPx}
    >
      <defs>
        <pattern
          id="refused-hatch"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path class="hs-hatch" d="M0 0V7" />
        </pattern>
      </defs>
      <use class="mirrored" href="#right-half" transform={`translate(${2 * view.axisX} 0) scale(-1 1)`} />
      <g id="right-half">
        <Figures layout={layout} refused={refused} view={view} />
      </g>
      <path class="axis" d={`M${view.axisX} ${yOf(view, box.high) - 10}V${yOf(view, box.low) + 10}`} />
      {laid.map((l, i) => (
        <DimensionLines key={i} laid={l} view={view} />
      ))}
      {layout.copper !== null && <TurnNumbers copper={layout.copper} bodies={layout.bodies} view={view} />}
      {layout.bodies.map(
        (body) =>
          told.has(body.pointer) || <Name key={body.pointer} body={body} view={view} fontPx={fontPx} />,
      )}
      <Foot view={view} picture={picture} />
    </svg>
  );
}

function Figures({ layout, refused, view }: Pick<Props, "layout" | "refused"> & { view: View }) {
  const { copper, bodies } = layout;
  return (
    <>
      {bodies.map((body) => {
        const kind = body.pointer.startsWith("/parts") ? "part" : "guide";
        const isRefused = refused.bodies.has(body.pointer);
        return <Filled key={body.pointer} pieces={body.pieces} kind={kind} refused={isRefused} view={view} />;
      })}
      {copper !== null && <CopperFigures copper={copper} refused={refused} view={view} />}
    </>
  );
}

function CopperFigures({ copper, refused, view }: { copper: Copper; refused: Refused; view: View }) {
  const { figures, section, turns } = copper;
  const hatched = figures.filter((_, k) => refused.turn(k));
  const against = turns.filter((t) => t.sense === -1);
  return (
    <>
      <path
        class="hs-copper hs-edge"
        style={{ strokeWidth: Math.min(1, (section.radialMm * view.scale) / 10) }}
        fill-rule="evenodd"
        d={pathOf(figures, view) + borePath(figures, section, view)}
      />
      {against.length > 0 && (
        <path class="hs-against" d={against.map((t) => cross(t, section.radialMm, view)).join("")} />
      )}
      {hatched.length > 0 && <path class="hs-refused hs-edge-refused" d={pathOf(hatched, view)} />}
    </>
  );
}

/** A cross through a turn wound against the rest. */
function cross(t: { r: number; z: number }, size: number, view: View): string {
  const half = (size / 2) * view.scale * 0.7;
  const [x, y] = [xOf(view, t.r), yOf(view, t.z)];
  return `M${x - half} ${y - half}L${x + half} ${y + half}M${x - half} ${y + half}L${x + half} ${y - half}`;
}

interface FilledProps {
  readonly pieces: readonly Figure[];
  readonly kind: "part" | "guide";
  readonly refused: boolean;
  readonly view: View;
}

function Filled({ pieces, kind, refused, view }: FilledProps) {
  const d = pathOf(pieces, view);
  return (
    <>
      <path class={`hs-${kind}`} d={d} />
      {refused && <path class="hs-refused" d={d} />}
      <path class={refused ? "hs-edge hs-edge-refused" : "hs-edge"} d={edgePath(pieces, view)} />
    </>
  );
}

function Name({ body, view, fontPx }: { body: Placed; view: View; fontPx: number }) {
  const place = placeName(body.pieces, body.label, view, fontPx);
  if (place === null) return null;
  const turned = place.upright ? `rotate(-90 ${place.x} ${place.y})` : undefined;
  return (
    <text
      class={body.pointer.startsWith("/parts") ? "name" : "name name-of-guide"}
      x={place.x}
      y={place.y}
      transform={turned}
    >
      {body.label}
    </text>
  );
}

/** All numbers (counted from 0, as everywhere) inside the copper where they fit, else the first and last beside it. */
function TurnNumbers({ copper, bodies, view }: { copper: Copper; bodies: readonly Placed[]; view: View }) {
  const { turns, section, figures } = copper;
  if (turns.length > 60) return null;
  const across = Math.min(section.radialMm, section.axialMm) * view.scale;
  if (across >= 19) {
    return (
      <>
        {turns.map((t, k) => (
          <text key={k} class="turn" x={xOf(view, t.r)} y={yOf(view, t.z)}>
            {k}
          </text>
        ))}
      </>
    );
  }
  const others = [...figures, ...bodies.flatMap((b) => b.pieces)];
  const flat = turns.length > 1 && turns.every((t) => t.z === turns[0]!.z);
  return (
    <>
      {[...new Set([0, turns.length - 1])].map((k) => {
        const place = besideTurn(figures[k]!, String(k), flat, others, view);
        return (
          place && (
            <text key={k} class="turn" x={place.x} y={place.y}>
              {k}
            </text>
          )
        );
      })}
    </>
  );
}

/** A place right of a turn (under it in a flat coil) that nothing else covers. */
function besideTurn(turn: Figure, words: string, flat: boolean, others: readonly Figure[], view: View) {
  const box = figureBox(turn);
  const half = { w: 4 + 3.5 * words.length, h: 7 };
  const right = { x: xOf(view, box.right) + half.w, y: yOf(view, (box.low + box.high) / 2) };
  const under = { x: xOf(view, (box.left + box.right) / 2), y: yOf(view, box.low) + half.h + 2 };
  const free = ({ x, y }: { x: number; y: number }) =>
    others.every((f) => {
      if (f === turn) return true;
      const b = figureBox(f);
      return (
        xOf(view, b.left) > x + half.w ||
        xOf(view, b.right) < x - half.w ||
        yOf(view, b.low) < y - half.h ||
        yOf(view, b.high) > y + half.h
      );
    });
  return (flat ? [under, right] : [right, under]).find(free);
}

function DimensionLines({ laid, view }: { laid: Laid; view: View }) {
  const { side, segment } = laid.dimension;
  const upright = side === "left" || side === "right";
  if (segment !== undefined) return <Leader laid={laid} upright={upright} segment={segment} view={view} />;
  const { thin, heads } = dimensionPath(laid, upright);
  return (
    <>
      <path class="dimension" d={thin} />
      <path class="heads" d={heads} />
    </>
  );
}

interface LeaderProps {
  readonly laid: Laid;
  readonly upright: boolean;
  readonly segment: NonNullable<Laid["dimension"]["segment"]>;
  readonly view: View;
}

/** A measure at its place, from end to end, and the line that leads from its middle to its words. */
function Leader({ laid, upright, segment, view }: LeaderProps) {
  const end = laid.line;
  const d = upright ? `M${laid.fromAt} ${laid.from}H${end}` : `M${laid.from} ${laid.fromAt}V${end}`;
  const [a, b] = segment;
  const [ax, ay, bx, by] = [xOf(view, a[0]), yOf(view, a[1]), xOf(view, b[0]), yOf(view, b[1])];
  return (
    <>
      <path class="dimension" d={d} />
      <path class="gap" d={`M${ax} ${ay}L${bx} ${by}`} />
      <circle class="heads" cx={ax} cy={ay} r="2.2" />
      <circle class="heads" cx={bx} cy={by} r="2.2" />
    </>
  );
}

/** Scale bar, and the unit of every figure above it. */
function Foot({ view, picture }: Pick<Props, "picture"> & { view: View }) {
  const bar = scaleBarMm(view, picture.width);
  const y = picture.height - FOOT / 2;
  const end = 12 + bar * view.scale;
  const words = `${mm(bar)} mm`;
  return (
    <g class="foot">
      <path class="bar" d={`M12 ${y - 4}V${y + 4}M12 ${y}H${end}M${end} ${y - 4}V${y + 4}`} />
      <text x={end + 8} y={y}>
        {words}
      </text>
      {picture.width - end - wordsWidth(words, picture.fontPx) > 220 && (
        <text class="note" x={picture.width - 12} y={y}>
          all dimensions in mm
        </text>
      )}
    </g>
  );
}
