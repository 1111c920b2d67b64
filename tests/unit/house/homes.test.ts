import { describe, expect, it } from "vitest";
import { hasRight, type Organisation } from "@/lib/access/rights";
import { ROLES, type Role } from "@/lib/access/roles";
import { homeOf } from "@/lib/web/navigation";

const homeAt = (organisation: Organisation, ...roles: readonly Role[]) => {
  const held = new Set(roles);
  return homeOf(held, (right) => hasRight(held, right, organisation));
};

describe("the first page", () => {
  it.each([
    ["assessor", "/judging"],
    ["goodsIn", "/goods-in"],
    ["accounts", "/credits"],
    ["analyst", "/life-curves"],
    ["administrator", "/invoice-lines"],
  ] as const)("of a distributor's %s is where their work waits, also where it buys too", (role, home) => {
    expect(homeAt({ sells: true, buys: false }, role)).toBe(home);
    expect(homeAt({ sells: true, buys: true }, role)).toBe(home);
  });

  it.each([
    ["technician", "/workshop-today"],
    ["workshopManager", "/workshop-today"],
    ["accounts", "/credit-notes"],
    ["administrator", "/people"],
  ] as const)("of a workshop's %s is where their work waits", (role, home) => {
    expect(homeAt({ sells: false, buys: true }, role)).toBe(home);
  });

  it("is never one that is closed to them", () => {
    for (const organisation of [
      { sells: true, buys: false },
      { sells: false, buys: true },
    ])
      for (const role of ROLES) expect(homeAt(organisation, role)).not.toBe("/claims/new");
    expect(homeAt({ sells: false, buys: true })).toBeNull();
  });
});
