import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { writeToAudit } from "@/lib/people/audit-service";
import { allows } from "@/lib/people/rights-queries";
import type { NewAccount } from "./schema";

/** `wasKnown`: the tax number led to a workshop that was already here, under the name it has itself. */
export type Opened = { readonly number: string; readonly wasKnown: boolean };
type Found = { id: string };

const MINE = "select account_number as number from trading_accounts where seller_id = $1";

const lockAccounts = (work: Work) =>
  rows(work, "select pg_advisory_xact_lock(hashtextextended('accounts:' || $1, 0))", [
    work.actor.organisationId,
  ]);

type Buyer = { readonly id: string; readonly wasKnown: boolean };

const chosenBuyer = async (work: Work, buyerId: string): Promise<Buyer | null> => {
  const [found] = await rows<Found>(
    work,
    "select id from organisations where id = $1 and buys and id <> $2",
    [buyerId, work.actor.organisationId],
  );
  return found ? { id: found.id, wasKnown: false } : null;
};

/** The workshop that was typed in, or the one its tax number belongs to. */
async function openedWorkshop(work: Work, input: NewAccount): Promise<Buyer | null> {
  const given = { ...input, siteAddress: input.siteAddress || input.address };
  const [opened] = await rows<Buyer>(
    work,
    `select organisation_id as id, was_known as "wasKnown" from guarded.open_workshop($1)`,
    [JSON.stringify(given)],
  );
  return opened ?? null;
}

type Refused = "notAllowed" | "accountNumberTaken" | "buyerTwice" | "buyerUnknown" | "accountExists";

/**
 * Opens a trading account with an organisation that is chosen or entered. Refuses a number that is taken and a buyer
 * that has an account already; then nothing is written.
 */
export const openAccount = (actor: Actor, input: NewAccount): Promise<Outcome<Opened, Refused>> =>
  unitOfWork(actor, async (work): Promise<Outcome<Opened, Refused>> => {
    if (!(await allows(work, "keepCatalogue"))) return refuse("notAllowed");
    const { number, buyerId, currency } = input;
    if (buyerId !== "" && input.name !== "") return refuse("buyerTwice", {}, "buyerId");
    await lockAccounts(work);
    const [taken] = await rows(work, `${MINE} and account_number = $2`, [actor.organisationId, number]);
    if (taken) return refuse("accountNumberTaken", { number }, "number");
    const buyer = buyerId === "" ? await openedWorkshop(work, input) : await chosenBuyer(work, buyerId);
    if (!buyer) return refuse("buyerUnknown", {}, "buyerId");
    const [held] = await rows<{ number: string }>(work, `${MINE} and buyer_id = $2`, [
      actor.organisationId,
      buyer.id,
    ]);
    if (held)
      return refuse("accountExists", { number: held.number }, buyerId === "" ? "taxNumber" : "buyerId");
    await rows(
      work,
      "insert into trading_accounts (seller_id, buyer_id, account_number, currency) values ($1, $2, $3, $4)",
      [actor.organisationId, buyer.id, number, currency],
    );
    await writeToAudit(work, "account.opened", {
      number,
      buyerId: buyer.id,
      currency,
      wasKnown: buyer.wasKnown,
    });
    return ok({ number, wasKnown: buyer.wasKnown });
  });
