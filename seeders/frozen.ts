import { frozenText } from "@/lib/credits/frozen-credit-shape";

/** A credit or a document as its column keeps it: amounts as digits. */
export const frozen = (value: unknown): unknown => JSON.parse(frozenText(value));
