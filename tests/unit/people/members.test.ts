import { describe, expect, it } from "vitest";
import { hasAnotherKeeper } from "@/lib/people/keepers";
import { rolesOffered } from "@/lib/people/offered-roles";
import { presentPerson } from "@/lib/people/present";

const keeper = (id: string, isAdministrator: boolean, isAtWork: boolean) => ({
  id,
  isAdministrator,
  isAtWork,
});

describe("who keeps an organisation", () => {
  it("is somebody else only if they are administrator and can sign in", () => {
    expect(hasAnotherKeeper([keeper("a", true, true), keeper("b", true, true)], "a")).toBe(true);
    expect(hasAnotherKeeper([keeper("a", true, true), keeper("b", true, false)], "a")).toBe(false);
    expect(hasAnotherKeeper([keeper("a", true, true), keeper("b", false, true)], "a")).toBe(false);
    expect(hasAnotherKeeper([keeper("a", true, true)], "a")).toBe(false);
  });
});

describe("the roles on offer", () => {
  it("are those that have work in an organisation of this kind", () => {
    expect(rolesOffered({ sells: false, buys: true })).toEqual([
      "technician",
      "workshopManager",
      "accounts",
      "administrator",
    ]);
    expect(rolesOffered({ sells: true, buys: false })).not.toContain("technician");
    expect(rolesOffered({ sells: true, buys: true })).toHaveLength(7);
  });
});

describe("the state of a member", () => {
  const row = {
    id: "1",
    name: "Robin Vale",
    email: "robin.vale@works.example",
    roles: ["technician", "somethingElse"],
    disabledAt: null,
    lastSeenAt: null,
    acceptedAt: new Date(0),
  };

  it("is invited until they accept, and switched off whatever else", () => {
    expect(presentPerson(row).state).toBe("active");
    expect(presentPerson({ ...row, acceptedAt: null }).state).toBe("invited");
    expect(presentPerson({ ...row, acceptedAt: null, disabledAt: new Date(0) }).state).toBe("disabled");
  });

  it("leaves out a role nobody knows", () => {
    expect(presentPerson(row).roles).toEqual(["technician"]);
  });
});
