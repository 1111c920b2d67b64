import { readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";
import { describe, expect, it } from "vitest";

const ROOT = join(import.meta.dirname, "../../..");

/**
 * Who may open what, written by hand. `nobody` has to be signed in for `public`; `member` is anybody signed in, and what
 * they see is their organisation's; a right is one of lib/access/rights.ts. A page or route that is not here fails.
 */
const PAGES: Readonly<Record<string, string>> = {
  "app/page.tsx": "member",
  "app/(dev)/style/page.tsx": "development",
  "app/(public)/sign-in/page.tsx": "public",
  "app/(public)/forgotten/page.tsx": "public",
  "app/(public)/reset/[token]/page.tsx": "public",
  "app/(public)/invitation/[token]/page.tsx": "public",
  "app/(signed-in)/account/page.tsx": "member",
  "app/(signed-in)/help/page.tsx": "member",
  "app/(signed-in)/alerts/page.tsx": "member",
  "app/(signed-in)/alerts/[id]/page.tsx": "member",
  "app/(signed-in)/accounts/page.tsx": "keepCatalogue",
  "app/(signed-in)/accounts/new/page.tsx": "keepCatalogue",
  "app/(signed-in)/catalogue/page.tsx": "keepCatalogue",
  "app/(signed-in)/catalogue/new/page.tsx": "keepCatalogue",
  "app/(signed-in)/catalogue/[partNumber]/edit/page.tsx": "keepCatalogue",
  "app/(signed-in)/claims/new/page.tsx": "startClaim",
  "app/(signed-in)/claims/[number]/(draft)/part/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(draft)/fault/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(draft)/evidence/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(draft)/check/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(sheet)/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(sheet)/ask/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(sheet)/decide/page.tsx": "member",
  "app/(signed-in)/claims/[number]/(sheet)/call-in/page.tsx": "member",
  "app/(signed-in)/installers/page.tsx": "keepInstallers",
  "app/(signed-in)/installers/[id]/page.tsx": "keepInstallers",
  "app/(signed-in)/credits/page.tsx": "issueCredits",
  "app/(signed-in)/credit-notes/page.tsx": "seeCreditNotes",
  "app/(signed-in)/credit-notes/[number]/page.tsx": "seeCreditNotes",
  "app/(signed-in)/day-book/page.tsx": "seeDayBook",
  "app/(signed-in)/invoice-lines/page.tsx": "importInvoiceLines",
  "app/(signed-in)/invoice-lines/[importId]/page.tsx": "importInvoiceLines",
  "app/(signed-in)/goods-in/page.tsx": "receiveParts",
  "app/(signed-in)/goods-in/parcels/new/page.tsx": "receiveParts",
  "app/(signed-in)/goods-in/parcels/[id]/page.tsx": "receiveParts",
  "app/(signed-in)/goods-in/returns/[number]/page.tsx": "receiveParts",
  "app/(signed-in)/goods-in/returns/[number]/bench/[line]/page.tsx": "receiveParts",
  "app/(signed-in)/judging/page.tsx": "seeReceivedClaims",
  "app/(signed-in)/workshop-today/page.tsx": "seeOwnClaims",
  "app/(signed-in)/life-curves/page.tsx": "seeLifeCurves",
  "app/(signed-in)/life-curves/claims/page.tsx": "seeLifeCurves",
  "app/(signed-in)/rule-book/page.tsx": "seeRuleBook",
  "app/(signed-in)/people/page.tsx": "keepPeople",
  "app/(signed-in)/people/invite/page.tsx": "keepPeople",
  "app/(signed-in)/people/[id]/page.tsx": "keepPeople",
};

const ROUTES: Readonly<Record<string, "public" | "member">> = {
  "app/api/auth/[...nextauth]/route.ts": "public",
  "app/api/v1/health/route.ts": "public",
  "app/api/v1/ready/route.ts": "public",
  "app/api/v1/alerts/route.ts": "member",
  "app/api/v1/claims/route.ts": "member",
  "app/api/v1/claims/[number]/draft/route.ts": "member",
  "app/api/v1/claims/[number]/evidence/route.ts": "member",
  "app/api/v1/claims/[number]/messages/route.ts": "member",
  "app/api/v1/credit-notes/[number]/pdf/route.ts": "member",
  "app/api/v1/evidence/route.ts": "member",
  "app/api/v1/evidence/[id]/route.ts": "member",
  "app/api/v1/evidence/[id]/view/route.ts": "member",
  "app/api/v1/life-curves/route.ts": "member",
  "app/api/v1/invoice-imports/route.ts": "member",
  "app/api/v1/invoice-imports/example/route.ts": "member",
  "app/api/v1/returns/[number]/label/route.ts": "member",
};

const filesBelow = (folder: string): string[] =>
  readdirSync(folder, { withFileTypes: true }).flatMap((entry) =>
    entry.isDirectory() ? filesBelow(join(folder, entry.name)) : [relative(ROOT, join(folder, entry.name))],
  );
const files = filesBelow(join(ROOT, "app"));
const named = (name: string) => files.filter((file) => file.endsWith(`/${name}`)).toSorted();
const textOf = (file: string) => readFileSync(join(ROOT, file), "utf8");

/** The gate as it stands in the page itself, or in the one loader that all pages of a draft go through. */
const GATES: Readonly<Record<string, RegExp>> = {
  public: /^/u,
  development: /NODE_ENV[\s\S]*notFound\(\)/u,
  member: /requireSession\(\)|loadStep\(|currentSession\(\)/u,
};

describe("the inventory of addresses", () => {
  it("lists every page and every route, and nothing that is gone", () => {
    expect(named("page.tsx")).toEqual(Object.keys(PAGES).toSorted());
    expect(named("route.ts")).toEqual(Object.keys(ROUTES).toSorted());
  });

  it.each(Object.entries(PAGES))("%s asks for: %s", (file, wanted) => {
    const gate = GATES[wanted] ?? new RegExp(`may\\(session, "${wanted}"\\)\\) notFound\\(\\)`, "u");
    expect(textOf(file)).toMatch(gate);
  });

  it.each(Object.entries(ROUTES).filter(([, wanted]) => wanted === "member"))(
    "%s has no method that goes round the session",
    (file) => {
      const methods = [...textOf(file).matchAll(/^export const (GET|POST|PUT|PATCH|DELETE) = (\w+)/gmu)];
      expect(methods.length).toBeGreaterThan(0);
      expect(methods.filter(([, , maker]) => maker !== "route").map(([line]) => line)).toEqual([]);
    },
  );

  it("has no server action that asks nobody: each is made by action(), or asks session and origin itself", () => {
    const actions = files.filter((file) => file.endsWith(".ts") && /^"use server";/u.test(textOf(file)));
    expect(actions.length).toBeGreaterThan(0);
    const isPublic = (file: string) => file.startsWith("app/(public)/");
    /** Names in a file that action() made: calling one of them asks session, origin and shape. */
    const madeIn = (file: string) =>
      [...textOf(file).matchAll(/const (\w+) = action\(/gu)].map(([, name]) => name);
    const isGuarded = (body: string, file: string) =>
      / = action\(/u.test(body) ||
      madeIn(file).some((name) => body.includes(`await ${name}(`)) ||
      ((isPublic(file) || /requireActor\(|requireSession\(|currentSession\(/u.test(body)) &&
        /guardOrigin\(|isFromOurPages\(/u.test(body));
    const unguarded = actions.flatMap((file) =>
      textOf(file)
        .split(/^(?=export )/mu)
        .slice(1)
        .filter((body) => !/^export type/u.test(body) && !isGuarded(body, file))
        .map((body) => `${file}: ${body.split("\n")[0]}`),
    );
    expect(unguarded).toEqual([]);
  });
});
