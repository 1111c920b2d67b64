import { describe, expect, it } from "vitest";
import { pathBack, withNote } from "@/lib/accounts/path-back";

describe("the way back from a form", () => {
  it.each(["/invoice-lines", "/invoice-lines/7?page=2", "/catalogue?q=brake%20coil"])(
    "takes a path of ours: %s",
    (path) => expect(pathBack(path)).toBe(path),
  );

  it.each([
    undefined,
    "",
    "catalogue",
    "https://elsewhere.example/",
    "//elsewhere.example",
    "/\\elsewhere.example",
    "/\t/elsewhere.example",
    "/\n/elsewhere.example",
    "\\/elsewhere.example",
    "/.//elsewhere.example",
    "/x/..//elsewhere.example",
    "javascript:alert(1)",
    `/${"a".repeat(600)}`,
  ])("takes nothing that leads elsewhere: %j", (path) => expect(pathBack(path)).toBeNull());

  it("adds its note without losing the query, and replaces an older note", () => {
    expect(withNote("/invoice-lines?page=2", "partAdded")).toBe("/invoice-lines?page=2&note=partAdded");
    expect(withNote("/accounts?note=old", "accountOpened")).toBe("/accounts?note=accountOpened");
  });
});
