import type { Currency } from "@/lib/kernel/currency";
import { parseMoney } from "@/lib/kernel/money";
import type { ClaimDraft } from "../draft";
import type { AskedBesides } from "../facts-shape";

const AMOUNTS = {
  diagnosisAsked: "diagnosisMinor",
  consumablesAsked: "consumablesMinor",
  carriageAsked: "carriageMinor",
} as const satisfies Partial<Record<keyof ClaimDraft, keyof AskedBesides>>;

export type AskedField = "labourMinutes" | keyof typeof AMOUNTS;
type Refused = {
  readonly field: AskedField;
  readonly code: string;
  readonly detail: Readonly<Record<string, string | number>>;
};
type ReadAsked = { readonly asked: AskedBesides | null; readonly refused: readonly Refused[] };

const MOST_MINUTES = 6000;
const MINUTES = /^\d{1,4}$/u;

const readMinutes = (typed: string): number | null => {
  const minutes = MINUTES.test(typed.trim()) ? Number(typed) : Number.NaN;
  return minutes <= MOST_MINUTES ? minutes : null;
};

/**
 * What a workshop asks for besides the part: whole minutes of labour, and amounts in minor units of the claim's currency.
 * Empty fields ask for nothing; where all are empty, `asked` is null. What cannot be read is named at its field.
 */
export function readAsked(draft: ClaimDraft, currency: Currency): ReadAsked {
  const asked = { labourMinutes: 0, diagnosisMinor: "0", consumablesMinor: "0", carriageMinor: "0" };
  const refused: Refused[] = [];
  if (draft.labourMinutes.trim() !== "") {
    const minutes = readMinutes(draft.labourMinutes);
    if (minutes === null)
      refused.push({ field: "labourMinutes", code: "minutesUnread", detail: { most: MOST_MINUTES } });
    else asked.labourMinutes = minutes;
  }
  for (const [field, name] of [
    ["diagnosisAsked", AMOUNTS.diagnosisAsked],
    ["consumablesAsked", AMOUNTS.consumablesAsked],
    ["carriageAsked", AMOUNTS.carriageAsked],
  ] as const) {
    if (draft[field].trim() === "") continue;
    const amount = parseMoney(draft[field], currency);
    if (!amount.ok) refused.push({ field, code: amount.code, detail: amount.detail });
    else if (amount.value.minor < 0n) refused.push({ field, code: "amountNegative", detail: {} });
    else asked[name] = amount.value.minor.toString();
  }
  const isAsked = Object.values(asked).some((value) => String(value) !== "0");
  return { asked: isAsked ? asked : null, refused };
}

/** The amounts asked besides the part, in minor units; labour is time, and its rate is the rules'. */
export const besidesMinor = ({ asked }: { readonly asked?: AskedBesides | undefined }): bigint =>
  asked ? BigInt(asked.diagnosisMinor) + BigInt(asked.consumablesMinor) + BigInt(asked.carriageMinor) : 0n;
