import { actorAt } from "../support/actor";
import {
  buildAccount,
  buildDistributor,
  buildOrganisation,
  buildPart,
  buildPerson,
  buildUnit,
  type Between,
} from "../support/build";

export type Shop = Between & { readonly person: { readonly id: string; readonly name: string } };

async function openShop(seller: { readonly id: string }): Promise<Shop> {
  const workshop = await buildOrganisation();
  const person = await buildPerson(workshop, ["technician"]);
  return { seller, workshop, account: await buildAccount(seller, workshop), person };
}

/** A distributor with a part and an assessor, and two workshops that buy from it. */
export async function twoShops() {
  const seller = await buildDistributor();
  const assessor = await buildPerson(seller, ["assessor"]);
  const part = await buildPart(seller);
  const shops = [await openShop(seller), await openShop(seller)] as const;
  const sell = ({ workshop, account }: Shop) => buildUnit({ seller, buyer: workshop, account, part });
  return { seller, assessor, part, shops, sell };
}

export const workerOf = ({ workshop, person }: Shop) => actorAt(workshop, person, ["technician"]);
