import { beforeAll, describe, expect, it } from "vitest";
import { openAccount } from "@/lib/accounts/service";
import { addPart, changePart } from "@/lib/parts/service";
import { savePreferences } from "@/lib/people/account/service";
import { changeRoles, switchOff, switchOn } from "@/lib/people/member-service";
import { actorAt } from "../support/actor";
import { buildDistributor, buildPerson, unlike } from "../support/build";
import { adminQuery } from "../support/database";

type Actor = ReturnType<typeof actorAt>;
let organisation: { readonly id: string };
let keeper: Actor;
/** Enough that two transactions meet where nothing keeps them apart. */
const ROUNDS = 10;

beforeAll(async () => {
  organisation = await buildDistributor({ buys: true });
  const person = await buildPerson(organisation, ["administrator"]);
  keeper = actorAt(organisation, person, ["administrator"]);
});

const workshop = (number: string, taxNumber: string) => ({
  number,
  buyerId: "",
  currency: "EUR" as const,
  name: unlike("Workshop"),
  legalName: "Workshop Ltd",
  address: "1 Mill Lane",
  country: "DE",
  taxNumber,
  timeZone: "Europe/Berlin",
  language: "en" as const,
  siteName: "Main",
  siteAddress: "",
  back: "",
});

const accountsOf = ({ organisationId }: Actor) =>
  adminQuery<{ number: string; currency: string; isToday: boolean; isOpen: boolean }>(
    `select account_number as number, trim(currency) as currency, opened_on = current_date as "isToday",
       closed_on is null as "isOpen" from trading_accounts where seller_id = $1 order by account_number`,
    [organisationId],
  );

describe("a trading account", () => {
  it("is opened today and stays open, once for a number and once for a buyer", async () => {
    const tax = unlike("DE-TAX");
    expect(await openAccount(keeper, workshop("K-1", tax))).toMatchObject({ ok: true });
    const kept = [{ number: "K-1", currency: "EUR", isToday: true, isOpen: true }];
    expect(await accountsOf(keeper)).toEqual(kept);

    expect(await openAccount(keeper, workshop("K-1", unlike("DE-TAX")))).toMatchObject({
      code: "accountNumberTaken",
    });
    expect(await openAccount(keeper, workshop("K-2", tax))).toMatchObject({
      code: "accountExists",
      detail: { number: "K-1" },
    });
    expect(await accountsOf(keeper)).toEqual(kept);
  });

  it("is opened with an organisation that is chosen, never with one's own", async () => {
    const [known] = await adminQuery<{ id: string }>(
      "select buyer_id as id from trading_accounts where seller_id = $1",
      [organisation.id],
    );
    const chosen = (buyerId: string) => ({ ...workshop("K-9", ""), name: "", buyerId });
    expect(await openAccount(keeper, chosen(String(known?.id)))).toMatchObject({ code: "accountExists" });
    expect(await openAccount(keeper, chosen(organisation.id))).toMatchObject({ code: "buyerUnknown" });
  });
});

const part = (partNumber: string, over = {}) => ({
  partNumber,
  name: "Brake, 24 V",
  family: "brake",
  maker: "Northvane",
  tracking: "serial" as const,
  supersededBy: "",
  back: "",
  ...over,
});

const catalogue = () =>
  adminQuery(
    `select p.part_number as number, p.name, p.serial_tracked as serial, m.name as maker, s.part_number as successor
     from parts p join makers m on m.id = p.maker_id left join parts s on s.id = p.superseded_by_id
     where p.seller_id = $1 order by p.part_number`,
    [organisation.id],
  );

