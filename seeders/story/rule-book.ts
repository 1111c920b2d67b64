import { addDays, addMonths, calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { FAMILY_CODES, type FamilyCode } from "@/lib/parts/families";
import { ruleBody, type RuleBody, type RuleKind } from "@/lib/rule-book/shapes";
import { versionOn } from "@/lib/rule-book/versions";
import { idOf } from "../identity";
import { PARTS, type Part } from "./catalogue";
import { CREDIT_RULES } from "./credit-rules";
import { earlierList, fullList } from "./evidence-lists";
import { familyLimits, partLimits } from "./limits";
import { ORGANISATIONS, type SellerKey } from "./organisations";
import { PEOPLE } from "./people";
import { RULE_WORDS } from "./rule-words";
import { serviceLevels } from "./service-levels";
import { TERMS } from "./terms";

/** A dated version of a rule as it is stored. */
export type Rule<Kind extends RuleKind = RuleKind> = {
  readonly id: string;
  readonly seller: SellerKey;
  readonly kind: Kind;
  readonly family: FamilyCode | null;
  readonly partId: string | null;
  readonly ruleNumber: string;
  readonly title: string;
  readonly validFrom: CalendarDay;
  readonly publishedOn: CalendarDay;
  readonly publishedById: string;
  readonly body: RuleBody<Kind>;
};

export type RuleBook = readonly Rule[];

/** First day of the month that many months before today's. */
const monthsBack = (today: CalendarDay, months: number): CalendarDay =>
  addMonths(calendarDay(`${today.slice(0, 7)}-01`), -months);

const FIRST_MONTHS_BACK = 34;
const NEW_TERMS_MONTHS_BACK = 13;
const NEW_LISTS_MONTHS_BACK = 2;
const NEW_CREDITS_MONTHS_BACK = 6;
const DAYS_BEFORE_IT_HOLDS = 14;

type Sketch<Kind extends RuleKind> = {
  seller: SellerKey;
  kind: Kind;
  family?: FamilyCode;
  part?: { id: string; number: string };
  number: string;
  title: string;
  validFrom: CalendarDay;
  body: RuleBody<Kind>;
};

const rule = <Kind extends RuleKind>({
  seller,
  kind,
  family,
  part,
  number,
  ...rest
}: Sketch<Kind>): Rule<Kind> => ({
  id: idOf("rule", seller, kind, family ?? "", part?.number ?? "", number, rest.title),
  seller,
  kind,
  family: family ?? null,
  partId: part?.id ?? null,
  ruleNumber: number,
  title: rest.title,
  validFrom: rest.validFrom,
  publishedOn: addDays(rest.validFrom, -DAYS_BEFORE_IT_HOLDS),
  publishedById: (seller === "larkmoor" ? PEOPLE.colin : PEOPLE.holger).id,
  body: ruleBody(kind, rest.body),
});

/** The days on which a distributor's rules changed. */
type Editions = {
  readonly seller: SellerKey;
  readonly first: CalendarDay;
  readonly renewed: CalendarDay;
  readonly lists: CalendarDay;
  readonly credits: CalendarDay;
};

const editionsOf = (seller: SellerKey, today: CalendarDay): Editions => ({
  seller,
  first: monthsBack(today, FIRST_MONTHS_BACK),
  renewed: monthsBack(today, NEW_TERMS_MONTHS_BACK),
  lists: monthsBack(today, NEW_LISTS_MONTHS_BACK),
  credits: monthsBack(today, NEW_CREDITS_MONTHS_BACK),
});

function generalRules({ seller, first, renewed, credits }: Editions, today: CalendarDay): Rule[] {
  const words = RULE_WORDS[seller];
  const [before, now] = TERMS[seller];
  const [credited, crediting] = CREDIT_RULES[seller];
  return [
    rule({ seller, kind: "terms", number: "T-1", title: words.terms(1), validFrom: first, body: before }),
    rule({ seller, kind: "terms", number: "T-2", title: words.terms(2), validFrom: renewed, body: now }),
    rule({
      seller,
      kind: "serviceLevels",
      number: "S-1",
      title: words.levels,
      validFrom: first,
      body: serviceLevels(seller, today),
    }),
    rule({ seller, kind: "credit", number: "C-1", title: words.credit(1), validFrom: first, body: credited }),
    rule({
      seller,
      kind: "credit",
      number: "C-2",
      title: words.credit(2),
      validFrom: credits,
      body: crediting,
    }),
  ];
}

function familyRules({ seller, first, lists }: Editions, family: FamilyCode, place: number): Rule[] {
  const words = RULE_WORDS[seller];
  const base = { seller, family } as const;
  const number = `E-${place + 1}`;
  return [
    rule({
      ...base,
      kind: "evidenceList",
      number: `${number}.1`,
      title: words.list(family, 1),
      validFrom: first,
      body: earlierList(family),
    }),
    rule({
      ...base,
      kind: "evidenceList",
      number: `${number}.2`,
      title: words.list(family, 2),
      validFrom: lists,
      body: fullList(family),
    }),
    rule({
      ...base,
      kind: "limits",
      number: `L-${place + 1}`,
      title: words.limits(family),
      validFrom: first,
      body: familyLimits(family),
    }),
  ];
}

function partRules({ seller, first }: Editions, part: Part): Rule[] {
  const body = partLimits(part);
  if (body === null) return [];
  const title = RULE_WORDS[seller].partLimits(part.number);
  return [
    rule({
      seller,
      kind: "limits",
      family: part.family,
      part,
      number: `L-${part.number}`,
      title,
      validFrom: first,
      body,
    }),
  ];
}

function rulesOf(seller: SellerKey, today: CalendarDay): Rule[] {
  const editions = editionsOf(seller, today);
  return [
    ...generalRules(editions, today),
    ...FAMILY_CODES.flatMap((family, place) => familyRules(editions, family, place)),
    ...PARTS.filter((part) => part.seller === seller).flatMap((part) => partRules(editions, part)),
  ];
}

/** The Rule books of both distributors, each body checked by the shape of its kind. */
export const ruleBookOn = (today: CalendarDay): RuleBook =>
  (["larkmoor", "fenwright"] as const).flatMap((seller) => rulesOf(seller, today));

const isKind = <Kind extends RuleKind>(one: Rule, kind: Kind): one is Rule<Kind> => one.kind === kind;

/** The version of a kind in force on a day, for a family where the kind goes by family. Throws where the story has none. */
export function ruleOn<Kind extends RuleKind>(
  book: RuleBook,
  { seller, kind, family, on }: { seller: SellerKey; kind: Kind; family?: FamilyCode; on: CalendarDay },
): Rule<Kind> {
  const candidates = book.flatMap((one) =>
    one.seller === seller && isKind(one, kind) && one.partId === null && one.family === (family ?? null)
      ? [one]
      : [],
  );
  const found = versionOn(candidates, on);
  if (!found) throw new RangeError(`${ORGANISATIONS[seller].name} has no ${kind} on ${on}`);
  return found;
}
