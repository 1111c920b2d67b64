import "server-only";
import { Op } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { writeToAudit } from "@/lib/people/audit-service";
import { allows } from "@/lib/people/rights-queries";
import { Organisation } from "@/models/organisation";
import { TradingAccount } from "@/models/trading-account";
import type { NewAccount } from "./schema";

/** `wasKnown`: the tax number led to a workshop that was already here, under the name it has itself. */
export type Opened = { readonly number: string; readonly wasKnown: boolean };

const lockAccounts = (work: Work) =>
  rows(work, "select pg_advisory_xact_lock(hashtextextended('accounts:' || $1, 0))", [
    work.actor.organisationId,
  ]);

type Buyer = { readonly id: string; readonly wasKnown: boolean };

const chosenBuyer = async ({ transaction, actor }: Work, buyerId: string): Promise<Buyer | null> => {
  const found = await Organisation.findOne({
    attributes: ["id"],
    where: { id: { [Op.eq]: buyerId, [Op.ne]: actor.organisationId }, buys: true },
    transaction,
  });
  return found ? { id: found.id, wasKnown: false } : null;
};

/** The account of this number, or with this buyer, that the actor's organisation keeps already. */
const accountWith = (
  { transaction, actor }: Work,
  by: { accountNumber: string } | { buyerId: string },
): Promise<TradingAccount | null> =>
  TradingAccount.findOne({ where: { sellerId: actor.organisationId, ...by }, transaction });

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
    if (await accountWith(work, { accountNumber: number }))
      return refuse("accountNumberTaken", { number }, "number");
    const buyer = buyerId === "" ? await openedWorkshop(work, input) : await chosenBuyer(work, buyerId);
    if (!buyer) return refuse("buyerUnknown", {}, "buyerId");
    const held = await accountWith(work, { buyerId: buyer.id });
    if (held)
      return refuse(
        "accountExists",
        { number: held.accountNumber },
        buyerId === "" ? "taxNumber" : "buyerId",
      );
    await TradingAccount.create(
      { sellerId: actor.organisationId, buyerId: buyer.id, accountNumber: number, currency },
      { transaction: work.transaction },
    );
    await writeToAudit(work, "account.opened", {
      number,
      buyerId: buyer.id,
      currency,
      wasKnown: buyer.wasKnown,
    });
    return ok({ number, wasKnown: buyer.wasKnown });
  });
