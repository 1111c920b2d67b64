import { normaliseSerial } from "@/lib/labels/serial";
import type { Row } from "../tables";
import type { Case } from "./case";
import type { FilePlan } from "./evidence-plan";

/** Something the distributor alone is told when a claim is sent. */
export type Flag = { readonly kind: string; readonly lineNumber: number | null; readonly detail: Row };

type Plans = ReadonlyMap<Case, readonly FilePlan[]>;

/** A serial nobody knows, a unit claimed twice, a photo seen before. */
export function flagsOf(one: Case, plans: Plans): Flag[] {
  const serial = normaliseSerial(one.lines[0].serialTyped);
  if (one.twist === "serialDoubtful") return [{ kind: "serialUnknown", lineNumber: 1, detail: { serial } }];
  if (one.twist === "photoReused") return photoFlags(one, plans);
  if (one.twist !== "heldElsewhere") return [];
  const holder = [...plans.keys()].find((other) =>
    other.lines.some(({ unit }) => unit && normaliseSerial(unit.serial) === serial),
  );
  return [
    { kind: "soldToOther", lineNumber: 1, detail: {} },
    { kind: "unitHeld", lineNumber: 1, detail: { otherClaim: holder?.number ?? "" } },
  ];
}

const photoFlags = (one: Case, plans: Plans): Flag[] =>
  (plans.get(one) ?? []).flatMap(({ content, name }) => {
    if (content.is !== "sameAs") return [];
    const [first] = [...plans].find(([, files]) => files.some((file) => file.key === content.key)) ?? [];
    return [{ kind: "photoSeenBefore", lineNumber: null, detail: { otherClaim: first?.number ?? "", name } }];
  });
