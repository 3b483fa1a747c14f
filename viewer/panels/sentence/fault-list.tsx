/** The refusals of one line, right under it, told politely as they come. */
import type { Fault } from "../../../meshes/refusal.ts";
import { write } from "../../state.ts";
import { faultWords, isStray } from "./fault-words.ts";

/** Element id of what is refused at a blank; blanks name it as their description. */
export const faultsId = (pointer: string): string => `refused:${pointer}`;

interface Props {
  /** Faults by the pointer of their blank. */
  readonly groups: readonly (readonly [pointer: string, faults: readonly Fault[]])[];
}

export function FaultList({ groups }: Props) {
  return (
    <div class="faults" role="alert" aria-live="polite">
      {groups.map(([pointer, faults]) => (
        <div key={pointer} id={faultsId(pointer)}>
          {faults.map((fault) => (
            <p key={fault.pointer + fault.detail}>
              {faultWords(fault)}
              {isStray(fault) && <TakeAway pointer={fault.pointer} />}
            </p>
          ))}
        </div>
      ))}
    </div>
  );
}

function TakeAway({ pointer }: { pointer: string }) {
  return (
    <button type="button" class="do" onClick={() => write(pointer, undefined)}>
      take {pointer.slice(pointer.lastIndexOf("/") + 1)} away
    </button>
  );
}
