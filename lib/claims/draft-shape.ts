import { z } from "zod";
import { emptyDraft } from "./draft";

const typed = (max: number) => z.string().max(max);
// Names of rows, symptoms and conditions: what is none of them could neither be read nor, with a NUL in it, be kept.
const rowId = z.string().regex(/^[A-Za-z][A-Za-z0-9]{0,59}$/u);
const notesById = z.record(rowId, z.string().max(1000));
const yesNo = z.enum(["", "yes", "no"]);

const lineShape = {
  serial: typed(80),
  unitId: z.uuid().nullable(),
  partId: z.uuid().nullable(),
  invoiceLineId: z.uuid().nullable(),
  quantity: typed(6),
  position: z.enum(["", "left", "right", "single"]),
  fittedOn: typed(40),
  installer: typed(120),
  replacementSerial: typed(80),
  replacementFittedOn: typed(40),
};

const shape = {
  frameSerial: typed(80),
  vehicleModel: typed(120),
  symptom: typed(40),
  note: typed(4000),
  failedOn: typed(40),
  repairedOn: typed(40),
  readings: z.record(
    rowId,
    z.strictObject({ raw: typed(60), temperature: typed(20), instrument: typed(120) }),
  ),
  answers: notesById,
  cannotGet: notesById,
  ruledOut: notesById,
  condition: z.record(rowId, yesNo),
  conditionNote: typed(1000),
  earlierWork: typed(1000),
  swapMinutes: typed(20),
  swapHeat: yesNo,
  testDrive: yesNo,
  incident: yesNo,
  incidentNote: typed(1000),
  labourMinutes: typed(20),
  diagnosisAsked: typed(20),
  consumablesAsked: typed(20),
  carriageAsked: typed(20),
};

const draftShape = z.strictObject({ ...shape, lines: z.array(z.strictObject(lineShape)).max(8) });

export type DraftBody = z.infer<typeof draftShape>;

/** A stored draft; a field that did not exist when it was saved is empty. Throws where it does not fit. */
export const storedDraft = (body: unknown): DraftBody =>
  draftShape.parse({ ...emptyDraft(), ...(typeof body === "object" ? body : {}) });

/**
 * A change to a draft: only what was on the page that sent it. Lines are addressed by place and never re-pointed at
 * another unit; a map named in `replaces` is taken whole (unticked boxes send nothing), the others key by key.
 */
export const draftChange = z
  .strictObject({
    ...shape,
    lines: z.record(
      z.string().regex(/^[0-7]$/u),
      z.strictObject(lineShape).omit({ unitId: true, partId: true, invoiceLineId: true }).partial(),
    ),
    replaces: z.array(z.enum(["ruledOut", "condition"])),
  })
  .partial();

export type DraftChange = z.infer<typeof draftChange>;
