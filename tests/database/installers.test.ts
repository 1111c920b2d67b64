import { beforeAll, describe, expect, it } from "vitest";
import { findInstaller, listInstallerRecords } from "@/lib/claims/installers/queries";
import { addInstaller, changeInstaller } from "@/lib/claims/installers/service";
import { actorAt } from "../support/actor";
import { buildClaim, buildFitting, buildInstaller, buildLine, buildPerson, FILED } from "../support/build";
import { adminQuery } from "../support/database";
import { twoShops } from "./shops";

type World = Awaited<ReturnType<typeof twoShops>>;
let world: World;
let manager: ReturnType<typeof actorAt>;
let stranger: ReturnType<typeof actorAt>;

beforeAll(async () => {
  world = await twoShops();
  const [shop, other] = world.shops;
  manager = actorAt(shop.workshop, await buildPerson(shop.workshop, ["workshopManager"]), [
    "workshopManager",
  ]);
  stranger = actorAt(other.workshop, await buildPerson(other.workshop, ["workshopManager"]), [
    "workshopManager",
  ]);
});

const daysAgo = async (days: number): Promise<string> => {
  const [row] = await adminQuery("select (current_date - $1::int)::text as day", [days]);
  return String(row?.["day"]);
};

/** A part fitted so many days ago that failed so many days after; null where it still runs. */
async function fitted(installer: { id: string }, ago: number, failedAfter: number | null, over = {}) {
  const [shop] = world.shops;
  const unit = await world.sell(shop);
  const fitting = await buildFitting(shop.seller, shop.workshop, unit, {
    installer_id: installer.id,
    fitted_on: await daysAgo(ago),
  });
  if (failedAfter === null) return;
  const failedOn = await daysAgo(ago - failedAfter);
  const claim = await buildClaim(shop, {
    ...FILED,
    state: "filed",
    failed_on: failedOn,
    filed_on: failedOn,
    ...over,
  });
  await buildLine(shop, claim, world.part, { unit_id: unit.id, fitting_id: fitting.id });
}

describe("the record of installers", () => {
  it("counts a fitting once its first 90 days are over or cut short by a failure, and only failures within them", async () => {
    const [shop] = world.shops;
    const one = await buildInstaller(shop.workshop, { name: "Counted" });
    await fitted(one, 400, null);
    await fitted(one, 90, null);
    await fitted(one, 89, null);
    await fitted(one, 30, 10);
    await fitted(one, 400, 90);
    await fitted(one, 400, 91);
    const rows = await listInstallerRecords(manager);
    expect(rows.find(({ id }) => id === one.id)).toMatchObject({
      fitted: 6,
      watched: 5,
      early: 2,
      foundFitting: 0,
    });
  });

  it("leaves out claims that ended without a verdict", async () => {
    const [shop] = world.shops;
    const one = await buildInstaller(shop.workshop, { name: "Withdrawn" });
    await fitted(one, 200, 5, { state: "withdrawn" });
    const rows = await listInstallerRecords(manager);
    expect(rows.find(({ id }) => id === one.id)).toMatchObject({ fitted: 1, watched: 1, early: 0 });
  });

  it("shows nobody of another workshop, and finds none of theirs by id", async () => {
    const [shop] = world.shops;
    const one = await buildInstaller(shop.workshop, { name: "Ours alone" });
    expect((await listInstallerRecords(stranger)).map(({ id }) => id)).not.toContain(one.id);
    expect(await findInstaller(stranger, one.id)).toBeNull();
    expect(
      await changeInstaller(stranger, { installerId: one.id, name: "Theirs", works: "left" }),
    ).toMatchObject({
      ok: false,
      code: "notFound",
    });
    expect(await findInstaller(manager, one.id)).toMatchObject({ name: "Ours alone", leftOn: null });
  });

  it("takes a name once, whatever its capitals, under the next code", async () => {
    expect(await addInstaller(manager, { name: "Pat Quill" })).toMatchObject({ ok: true });
    expect(await addInstaller(manager, { name: "pat quill" })).toMatchObject({
      ok: false,
      code: "installerTwice",
      field: "name",
    });
    const rows = await listInstallerRecords(manager);
    expect(rows.find(({ name }) => name === "Pat Quill")?.code).toMatch(/^F\d{2,}$/u);
  });

  it("keeps who has left, and the code through a new name", async () => {
    await addInstaller(manager, { name: "Sam Before" });
    const before = (await listInstallerRecords(manager)).find(({ name }) => name === "Sam Before");
    expect(
      await changeInstaller(manager, { installerId: before?.id ?? "", name: "Sam After", works: "left" }),
    ).toMatchObject({ ok: true });
    const after = await findInstaller(manager, before?.id ?? "");
    expect(after).toMatchObject({ name: "Sam After", code: before?.code });
    expect(after?.leftOn).not.toBeNull();
  });

  it("is kept by the workshop's manager alone", async () => {
    const [shop] = world.shops;
    const technician = actorAt(shop.workshop, await buildPerson(shop.workshop, ["technician"]), [
      "technician",
    ]);
    expect(await addInstaller(technician, { name: "Nobody" })).toMatchObject({
      ok: false,
      code: "notAllowed",
    });
  });
});
