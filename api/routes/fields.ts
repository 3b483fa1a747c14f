/** `/v1/jobs/{id}/fields/{quantity}`: solved fields as JSON, CSV or NumPy's .npy, by Accept. */
import type { Request, Router } from "express";
import { type FieldQuantity, type FieldStateName, fieldQuantities, fieldStates } from "../contract/fields.ts";
import { type FieldForm, fieldForms } from "../engine/formed.ts";
import { DoorError } from "../errors.ts";
import { accepted, door } from "./door.ts";
import type { Service } from "./service.ts";

const endings: Record<FieldForm, string> = {
  "application/json": "json",
  "text/csv": "csv",
  "application/octet-stream": "npy",
};

export function fieldRoutes(router: Router, { jobs, desk }: Service): void {
  door(router, "/v1/jobs/:id/fields/:quantity", {
    async get(request, response) {
      const quantity = quantityOf(request);
      const state = stateOf(request);
      const form = accepted(request, fieldForms) as FieldForm;
      const fields = await jobs.fields(String(request.params["id"]));
      const said = await desk.formed({ fields, quantity, state, form });
      if (said === null) throw notLoaded();
      response
        .type(form)
        .vary("Accept")
        .attachment(`${quantity}-${state ?? "working"}.${endings[form]}`)
        .send(typeof said === "string" ? said : Buffer.from(said));
    },
  });
}

function quantityOf(request: Request): FieldQuantity {
  const asked = request.params["quantity"];
  const known = fieldQuantities.find((quantity) => quantity === asked);
  if (known !== undefined) return known;
  const detail = `Known are ${fieldQuantities.join(", ")}.`;
  throw new DoorError(404, "unknown", "There is no such quantity", detail);
}

function stateOf(request: Request): FieldStateName | null {
  const asked = request.query["state"];
  if (asked === undefined) return null;
  const known = fieldStates.find((state) => state === asked);
  if (known !== undefined) return known;
  const detail = `Not understood: state. Accepted: ${fieldStates.join(", ")}.`;
  throw new DoorError(400, "query", "The query is not understood", detail);
}

function notLoaded(): DoorError {
  const detail = "The design has no part, so there is no loaded state; ask for state=empty.";
  return new DoorError(404, "no-part", "There is no loaded state", detail);
}
