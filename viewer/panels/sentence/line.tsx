/** One line of the sentence: its words and blanks, its rarer numbers behind "and also …", its refusals right under it. */
import { useState } from "preact/hooks";
import { blankId } from "../../blank-id.ts";
import { draft } from "../../state.ts";
import { Blank } from "./blank.tsx";
import { FaultList, faultsId } from "./fault-list.tsx";
import type { FaultPlaces } from "./fault-places.ts";
import type { Action, Choice, Line, Phrase } from "./phrases.ts";

interface Props {
  readonly line: Line;
  readonly places: FaultPlaces;
}

export function SentenceLine({ line, places }: Props) {
  const faulty = placed([...line.phrases, ...line.also], places);
  const own = places.lines.get(line.at) ?? [];
  return (
    <fieldset class="line" aria-label={line.label} id={blankId(line.at)} tabIndex={-1}>
      <Text phrases={line.phrases} places={places} />
      {line.also.length > 0 && <Also line={line} places={places} />}
      <FaultList groups={own.length === 0 ? faulty : [...faulty, [`line ${line.at}`, own]]} />
    </fieldset>
  );
}

/** The blanks among phrases that are refused, with why. */
function placed(phrases: readonly Phrase[], places: FaultPlaces) {
  return phrases.flatMap((phrase) => {
    if (typeof phrase === "string" || phrase.kind === "action") return [];
    const faults = places.blanks.get(phrase.at);
    return faults === undefined ? [] : [[phrase.at, faults] as const];
  });
}

/** What is rare: open when it says something unusual or holds a fault, and as long as someone writes in it. */
function Also({ line, places }: Props) {
  const [chosen, setChosen] = useState<boolean | null>(null);
  const open = placed(line.also, places).length > 0 || (chosen ?? line.told);
  return (
    <details
      open={open}
      onToggle={(event) => {
        if (event.currentTarget.open !== open) setChosen(event.currentTarget.open);
      }}
      onFocusCapture={(event) => {
        if (open && (event.target as Element).localName !== "summary") setChosen(true);
      }}
    >
      <summary aria-label={`${line.label}, and also`}>and also …</summary>
      <Text phrases={line.also} places={places} />
    </details>
  );
}

interface TextProps {
  readonly phrases: readonly Phrase[];
  readonly places: FaultPlaces;
}

function Text({ phrases, places }: TextProps) {
  return (
    <div class="words">
      {phrases.map((phrase, i) => (
        <Piece key={keyOf(phrase, i)} phrase={phrase} places={places} glued={closes(phrases[i])} />
      ))}
    </div>
  );
}

const keyOf = (phrase: Phrase, i: number): string =>
  typeof phrase === "string"
    ? `${i}`
    : phrase.kind === "action"
      ? phrase.words
      : `${phrase.kind} ${phrase.at}`;

/** Words that begin with a mark of punctuation stand close to what comes before. */
const closes = (phrase: Phrase | undefined): boolean => typeof phrase === "string" && /^[.,:;]/.test(phrase);

function Piece({ phrase, places, glued }: { phrase: Phrase; places: FaultPlaces; glued: boolean }) {
  if (typeof phrase === "string") return <>{glued ? `${phrase}` : ` ${phrase}`}</>;
  if (phrase.kind === "action") {
    return (
      <>
        {" "}
        <ActionButton action={phrase} />
      </>
    );
  }
  const faults = places.blanks.get(phrase.at) ?? [];
  return (
    <>
      {" "}
      {phrase.kind === "choice" ? (
        <Select choice={phrase} refused={faults.length > 0} />
      ) : (
        <Blank blank={phrase} faults={faults} />
      )}
    </>
  );
}

function Select({ choice, refused }: { choice: Choice; refused: boolean }) {
  const known = choice.options.some(([value]) => value === choice.value);
  return (
    <span class="choice">
      <select
        id={blankId(choice.at)}
        aria-label={choice.label}
        aria-invalid={refused}
        aria-describedby={refused ? faultsId(choice.at) : undefined}
        value={choice.value}
        onChange={(event) => {
          draft.value = choice.pick(draft.value, event.currentTarget.value);
        }}
      >
        {!known && <option value={choice.value}>{choice.value === "" ? "choose" : choice.value}</option>}
        {choice.options.map(([value, words]) => (
          <option key={value} value={value}>
            {words}
          </option>
        ))}
      </select>
    </span>
  );
}

function ActionButton({ action }: { action: Action }) {
  const act = () => {
    const after = action.act(draft.value);
    draft.value = after;
    // The new line is drawn before anything of it can have the focus.
    requestAnimationFrame(() => document.getElementById(action.focus(after))?.focus());
  };
  return (
    <button type="button" class="do" id={blankId(action.label)} aria-label={action.label} onClick={act}>
      {action.words}
    </button>
  );
}
