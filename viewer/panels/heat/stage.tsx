/** The frame both heat pictures share: the picture with its cross-hair, the value under the pointer, and buttons in words. */
import type { RefObject } from "preact";
import { useId, useRef, useState } from "preact/hooks";
import type { Heat } from "../../heat.ts";
import { type Gestures, useGestures, zoomStep } from "./gestures.ts";
import { type Seen, type SeenWords, seenWords } from "./seen.ts";

export interface StageProps {
  /** The picture's name for those who do not see it. */
  readonly label: string;
  readonly heat: Heat;
  readonly canvas: RefObject<HTMLCanvasElement>;
  /** What dragging and arrow keys do: "turn it" or "move it". */
  readonly verb: string;
  /** What "whole" is called here. */
  readonly whole: string;
  readonly gestures: Pick<Gestures, "drag" | "zoom" | "arrow" | "whole" | "busy">;
  /** Moves in words beside closer, further and whole. */
  readonly moves?: readonly { readonly words: string; readonly act: () => void }[];
  /** What lies at a place of the picture, px; null: nothing there. */
  readonly read: (x: number, y: number) => Seen | null;
  /** Still being built. */
  readonly waiting?: boolean;
}

interface Probe {
  readonly x: number;
  readonly y: number;
  /** The cross-hair moved by keys, which stays, or the pointer. */
  readonly keys: boolean;
}

/** How far one press moves the cross-hair, px, and while the key is held. */
const crossStep = { near: 2, far: 10 };

export function Stage(props: StageProps) {
  const { label, heat, canvas, gestures, moves = [], read, verb, whole } = props;
  const hint = useId();
  const picture = useRef<HTMLDivElement>(null);
  const [probe, setProbe] = useState<Probe | null>(null);
  useGestures(picture, {
    ...gestures,
    point: (at) => {
      if (at !== null) setProbe({ x: at[0], y: at[1], keys: false });
      else setProbe((now) => (now?.keys === true ? now : null));
    },
    cross: (by, far) => setProbe((now) => crossed(now, by, far, picture.current)),
  });
  const seen = probe === null ? null : read(probe.x, probe.y);
  const words = seen === null ? null : seenWords(heat, seen);
  return (
    <section class="heat-stage" aria-label={label}>
      <div
        class="heat-picture"
        ref={picture}
        role="application"
        aria-label={label}
        aria-describedby={hint}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the picture is turned, moved and read by keys
        tabIndex={0}
      >
        <canvas ref={canvas} />
        {props.waiting === true && <p class="heat-waiting">Building the cut-away body …</p>}
        {probe?.keys === true && (
          <span class="heat-cross" style={{ left: `${probe.x}px`, top: `${probe.y}px` }} />
        )}
        {probe !== null && words !== null && (
          <Tip probe={probe} words={words} width={picture.current?.clientWidth ?? 0} />
        )}
      </div>
      <output class="heat-line" aria-label="Value under the pointer">
        {words === null ? "Point at a place to read its heat." : sentence(words)}
      </output>
      <div class="heat-moves">
        {moves.map((move) => (
          <button key={move.words} type="button" onClick={move.act}>
            {move.words}
          </button>
        ))}
        <button type="button" onClick={() => gestures.zoom(zoomStep ** 2, null)}>
          closer
        </button>
        <button type="button" onClick={() => gestures.zoom(zoomStep ** -2, null)}>
          further
        </button>
        <button type="button" onClick={gestures.whole}>
          {whole}
        </button>
      </div>
      <p class="heat-hint" id={hint}>
        Drag or arrow keys {verb}; wheel, two fingers or + and − bring it closer; Shift and arrow keys read
        with a cross-hair.
      </p>
    </section>
  );
}

/** The cross-hair one step further; it starts where the pointer is, else in the middle. */
function crossed(
  now: Probe | null,
  by: readonly [number, number] | null,
  far: boolean,
  picture: HTMLElement | null,
): Probe | null {
  if (by === null || picture === null) return null;
  const { clientWidth: width, clientHeight: height } = picture;
  const from = now ?? { x: width / 2, y: height / 2 };
  const step = far ? crossStep.far : crossStep.near;
  const hold = (x: number, most: number): number => Math.min(most - 1, Math.max(0, x));
  return { x: hold(from.x + by[0] * step, width), y: hold(from.y + by[1] * step, height), keys: true };
}

const sentence = ({ value, body, place }: SeenWords): string =>
  [value, body, place].filter((word) => word !== "").join(", ");

/** The words at the pointer itself, on the side of it where there is room. */
function Tip({
  probe,
  words,
  width,
}: {
  readonly probe: Probe;
  readonly words: SeenWords;
  readonly width: number;
}) {
  const left = probe.x > width / 2;
  const side = left ? { right: `${width - probe.x + 14}px` } : { left: `${probe.x + 14}px` };
  return (
    <div class="heat-tip" aria-hidden="true" style={{ ...side, top: `${Math.max(0, probe.y - 16)}px` }}>
      <strong>{words.value}</strong>
      {words.body !== "" && <span>{words.body}</span>}
      <span>{words.place}</span>
    </div>
  );
}
