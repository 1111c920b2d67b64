import { beforeAll, describe, expect, it } from "vitest";
import { ROLES } from "@/lib/access/roles";
import {
  CLAIM_STATES,
  CREDIT_STATES,
  MOVES,
  RETURN_STATES,
  VERDICT_OUTCOMES,
  type ClaimState,
} from "@/lib/claims/lifecycle";
import {
  buildAccount,
  buildClaim,
  buildDistributor,
  buildOrganisation,
  buildPerson,
  type Between,
} from "../support/build";
import { adminQuery, answerOf, asRole, NOT_ALLOWED } from "../support/database";
import { rowIn } from "./claim-rows";

const WRONG_MOVE = "PP003";

let between: Between;

beforeAll(async () => {
  const [seller, workshop] = [await buildDistributor(), await buildOrganisation()];
  between = {
    seller,
    workshop,
    account: await buildAccount(seller, workshop),
    person: await buildPerson(workshop, []),
  };
});

const checkOf = async (table: string, column: string): Promise<string[]> => {
  const [row] = await adminQuery<{ definition: string }>(
    `select pg_get_constraintdef(oid) as definition from pg_constraint where conrelid = $1::regclass and contype = 'c'
       and pg_get_constraintdef(oid) ~ ('^CHECK \\(\\(' || $2 || ' = ANY')`,
    [table, column],
  );
  return [...(row?.definition ?? "").matchAll(/'(\w+)'::text/gu)].map(([, word]) => word ?? "");
};

describe("the database knows the same life of a claim as the product", () => {
  it.each([
    ["claims", "state", CLAIM_STATES],
    ["claims", "outcome", VERDICT_OUTCOMES],
    ["claim_lines", "verdict", VERDICT_OUTCOMES],
    ["claim_lines", "return_state", RETURN_STATES],
    ["claim_lines", "credit_state", CREDIT_STATES],
    ["membership_roles", "role", ROLES],
  ] as const)("%s.%s takes the words of the product and no other", async (table, column, words) => {
    expect((await checkOf(table, column)).toSorted()).toEqual([...words].toSorted());
  });

  it("its table of moves is the product's", async () => {
    const inTable = await adminQuery<{ step: string }>(
      "select from_state || ' ' || to_state as step from claim_moves",
    );
    const inCode = Object.values(MOVES).flatMap(({ from, to }) => from.map((state) => `${state} ${to}`));
    expect(inTable.map(({ step }) => step).toSorted()).toEqual([...new Set(inCode)].toSorted());
  });

  it("nobody who works with claims may change that table", async () => {
    for (const role of ["web", "worker", "keeper"] as const)
      expect(await answerOf(asRole(role, {}, "insert into claim_moves values ('draft', 'settled')"))).toBe(
        NOT_ALLOWED,
      );
  });
});

describe("a claim's state, changed by SQL", () => {
  const steps = CLAIM_STATES.flatMap((from) => CLAIM_STATES.map((to) => [from, to] as const));
  const known = (from: ClaimState, to: ClaimState) =>
    Object.values(MOVES).some((move) => move.to === to && move.from.some((state) => state === from));

  it.each(steps.filter(([from, to]) => from !== to && !known(from, to)))(
    "never goes from %s to %s",
    async (from, to) => {
      const claim = await buildClaim(between, rowIn(from));
      const sql =
        "update claims set state = $2, filed_at = now(), filed_on = '2026-05-06', failed_on = '2026-05-04', revision = greatest(revision, 1), outcome = 'upheld', decided_at = now() where id = $1";
      for (const org of [between.workshop.id, between.seller.id])
        await answerOf(asRole("web", { org, actor: between.person.id }, sql, [claim.id, to]));
      expect(await answerOf(adminQuery(sql, [claim.id, to]))).toBe(WRONG_MOVE);
      const [row] = await adminQuery("select state from claims where id = $1", [claim.id]);
      expect(row?.["state"]).toBe(from);
    },
  );

  it.each(steps.filter(([from, to]) => known(from, to)))("goes from %s to %s", async (from, to) => {
    const claim = await buildClaim(between, rowIn(from));
    const after: Record<string, unknown> = rowIn(to);
    const set = Object.keys(after).map((column, at) => `${column} = $${at + 2}`);
    const sql = `update claims set ${set.join(", ")} where id = $1`;
    expect(await answerOf(adminQuery(sql, [claim.id, ...Object.values(after)]))).toBe("done");
  });

  it.each([
    "number = '12345678'",
    "revision = 0",
    "created_at = now()",
    "seller_id = gen_random_uuid()",
    "workshop_id = gen_random_uuid()",
  ])("keeps its identity: %s", async (change) => {
    const claim = await buildClaim(between, rowIn("filed"));
    const sql = ["update claims set", change, "where id = $1"].join(" ");
    expect(await answerOf(adminQuery(sql, [claim.id]))).toBe(WRONG_MOVE);
  });
});
