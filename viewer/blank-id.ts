/** The element id of the blank that writes the value at a JSON Pointer: the drawing's dimensions lead there. */
export const blankId = (pointer: string): string => `blank:${pointer}`;
