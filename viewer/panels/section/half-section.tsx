/**
 * The draft's half-section to scale, the right half solid and its mirror image faint, with the measures a winder asks for. Drawn
 * from whatever of the draft is sound, so that it follows every letter typed; each measure is a button that leads to its blank.
 */
import { useLayoutEffect, useRef, useState } from "preact/hooks";
import { coilSentence } from "../../../api/format/sentence.ts";
import { boxAround } from "../../../meshes/layout.ts";
import { sketch } from "../../../meshes/sketch.ts";
import { focusBlank } from "../../blank-id.ts";
import { draft, faults, verdict } from "../../state.ts";
import { type Arranged, arrange, type Laid } from "./arrange.ts";
import { type Dimension, dimensionsOf } from "./dimensions.ts";
import { Drawing } from "./drawing.tsx";
import { nameLabel, nameLeaders } from "./names.ts";
import { type Drawn, refusedOf, steadied } from "./refused.ts";
import "./section.css";

const nothing: Drawn = { document: null, layout: { copper: null, bodies: [] } };

export function HalfSection() {
  const [frame, size] = useSize();
  const last = useRef<Drawn>(nothing);
  const layout = steadied(sketch(draft.value), last.current, draft.value);
  last.current = { document: draft.value, layout };
  const box = boxAround([...(layout.copper?.figures ?? []), ...layout.bodies.flatMap((b) => b.pieces)]);
  const fontPx = size.width < 640 ? 12 : 13;
  const picture = { ...size, fontPx };
  if (box === null || size.width === 0) {
    return (
      <div class="half-section" ref={frame}>
        {size.width > 0 && <p class="half-section-none">Nothing to draw yet: the coil still lacks sizes.</p>}
      </div>
    );
  }
  const measures = dimensionsOf(layout);
  // Which names find no room inside depends on the scale, which depends on what is told outside.
  const first = arrange(box, measures, picture);
  const leaders = nameLeaders(layout.bodies, first.view, fontPx);
  const arranged = leaders.length === 0 ? first : arrange(box, [...measures, ...leaders], picture);
  return (
    <div class="half-section" ref={frame}>
      <Drawing
        layout={layout}
        box={box}
        refused={refusedOf(faults.value)}
        arranged={arranged}
        picture={picture}
        told={new Set(leaders.map((l) => l.pointer))}
        label={describe()}
      />
      <Measures arranged={arranged} fontPx={fontPx} />
    </div>
  );
}

/** The drawing in a sentence. */
function describe(): string {
  const found = verdict.value;
  if (!found.fit) return "Half-section of the design, what is refused hatched";
  const { coil, parts, guides } = found.checked.design;
  const bodies = [...parts, ...guides].map((b) => b.name).join(", ");
  return `Half-section to scale: ${coilSentence(coil)}${bodies === "" ? "" : `; with ${bodies}`}`;
}

function Measures({ arranged, fontPx }: { arranged: Arranged; fontPx: number }) {
  return (
    <div class="measures" style={{ fontSize: `${fontPx}px` }}>
      {arranged.laid.map((laid) => (
        <Measure key={keyOf(laid.dimension)} laid={laid} />
      ))}
    </div>
  );
}

const keyOf = (d: Dimension): string => `${d.side} ${d.pointer} ${d.label} ${d.from}`;

function Measure({ laid }: { laid: Laid }) {
  const { dimension, x, y } = laid;
  const upright = dimension.side === "left" || dimension.side === "right";
  const isName = dimension.label === nameLabel;
  return (
    <button
      type="button"
      class={upright ? "measure measure-upright" : "measure"}
      style={{ left: `${x}px`, top: `${y}px` }}
      aria-label={`${dimension.words}: ${isName ? dimension.label : `${dimension.label} in mm, change it`}`}
      onClick={() => focusBlank(dimension.pointer)}
    >
      {dimension.words}
    </button>
  );
}

function useSize() {
  const frame = useRef<HTMLDivElement>(null);
  const [size, setSize] = useState({ width: 0, height: 0 });
  useLayoutEffect(() => {
    const element = frame.current;
    if (element === null) return;
    const measure = () => {
      const { clientWidth: width, clientHeight: height } = element;
      setSize((before) => (before.width === width && before.height === height ? before : { width, height }));
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [frame, size] as const;
}
