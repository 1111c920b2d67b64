import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { normaliseClaimNumber } from "@/lib/labels/check-digit";
import { readScan } from "@/lib/labels/scan";
import { normaliseSerial } from "@/lib/labels/serial";
import { claimDigits } from "@/lib/claims/number";
import { normaliseReturnNumber, readLabelCode } from "./number";

/** What a scanned or typed text may mean, the surest first. Numbers are digits, a serial is in its normal form. */
export type Meaning =
  | { readonly means: "return"; readonly number: string }
  | { readonly means: "claim"; readonly number: string }
  | { readonly means: "serial"; readonly serialNormal: string };

/**
 * The meanings of a text from the scanner or the keyboard: the code of a return label, a return number, a claim number,
 * a serial on its own or inside a GS1 label. Empty where it can be none of them. `today` decides the century of a label.
 */
export function meaningsOf(text: string, today: CalendarDay): readonly Meaning[] {
  const typed = text.trim();
  const label = readLabelCode(typed);
  if (label)
    return [
      { means: "return", number: label.returnNumber },
      { means: "claim", number: label.claimNumber },
    ];
  const returned = normaliseReturnNumber(typed);
  const claim = normaliseClaimNumber(typed);
  const serial = normaliseSerial(readScan(typed, today).serial ?? "");
  return [
    ...(returned ? [{ means: "return", number: returned } as const] : []),
    ...(claim ? [{ means: "claim", number: claimDigits(claim) } as const] : []),
    ...(serial ? [{ means: "serial", serialNormal: serial } as const] : []),
  ];
}
