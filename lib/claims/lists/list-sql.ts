import { CLAIM_STATES, type ClaimState } from "../lifecycle";
import { JUDGING_VIEWS, WORKSHOP_VIEWS, type ListOrder, type ListView } from "./schema";

export type Side = keyof typeof VIEWS;
type ViewKey = `received.${(typeof JUDGING_VIEWS)[number]}` | `own.${(typeof WORKSHOP_VIEWS)[number]}`;
type View = { readonly states: readonly ClaimState[]; readonly of: keyof typeof HANDS };

/** The views of each side, in the order they are shown: claims it received, and claims of its own. */
export const VIEWS = { received: JUDGING_VIEWS, own: WORKSHOP_VIEWS } as const;

/** In whose hands a claim of a view must be. $2 is the person. */
export const HANDS = {
  anyone: "$2::uuid is not null",
  holder: "c.holder_id = $2",
  parkedWith: "c.parked_with_id = $2",
} as const;

/** What a distributor may know of, and what both sides keep. */
const SEEN = CLAIM_STATES.filter((state) => state !== "draft" && state !== "discarded");

// A view is a list of states: an index holds the claims of each in order, whatever else the table holds.
const VIEW: Readonly<Record<ViewKey, View>> = {
  "received.toJudge": { states: ["filed", "contested"], of: "anyone" },
  "received.held": { states: ["beingJudged"], of: "holder" },
  "received.parked": { states: ["beingJudged"], of: "parkedWith" },
  "received.waiting": { states: ["answerNeeded"], of: "anyone" },
  "received.decided": { states: ["decided"], of: "anyone" },
  "received.all": { states: SEEN, of: "anyone" },
  "own.onUs": { states: ["draft", "answerNeeded"], of: "anyone" },
  "own.onThem": { states: ["filed", "beingJudged", "contested"], of: "anyone" },
  "own.decided": { states: ["decided"], of: "anyone" },
  "own.closed": { states: ["settled", "withdrawn", "lapsed"], of: "anyone" },
  "own.all": { states: ["draft", ...SEEN], of: "anyone" },
};
const BY_KEY: ReadonlyMap<string, View> = new Map(Object.entries(VIEW));

/** The states of a view and in whose hands its claims are, if the side has it. */
export const viewOf = (side: Side, view: ListView): View | undefined => BY_KEY.get(`${side}.${view}`);

// Orders are looked up here and never pasted from an address. Every one ends in the id, so that pages never overlap.
export const ORDER: Readonly<Record<ListOrder, string>> = {
  urgent: "c.safety_reported desc, c.answer_due_at asc nulls last, c.filed_at asc nulls first, c.id",
  filed: "c.filed_at asc nulls first, c.id",
  "-filed": "c.filed_at desc nulls first, c.id",
  asked: "c.asked_minor asc, c.id",
  "-asked": "c.asked_minor desc, c.id",
  due: "c.answer_due_at asc nulls last, c.id",
};

// The same order among claims of one state. There all are filed or none is, and an index read backwards has nulls last.
export const ORDER_IN_STATE: Readonly<Record<ListOrder, string>> = {
  ...ORDER,
  "-filed": "c.filed_at desc nulls last, c.id",
};

export const COLUMNS = `c.number, c.state, c.outcome, p.name as "partName", p.part_number as "partNumber",
    coalesce(u.serial, d.body #>> '{lines,0,serial}') as serial, c.family, c.symptom,
    o.name as "otherParty", coalesce(n.line_count, 0)::int as "lineCount", c.asked_minor as "askedMinor",
    c.currency, c.filed_at as "filedAt", c.updated_at as "updatedAt", c.answer_due_at as "answerDueAt",
    c.clock_stopped_at as "clockStoppedAt", c.safety_reported as "safetyReported", h.name as "holderName",
    coalesce(c.holder_id = $2, false) as "isHeldByMe", coalesce(c.parked_with_id = $2, false) as "isParkedWithMe",
    (select count(*)::int from claim_flags f where f.claim_id = c.id) as "flagCount"`;

export const DETAILS = `left join users h on h.id = c.holder_id
    left join lateral (select count(*) as line_count, min(line_number) as first from claim_lines l where l.claim_id = c.id) n on true
    left join claim_lines l1 on l1.claim_id = c.id and l1.line_number = n.first
    left join claim_drafts d on d.claim_id = c.id and c.state = 'draft'
    left join parts p on p.id = coalesce(l1.part_id, (d.body #>> '{lines,0,partId}')::uuid)
    left join units u on u.id = l1.unit_id`;

/** Whose claims they are, and who the other party is. $1 is the organisation. */
export const MINE: Readonly<Record<Side, string>> = {
  received: "c.seller_id = $1",
  own: "c.workshop_id = $1",
};
export const OTHER_PARTY: Readonly<Record<Side, string>> = {
  received: "join organisations o on o.id = c.workshop_id",
  own: "join organisations o on o.id = c.seller_id",
};

const FOUND = `select k.id from claims k where k.number = $4
    union all select s.claim_id from claim_lines s join parts sp on sp.seller_id = s.seller_id and sp.id = s.part_id
      where sp.part_number ilike $6 or sp.name ilike $6`;
const FOUND_BY_SERIAL = `select s.claim_id from units su
    join claim_lines s on s.seller_id = su.seller_id and s.unit_id = su.id where su.serial_normal = $5`;

/** Claims a search finds: by number, by serial, by a piece of a part's number or name, or of the other party's name. */
export const SEARCHED: Readonly<Record<Side, string>> = {
  received: `${FOUND} union all ${FOUND_BY_SERIAL} and su.seller_id = $1
    union all select k.id from organisations w join claims k on k.workshop_id = w.id
      where k.seller_id = $1 and w.name ilike $6`,
  own: `${FOUND} union all ${FOUND_BY_SERIAL} and su.buyer_id = $1
    union all select k.id from organisations w join claims k on k.seller_id = w.id
      where k.workshop_id = $1 and w.name ilike $6`,
};