describe("a part of the catalogue", () => {
  it("is entered once, under a maker that is entered once however it is written", async () => {
    expect(await addPart(keeper, part("B-1"))).toMatchObject({ ok: true });
    expect(await addPart(keeper, part("B-2", { maker: "NORTHVANE", tracking: "counted" }))).toMatchObject({
      ok: true,
    });
    expect(await addPart(keeper, part("B-1"))).toMatchObject({ code: "partNumberTaken" });
    const makers = await adminQuery("select name from makers where seller_id = $1", [organisation.id]);
    expect(makers).toEqual([{ name: "Northvane" }]);
  });

  it("changes its name and its successor, and nothing else", async () => {
    const change = { partNumber: "B-1", name: "Brake, old", supersededBy: "B-2" };
    expect(await changePart(keeper, change)).toMatchObject({ ok: true });
    expect(await changePart(keeper, { ...change, supersededBy: "B-7" })).toMatchObject({
      code: "supersedingUnknown",
    });
    expect(await changePart(keeper, { ...change, partNumber: "B-7" })).toMatchObject({ code: "notFound" });
    expect(await catalogue()).toEqual([
      { number: "B-1", name: "Brake, old", serial: true, maker: "Northvane", successor: "B-2" },
      { number: "B-2", name: "Brake, 24 V", serial: false, maker: "Northvane", successor: null },
    ]);
  });
});

const rolesOf = async (personId: string): Promise<string[]> =>
  (
    await adminQuery<{ role: string }>(
      "select role from membership_roles where organisation_id = $1 and user_id = $2 order by role",
      [organisation.id, personId],
    )
  ).map(({ role }) => role);

describe("a member", () => {
  it("has exactly the roles that were chosen, and nobody else's change", async () => {
    const other = await buildPerson(organisation, ["goodsIn"]);
    const member = await buildPerson(organisation, ["assessor", "goodsIn"]);
    const asked = { personId: member.id, roles: ["analyst" as const, "goodsIn" as const] };
    expect(await changeRoles(keeper, asked)).toMatchObject({ ok: true });
    expect(await rolesOf(member.id)).toEqual(["analyst", "goodsIn"]);
    expect(await rolesOf(other.id)).toEqual(["goodsIn"]);
  });

  it("stays administrator where two take the role from each other at the same moment: one of the two", async () => {
    for (let round = 0; round < ROUNDS; round += 1) {
      const house = await buildDistributor();
      const [one, other] = [
        await buildPerson(house, ["administrator"]),
        await buildPerson(house, ["administrator"]),
      ];
      const take = (by: typeof one, from: typeof one) =>
        changeRoles(actorAt(house, by, ["administrator"]), { personId: from.id, roles: ["goodsIn"] });
      const answers = await Promise.all([take(one, other), take(other, one)]);
      expect(answers.map(({ ok }) => ok).toSorted()).toEqual([false, true]);
      const left = await adminQuery(
        "select user_id from membership_roles where organisation_id = $1 and role = 'administrator'",
        [house.id],
      );
      expect(left).toHaveLength(1);
    }
  });

  it("is switched off and on again by itself", async () => {
    const [other, member] = [
      await buildPerson(organisation, ["goodsIn"]),
      await buildPerson(organisation, ["goodsIn"]),
    ];
    const off = async () =>
      (
        await adminQuery<{ id: string }>(
          "select user_id as id from memberships where organisation_id = $1 and disabled_at is not null",
          [organisation.id],
        )
      ).map(({ id }) => id);
    expect(await switchOff(keeper, { personId: member.id })).toMatchObject({ ok: true });
    expect(await off()).toEqual([member.id]);
    expect(await switchOn(keeper, { personId: member.id })).toMatchObject({ ok: true });
    expect(await off()).toEqual([]);
    expect(await rolesOf(other.id)).toEqual(["goodsIn"]);
  });
});

describe("how a person likes to see the product", () => {
  it("is kept for them alone, and nothing else of their row is written", async () => {
    const person = await buildPerson(organisation, ["goodsIn"], { password_hash: "kept" });
    const row = async (id: string) => (await adminQuery("select * from users where id = $1", [id]))[0] ?? {};
    const [before, keeperBefore] = [await row(person.id), await row(keeper.userId)];
    const actor = actorAt(organisation, person, ["goodsIn"]);
    await savePreferences(actor, { locale: "de", theme: "dark", density: "shop" });
    expect(await row(person.id)).toEqual({ ...before, locale: "de", theme: "dark", density: "shop" });
    await savePreferences(actor, { locale: "en", theme: "system", density: "byDevice" });
    expect(await row(person.id)).toEqual({ ...before, density: null });
    expect(await row(keeper.userId)).toEqual(keeperBefore);
  });
});
