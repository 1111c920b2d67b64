import { allocate, money } from "@/lib/kernel/money";
import { lowered, textOf, type Entry, type Sums } from "./entry";
import { creditStep } from "./steps";

/**
 * The most that is paid for a claim, shared out over lines and kinds by largest remainder, ties to the earlier one.
 * Throws RangeError for a cap below zero.
 */
export function withinClaimCap(
  entries: readonly Entry[],
  capMinor: bigint | null,
  sums: Sums,
): readonly Entry[] {
  const claimMinor = entries.reduce((so, { minor }) => so + minor, 0n);
  if (capMinor === null || claimMinor <= capMinor) return entries;
  if (capMinor < 0n) throw new RangeError("A cap is not negative");
  const parts = allocate(
    money(capMinor, sums.currency),
    entries.map(({ minor }) => minor),
  );
  return entries.map((entry, place) => {
    if (entry.minor === 0n) return entry;
    const minor = parts[place]?.minor ?? 0n;
    const step = creditStep("claimCap", textOf(minor, sums), {
      amount: textOf(entry.minor, sums),
      claimAmount: textOf(claimMinor, sums),
      capAmount: textOf(capMinor, sums),
    });
    return lowered(entry, { minor, reason: "claimCap" }, [step]);
  });
}

/**
 * A part never gives back more of its invoice line than is left after the notes that stand and the lines before it here.
 * Other kinds were never on that line and are not held to it.
 */
export function withinInvoiceLines(entries: readonly Entry[], sums: Sums): readonly Entry[] {
  const takenHere = new Map<string, bigint>();
  return entries.map((entry) => {
    const { invoice } = entry.line;
    if (entry.kind !== "part" || invoice === null) return entry;
    const key = JSON.stringify([invoice.invoiceNumber, invoice.lineNumber]);
    const creditedMinor = invoice.alreadyCreditedMinor + (takenHere.get(key) ?? 0n);
    const left = invoice.lineNetMinor - creditedMinor;
    const room = left < 0n ? 0n : left;
    const minor = entry.minor < room ? entry.minor : room;
    takenHere.set(key, (takenHere.get(key) ?? 0n) + minor);
    if (minor === entry.minor) return entry;
    const step = creditStep("invoiceLimit", textOf(minor, sums), {
      amount: textOf(entry.minor, sums),
      lineAmount: textOf(invoice.lineNetMinor, sums),
      creditedAmount: textOf(creditedMinor, sums),
    });
    return lowered(entry, { minor, reason: "invoiceLimit" }, [step]);
  });
}
