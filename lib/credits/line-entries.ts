import { equalFractions, fraction, ONE, printFraction, ZERO, compareFractions } from "@/lib/kernel/fraction";
import { coverShareOf, monthsThatCount } from "./cover";
import type { CreditKind, CreditLineInput, SettlementByKind } from "./credit-input";
import { lowered, nothingGiven, shareOf, startEntry, textOf, type Entry, type Sums } from "./entry";
import { citedStep, creditStep } from "./steps";

const MINUTES_AN_HOUR = 60n;

/**
 * What one line gives of each kind, up to and with attribution, before anything the whole claim decides. A kind nobody
 * asked for has no entry; the part always has one. Throws RangeError for a line that cannot be (see `checked`).
 */
export function entriesOf(line: CreditLineInput, sums: Sums, settlement: SettlementByKind): readonly Entry[] {
  checked(line);
  const started = [
    partEntry(line, sums),
    ...(line.labourAskedMinutes > 0 ? [labourEntry(line, sums)] : []),
    ...(["diagnosis", "consumables", "carriage"] as const).flatMap((kind) => cappedEntry(line, kind, sums)),
  ];
  return started
    .map((entry) => (settlement[entry.kind] === "creditNote" ? taxedOrNothing(entry, sums) : entry))
    .map((entry) => afterAttribution(afterLateFiling(entry, sums), sums));
}

/** Amounts that were invoiced or asked are not negative; a share lies between nothing and the whole. */
function checked(line: CreditLineInput): void {
  const { invoice, typedPrice, attribution, lateFiling } = line;
  const amounts = [
    invoice?.unitPriceMinor ?? typedPrice?.unitPriceMinor ?? 0n,
    invoice?.lineNetMinor ?? 0n,
    invoice?.alreadyCreditedMinor ?? 0n,
    line.diagnosisAskedMinor,
    line.consumablesAskedMinor,
    line.carriageAskedMinor,
  ];
  const shares = [attribution.creditedShare, lateFiling?.fraction ?? ONE];
  if (amounts.some((minor) => minor < 0n)) throw new RangeError("An amount of a claim is not negative");
  if (shares.some((share) => compareFractions(share, ZERO) < 0 || compareFractions(share, ONE) > 0))
    throw new RangeError("A share lies between nothing and the whole");
  if (line.quantity < 1 || line.labourAskedMinutes < 0)
    throw new RangeError("A line has at least one piece, and its minutes are not negative");
}

function partEntry(line: CreditLineInput, sums: Sums): Entry {
  const at = { line, kind: "part" } as const;
  const start = startOfPart(line, sums);
  if (start === null) return nothingGiven(at, "priceUnknown", [creditStep("priceUnknown", zero(sums), {})]);
  if (line.outcome === "declined") return declined(start, sums);

  const { fraction: share, reason, steps } = coverShareOf(line);
  const minor = shareOf(start.minor, share, sums);
  const printed = { amount: textOf(start.minor, sums), fraction: printFraction(share) };
  const applied = creditStep("coverAmount", textOf(minor, sums), printed);
  return lowered(start, { minor, reason }, [...steps, applied]);
}

/** The price as invoiced, or the one that was typed, times the pieces claimed; null where no price is known. */
function startOfPart(line: CreditLineInput, sums: Sums): Entry | null {
  const { invoice, typedPrice, quantity } = line;
  const price = invoice ?? typedPrice;
  if (price === null) return null;
  const askedMinor = price.unitPriceMinor * BigInt(quantity);
  const result = textOf(askedMinor, sums);
  const times = { unitAmount: textOf(price.unitPriceMinor, sums), quantity };
  const first =
    invoice === null
      ? creditStep("partPriceTyped", result, { ...times, reason: typedPrice?.reason ?? "" })
      : creditStep("partPriceInvoiced", result, {
          ...times,
          invoiceNumber: invoice.invoiceNumber,
          invoiceLine: String(invoice.lineNumber),
        });
  return startEntry({ line, kind: "part" }, askedMinor, [first]);
}

