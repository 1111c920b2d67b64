import { z } from "zod";
import { claimNumberInput } from "@/lib/claims/schema";
import { SETTLING_MOVES } from "./lifecycle";
import { DANGER_SIGNS, DISPOSALS, FINDING_KINDS, PARCEL_CONDITIONS } from "./kinds";
import { normaliseReturnNumber } from "./number";

const text = (most: number) => z.string().trim().max(most, "tooLong").default("");
const needed = (most: number) => z.string().trim().min(1, "missing").max(most, "tooLong");
const lineNumber = z.coerce.number().int().min(1).max(8);
/** Sent along with the form as words between commas. */
const signs = z
  .string()
  .max(60)
  .default("")
  .transform((typed) => typed.split(",").filter((word) => word !== ""))
  .pipe(z.array(z.enum(DANGER_SIGNS)));

/** The nine digits of a return, however they were typed. */
const returnNumberInput = z
  .string()
  .transform((typed) => normaliseReturnNumber(typed) ?? "")
  .pipe(z.string().length(9, "returnNumberUnread"));

export const callInInput = z.strictObject({
  number: claimNumberInput,
  lineIds: z.array(z.uuid(), "missing").min(1, "missing").max(8),
  sendTo: needed(400),
  dueOn: needed(40),
  instructions: text(1000),
});
export type CallInInput = z.infer<typeof callInInput>;

export const settleInput = z.strictObject({
  number: returnNumberInput,
  move: z.enum(SETTLING_MOVES, "missing"),
  why: needed(1000),
});
export type SettleInput = z.infer<typeof settleInput>;

export const dispatchInput = z.strictObject({
  number: returnNumberInput,
  carrier: needed(120),
  trackingNumber: text(80),
  sentOn: needed(40),
});
export type DispatchInput = z.infer<typeof dispatchInput>;

export const receiveInput = z.strictObject({
  number: returnNumberInput,
  /** The parcel it came in where that is known already; a new one is written down otherwise. */
  parcelId: z.union([z.uuid(), z.literal("")]).default(""),
  condition: z.enum(PARCEL_CONDITIONS, "missing").default("sound"),
  note: text(1000),
  place: needed(40),
  /** Whether somebody looked for signs of danger, and which there were. */
  looked: z.enum(["", "yes"]).default(""),
  signs,
  lines: z
    .record(
      z.string().regex(/^[0-7]$/u),
      z.strictObject({ lineId: z.uuid(), isHere: z.enum(["yes", "no"], "missing"), serialSeen: text(80) }),
    )
    .transform((byPlace) => Object.values(byPlace)),
});
export type ReceiveInput = z.infer<typeof receiveInput>;

export const parcelInput = z.strictObject({
  sender: text(200),
  part: text(200),
  serial: text(80),
  numberWritten: text(80),
  condition: z.enum(PARCEL_CONDITIONS, "missing"),
  note: text(1000),
});
export type ParcelInput = z.infer<typeof parcelInput>;

export const matchInput = z.strictObject({ parcelId: z.uuid(), number: returnNumberInput });

const byId = z.string().regex(/^[A-Za-z][A-Za-z0-9]{0,59}$/u);

export const findingInput = z.strictObject({
  number: returnNumberInput,
  lineNumber,
  kind: z.enum(FINDING_KINDS, "missing"),
  note: needed(4000),
  runMinutes: text(20),
  looks: z.record(byId, text(400)).default({}),
  readings: z
    .record(byId, z.strictObject({ raw: text(60), temperature: text(20), instrument: text(120) }))
    .default({}),
});
export type FindingInput = z.infer<typeof findingInput>;

export const disposeInput = z.strictObject({
  number: returnNumberInput,
  lineNumber,
  as: z.enum(DISPOSALS, "missing"),
});
export type DisposeInput = z.infer<typeof disposeInput>;

/** What a page may say was just done. */
export const RETURN_NOTES = ["received", "matched", "examined", "disposed"] as const;
const word = z.string().trim().max(400).catch("");

/** What the list of goods-in may be asked: what was scanned, and the parcel being unpacked. */
export const goodsInQuery = z.object({
  find: word.default(""),
  parcel: z.uuid().optional().catch(undefined),
});

/** What the page of a return may be asked: the parcel being unpacked, and what was seen on it. */
export const returnQuery = z.object({
  parcel: z.uuid().optional().catch(undefined),
  looked: z.literal("yes").optional().catch(undefined),
  signs: z
    .union([z.enum(DANGER_SIGNS).transform((one) => [one]), z.array(z.enum(DANGER_SIGNS))])
    .default([])
    .catch([]),
  note: z.enum(RETURN_NOTES).optional().catch(undefined),
});
export const labelQuery = z.object({
  size: z.enum(["a4", "roll"]).default("a4").catch("a4"),
  cells: z.enum(["sound", "unsafe"]).optional().catch(undefined),
});
