import { randomInt } from "node:crypto";
import { RETURN_NUMBERS, returnNumberFrom } from "@/lib/returns/number";
import { insertRow } from "../support/build";

type Id = { readonly id: string };
type Returned = {
  readonly claim: Id;
  readonly line: Id;
  readonly seller: Id;
  readonly workshop: Id;
  readonly person: Id;
};

/** Everything that hangs on one part that was called in, received and examined. */
export async function fillReturn({ claim, line, seller, workshop, person }: Returned): Promise<void> {
  const both = { seller_id: seller.id, workshop_id: workshop.id };
  const returned = await insertRow("part_returns", {
    ...both,
    number: returnNumberFrom(randomInt(RETURN_NUMBERS)),
    claim_id: claim.id,
    send_to: "Goods-in, Harbour Road 12",
    due_on: "2026-06-01",
    called_in_by_id: person.id,
  });
  const parcel = await insertRow("parcels", {
    seller_id: seller.id,
    return_id: returned["id"],
    received_by_id: person.id,
    matched_at: "2026-05-20T09:00:00Z",
    matched_by_id: person.id,
  });
  await insertRow("return_lines", {
    ...both,
    return_id: returned["id"],
    line_id: line.id,
    parcel_id: parcel["id"],
    place: "A-12",
    received_at: "2026-05-20T09:00:00Z",
  });
  await insertRow("findings", {
    ...both,
    claim_id: claim.id,
    line_id: line.id,
    kind: "faultConfirmed",
    note: "It drags from the first turn.",
    found_by_id: person.id,
  });
}
