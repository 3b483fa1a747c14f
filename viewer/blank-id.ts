/** The element id of the blank that writes the value at a JSON Pointer: the drawing's dimensions lead there. */
export const blankId = (pointer: string): string => `blank:${pointer}`;

/** Puts the focus on the blank at a pointer, or on what it lies in, unfolding it where it waits behind "and also …". */
export function focusBlank(pointer: string): void {
  for (let p = pointer; p !== ""; p = p.slice(0, p.lastIndexOf("/"))) {
    const blank = document.getElementById(blankId(p));
    if (blank === null) continue;
    const folded = blank.closest("details");
    if (folded !== null) folded.open = true;
    blank.focus();
    blank.scrollIntoView({ block: "nearest" });
    return;
  }
}