/** The lesser of claimed and standard minutes, for the whole line, at the rate of the repair day. */
function labourEntry(line: CreditLineInput, sums: Sums): Entry {
  const at = { line, kind: "labour" } as const;
  const { terms, version } = line.repairTerms;
  const claimedMinutes = line.labourAskedMinutes;
  if (terms.labour === null) {
    const step = creditStep("labourNotPaid", zero(sums), { claimedMinutes });
    return nothingGiven(at, "labourNotPaid", [citedStep(version, step)]);
  }
  if (terms.currency !== sums.currency) return otherCurrency(at, sums);

  const { standardMinutes, hourlyRateMinor, months: labourMonths } = terms.labour;
  const payFor = (minutes: number) => {
    const minor = shareOf(BigInt(hourlyRateMinor), fraction(BigInt(minutes), MINUTES_AN_HOUR), sums);
    const hourlyAmount = textOf(BigInt(hourlyRateMinor), sums);
    const step = creditStep("labourAmount", textOf(minor, sums), { minutes, hourlyAmount });
    return { minor, step: citedStep(version, step) };
  };
  const claimed = payFor(claimedMinutes);
  const asked = startEntry(at, claimed.minor, [claimed.step]);
  if (line.outcome === "declined") return declined(asked, sums);

  const { months, steps } = monthsThatCount(line);
  if (months === null) {
    const step = creditStep("monthsUnknown", zero(sums), {});
    return lowered(asked, { minor: 0n, reason: "monthsUnknown" }, [citedStep(version, step)]);
  }
  if (months >= labourMonths) {
    const step = creditStep("labourTermOver", zero(sums), { monthsUsed: months, labourMonths });
    return lowered(asked, { minor: 0n, reason: "labourTermOver" }, [...steps, citedStep(version, step)]);
  }
  const minutes = claimedMinutes < standardMinutes ? claimedMinutes : standardMinutes;
  const lesser = creditStep("labourMinutes", String(minutes), { claimedMinutes, standardMinutes });
  const paid = payFor(minutes);
  const counted = [...steps, citedStep(version, lesser), paid.step];
  return lowered(
    startEntry(at, claimed.minor, []),
    { minor: paid.minor, reason: "standardMinutes" },
    counted,
  );
}

/** Diagnosis, consumables or carriage: what was asked, at most the cap of its own; no entry where nothing was asked. */
function cappedEntry(
  line: CreditLineInput,
  kind: Exclude<CreditKind, "part" | "labour">,
  sums: Sums,
): readonly Entry[] {
  const askedMinor = line[`${kind}AskedMinor`];
  if (askedMinor === 0n) return [];
  const { terms, version } = line.repairTerms;
  const asked = startEntry({ line, kind }, askedMinor, [creditStep("asked", textOf(askedMinor, sums), {})]);
  if (line.outcome === "declined") return [declined(asked, sums)];
  if (terms.currency !== sums.currency) {
    const step = currencyStep(line, sums);
    return [lowered(asked, { minor: 0n, reason: "currencyDiffers" }, [step])];
  }
  const cap = BigInt(terms.caps[`${kind}Minor`]);
  const minor = askedMinor < cap ? askedMinor : cap;
  const step = creditStep("kindCap", textOf(minor, sums), {
    amount: textOf(askedMinor, sums),
    capAmount: textOf(cap, sums),
  });
  return [lowered(asked, { minor, reason: "kindCap" }, [citedStep(version, step)])];
}

/** What stands on the credit note bears the tax of the original line: without a price nobody knows that tax. */
function taxedOrNothing(entry: Entry, sums: Sums): Entry {
  const { line, minor } = entry;
  if (minor === 0n || (line.invoice ?? line.typedPrice) !== null) return entry;
  return lowered(entry, { minor: 0n, reason: "priceUnknown" }, [creditStep("priceUnknown", zero(sums), {})]);
}

function afterLateFiling(entry: Entry, sums: Sums): Entry {
  const { lateFiling } = entry.line;
  if (lateFiling === null || entry.minor === 0n) return entry;
  const minor = shareOf(entry.minor, lateFiling.fraction, sums);
  const printed = { amount: textOf(entry.minor, sums), fraction: printFraction(lateFiling.fraction) };
  const step = creditStep("lateFiling", textOf(minor, sums), printed);
  return lowered(entry, { minor, reason: "filedLate" }, [citedStep(lateFiling.version, step)]);
}

/** The credited shares come summed and are applied once; the whole needs no step. */
function afterAttribution(entry: Entry, sums: Sums): Entry {
  const { shares, creditedShare } = entry.line.attribution;
  if (entry.minor === 0n || equalFractions(creditedShare, ONE)) return entry;
  const fractionText = printFraction(creditedShare);
  const minor = shareOf(entry.minor, creditedShare, sums);
  const summed = creditStep("creditedShare", fractionText, {
    makerShare: shares.maker ?? "0",
    carrierShare: shares.carrier ?? "0",
    fitterShare: shares.fitter ?? "0",
    userShare: shares.user ?? "0",
    wearShare: shares.wear ?? "0",
  });
  const printed = { amount: textOf(entry.minor, sums), fraction: fractionText };
  const applied = creditStep("attribution", textOf(minor, sums), printed);
  return lowered(entry, { minor, reason: "sharedCause" }, [summed, applied]);
}

const zero = (sums: Sums): string => textOf(0n, sums);

const declined = (entry: Entry, sums: Sums): Entry =>
  lowered(entry, { minor: 0n, reason: "declined" }, [
    creditStep("declined", zero(sums), { amount: textOf(entry.minor, sums) }),
  ]);

const currencyStep = ({ repairTerms }: CreditLineInput, sums: Sums) =>
  citedStep(
    repairTerms.version,
    creditStep("currencyDiffers", zero(sums), {
      termsCurrency: repairTerms.terms.currency,
      currency: sums.currency,
    }),
  );

const otherCurrency = (at: Pick<Entry, "line" | "kind">, sums: Sums): Entry =>
  nothingGiven(at, "currencyDiffers", [currencyStep(at.line, sums)]);
