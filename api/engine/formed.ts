/** Stored fields → one array in the form asked for. Runs in a thread: a large array as text takes a tenth of a second. */
import { gunzipSync } from "node:zlib";
import {
  type FieldArray,
  type FieldQuantity,
  type FieldStateName,
  fieldArray,
  fieldCsv,
  fieldDocument,
  fieldNpy,
} from "../contract/fields.ts";
import { decodeFields } from "../contract/stored-fields.ts";

export const fieldForms = ["application/json", "text/csv", "application/octet-stream"] as const;
export type FieldForm = (typeof fieldForms)[number];

export interface FormOrder {
  /** As stored: the fields' file, compressed by gzip. */
  readonly fields: Uint8Array;
  readonly quantity: FieldQuantity;
  /** null: loaded where there is a part, else empty. */
  readonly state: FieldStateName | null;
  readonly form: FieldForm;
}

/** The array as text or bytes; null for the loaded state of a design without parts. */
export function formed({ fields, quantity, state, form }: FormOrder): string | Uint8Array | null {
  const decoded = decodeFields(gunzipSync(fields));
  const asked = state ?? (decoded.loaded === null ? "empty" : "loaded");
  const array = fieldArray(decoded, quantity, asked);
  return array === null ? null : written(array, form);
}

function written(array: FieldArray, form: FieldForm): string | Uint8Array {
  if (form === "text/csv") return fieldCsv(array);
  if (form === "application/json") return JSON.stringify(fieldDocument(array));
  return fieldNpy(array);
}
