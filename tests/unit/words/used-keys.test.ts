import { describe, expect, it } from "vitest";
import { sentencesIn } from "@/docker-free-scripts/check-house.mjs";
import { loadMessages } from "@/lib/web/messages";
import { clientFiles } from "./client-files";
import { DYNAMIC_KEYS, FLAG_KINDS } from "./dynamic-keys";
import { problemCodesIn, shapeCodesIn } from "./message-codes";
import { demandsOf } from "./message-tree";
import { callsIn, sourcesUnder } from "./translator-calls";

const ENGLISH = new Map(sentencesIn(loadMessages("en")).map(({ key, text }) => [key, text]));
const KEYS = [...ENGLISH.keys()];
const SOURCES = sourcesUnder("app", "components", "lib");
const CALLS = SOURCES.flatMap(({ path, text }) => callsIn(path, text));

const isDynamic = (key: string) => key.includes("*");
const asked = CALLS.flatMap(({ at, keys, given }) => keys.map((key) => ({ at, key, given })));

/** Whether some sentence has a key like this one; a part only known at run time may be any one name. */
function hasLike(key: string): boolean {
  const parts = key.split("*").map((part) => part.replace(/[.$]/gu, "\\$&"));
  const like = new RegExp(`^${parts.join("[^.]+")}$`, "u");
  return KEYS.some((one) => like.test(one));
}

describe("the keys the code asks for", () => {
  it("are seen at all", () => {
    expect(asked.filter(({ key }) => !isDynamic(key)).length).toBeGreaterThan(300);
    expect(asked.filter(({ key }) => isDynamic(key)).length).toBeGreaterThan(30);
  });

  it("have a sentence", () => {
    const missing = asked.filter(({ key }) => !isDynamic(key) && !ENGLISH.has(key));
    expect(missing.map(({ at, key }) => `${at} ${key}`)).toEqual([]);
  });

  it("have sentences of their pattern where a part is only known at run time", () => {
    const missing = asked.filter(({ key }) => isDynamic(key) && !hasLike(key));
    expect(missing.map(({ at, key }) => `${at} ${key}`)).toEqual([]);
  });

  it("come with every value the sentence speaks of", () => {
    const short = asked.flatMap(({ at, key, given }) => {
      if (given === null) return [];
      const wanted = demandsOf(ENGLISH.get(key) ?? "")
        .map((demand) => /^\{(\w+)\}$|^<(\w+)>$/u.exec(demand))
        .flatMap((match) => match?.[1] ?? match?.[2] ?? []);
      return wanted.filter((name) => !given.includes(name)).map((name) => `${at} ${key} wants ${name}`);
    });
    expect(short).toEqual([]);
  });
});

describe("the browser", () => {
  it("asks only for namespaces that are sent to it", () => {
    const layout = SOURCES.find(({ path }) => path === "app/layout.tsx")?.text ?? "";
    const list = /BROWSER_TEXTS = \[([^\]]*)\]/u.exec(layout)?.[1] ?? "";
    const sent = [...list.matchAll(/"(\w+)"/gu)].map(([, namespace]) => namespace ?? "");
    expect(sent).toContain("live");
    const foreign = clientFiles(SOURCES).flatMap(({ path, text }) =>
      callsIn(path, text).filter(({ keys }) => !keys.every((key) => sent.includes(key.split(".")[0] ?? ""))),
    );
    expect(foreign.map(({ at, keys }) => `${at} ${keys.join(" ")}`)).toEqual([]);
  });
});

describe("the keys the code puts together", () => {
  it("have a sentence for every problem a draft can have", () => {
    const reader = SOURCES.filter(({ path }) => path === "lib/claims/filing/read-draft.ts");
    const codes = reader.flatMap(({ path, text }) => problemCodesIn(path, text));
    expect(codes.length).toBeGreaterThan(8);
    expect(codes.filter((code) => !ENGLISH.has(`draft.problems.${code}`))).toEqual([]);
  });

  it.each(DYNAMIC_KEYS.map((one) => [`${one.before}*${one.after}`, one] as const))(
    "%s has every member of its registry",
    (_name, { before, members, after }) => {
      expect(members.length).toBeGreaterThan(0);
      const keys = members.map((member) => `${before}${member}${after}`);
      expect(keys.filter((key) => !ENGLISH.has(key))).toEqual([]);
    },
  );

  it("name the same reason and the same cause alike on both pages", () => {
    const words = (prefix: string, suffix = "") =>
      KEYS.filter((key) => key.startsWith(prefix) && key.endsWith(suffix)).map((key) => ENGLISH.get(key));
    expect(words("live.decide.reasons.")).toEqual(words("verdicts.reasons.", ".name"));
    expect(words("live.decide.causes.")).toEqual(words("verdicts.causes."));
  });

  it("know every kind of doubt the code and the database write down", () => {
    const written = sourcesUnder("lib/claims/sending", "seeders/claims", "migrations").flatMap(
      ({ path, text }) => {
        if (/flags|doubts/u.test(path)) return [...text.matchAll(/kind: "(\w+)", (?:line|detail)/gu)];
        if (!text.includes("claim_flags") && !text.includes("flag_claim")) return [];
        return [...text.matchAll(/(?:then|else|line_number,) '([a-z]+[A-Z]\w*)'/gu)];
      },
    );
    const kinds = new Set(written.map((match) => match[1] ?? ""));
    expect([...kinds].toSorted()).toEqual([...FLAG_KINDS].toSorted());
  });

  it("have a sentence for every fault a shape names", () => {
    const shapes = SOURCES.filter(({ path }) => /^lib\/.*(?:schema|shape|shape-parts)\.ts$/u.test(path));
    const codes = shapes.flatMap(({ path, text }) => shapeCodesIn(path, text));
    expect(codes.length).toBeGreaterThan(20);
    expect([...new Set(codes)].filter((code) => !ENGLISH.has(`forms.${code}`))).toEqual([]);
  });
});

describe("the reading of the code", () => {
  const keysOf = (text: string) => callsIn("page.tsx", text).flatMap(({ keys }) => keys);

  it("follows a translator through a list of promises, a maker of its own and a cast", () => {
    expect(keysOf('const [a, t] = await Promise.all([b(), getTranslations("lists")]); t("title")')).toEqual([
      "lists.title",
    ]);
    expect(
      keysOf(
        'const w = (l) => getTranslations({ locale: l, namespace: "problems" }); const t = await w(x); t("a")',
      ),
    ).toEqual(["problems.a"]);
    expect(keysOf('const t = createTranslator({ messages }) as (k: string) => string; t("mails.a")')).toEqual(
      ["mails.a"],
    );
  });

  it("takes both ways of a choice, and a star for what is only known later", () => {
    const start = 'const t = useTranslations("a");';
    expect(keysOf(`${start} t(x ? "b" : "c")`)).toEqual(["a.b", "a.c"]);
    expect(keysOf(`${start} t(\`d.\${x ? "e" : y}.f\`)`)).toEqual(["a.d.e.f", "a.d.*.f"]);
    expect(keysOf(`${start} t.rich("b", {}); t.has("c")`)).toEqual(["a.b"]);
  });

  it("leaves alone what only bears the same name", () => {
    const start = 'const t = useTranslations("a");';
    expect(keysOf(`${start} const f = (t) => t("b"); function g() { const t = h(); t("c"); }`)).toEqual([]);
  });
});
