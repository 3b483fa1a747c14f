/** One blank of the sentence: an input as long as its content, its unit after it, arrow keys for numbers. */
import { useState } from "preact/hooks";
import type { Fault } from "../../../meshes/refusal.ts";
import { blankId } from "../../blank-id.ts";
import { readEntry, stepped } from "../../entry.ts";
import { valueAt, withValueAt } from "../../pointer.ts";
import { draft } from "../../state.ts";
import { faultsId } from "./fault-list.tsx";
import type { Blank as BlankPhrase } from "./phrases.ts";

interface Props {
  readonly blank: BlankPhrase;
  readonly faults: readonly Fault[];
}

/** What is being typed, and the value it became: kept as typed ("10.", "8 kH") as long as the draft says the same. */
interface Typed {
  readonly text: string;
  readonly value: unknown;
}

export function Blank({ blank, faults }: Props) {
  const [typed, setTyped] = useState<Typed | null>(null);
  const current = valueAt(draft.value, blank.at);
  const text = typed !== null && typed.value === current ? typed.text : blank.show(draft.value);
  const write = (next: unknown, shown: string | null) => {
    draft.value = next;
    setTyped(shown === null ? null : { text: shown, value: valueAt(next, blank.at) });
  };
  const shared = {
    id: blankId(blank.at),
    value: text,
    "aria-label": blank.label,
    "aria-invalid": faults.length > 0,
    "aria-describedby": faults.length > 0 ? faultsId(blank.at) : undefined,
    autocomplete: "off" as const,
    spellcheck: false,
    onInput: (event: { currentTarget: HTMLInputElement | HTMLTextAreaElement }) =>
      write(blank.put(draft.value, event.currentTarget.value), event.currentTarget.value),
    onBlur: () => setTyped(null),
  };
  if (blank.kind === "rows") return <Rows blank={blank} text={text} shared={shared} />;
  if (blank.kind === "title") return <Title blank={blank} text={text} shared={shared} />;
  const length = Math.max(text.length, text === "" ? blank.empty.length : 0, 2);
  return (
    <span class="unit-kept">
      <input
        {...shared}
        type="text"
        class={`blank blank-${blank.kind}`}
        inputMode={blank.quantity?.positive === true && blank.kind === "number" ? "decimal" : undefined}
        placeholder={blank.empty}
        style={{ width: `${length + 1.2}ch` }}
        onFocus={(event) => event.currentTarget.select()}
        onKeyDown={(event) => {
          const next = arrowed(event, blank, current);
          if (next === undefined) return;
          event.preventDefault();
          write(next, null);
          // What is typed after a step replaces the number, as it does after entering the blank.
          const input = event.currentTarget;
          requestAnimationFrame(() => input.select());
        }}
      />
      {blank.unit !== "" && <span class="unit"> {blank.unit}</span>}
    </span>
  );
}

/** The draft one arrow key on, Shift ten times as far; undefined for other keys and what has no step. */
function arrowed(event: KeyboardEvent, blank: BlankPhrase, current: unknown): unknown {
  const direction = event.key === "ArrowUp" ? 1 : event.key === "ArrowDown" ? -1 : 0;
  const { quantity } = blank;
  if (direction === 0 || quantity === undefined) return undefined;
  const value = current ?? readEntry(blank.empty, quantity);
  if (typeof value !== "number") return undefined;
  const steps = direction * (event.shiftKey ? 10 : 1);
  return withValueAt(draft.value, blank.at, stepped(value, steps, quantity));
}

interface AreaProps {
  readonly blank: BlankPhrase;
  readonly text: string;
  readonly shared: object;
}

function Rows({ blank, text, shared }: AreaProps) {
  const lines = text.split("\n");
  return (
    <span class="rows">
      <textarea
        {...shared}
        class="blank blank-rows"
        rows={Math.min(14, Math.max(2, lines.length + 1))}
        style={{ width: `${Math.max(12, ...lines.map((l) => l.length)) + 3}ch` }}
      />
      <span class="hint">{blank.hint}</span>
    </span>
  );
}

/** A name of as many lines as it needs, but without line breaks of its own. */
function Title({ blank, text, shared }: AreaProps) {
  return (
    <textarea
      {...shared}
      class="blank blank-title"
      placeholder={blank.empty}
      rows={Math.max(1, Math.ceil(text.length / 34))}
      onKeyDown={(event) => {
        if (event.key === "Enter") event.preventDefault();
      }}
    />
  );
}
