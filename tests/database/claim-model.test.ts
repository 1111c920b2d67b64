import fc from "fast-check";
import { beforeAll, describe, expect, it } from "vitest";
import type { Actor } from "@/lib/access/actor";
import { contestVerdict } from "@/lib/claims/contesting/service";
import { decideClaim } from "@/lib/claims/deciding/service";
import { discardDraft, withdrawClaim } from "@/lib/claims/filing/service";
import { askWorkshop, putBackClaim, takeClaim, takeOverClaim } from "@/lib/claims/judging/service";
import { answerQuery, fileClaim } from "@/lib/claims/sending/service";
import { actorAt } from "../support/actor";
import { buildPerson } from "../support/build";
import { adminQuery } from "../support/database";
import { draftReady, excuseMissingRows } from "./draft-ready";
import { twoShops, workerOf } from "./shops";

const RUNS = 60;
const LONGEST = 24;

const PEOPLE = ["technician", "manager", "neighbour", "assessor", "colleague", "clerk"] as const;
type Person = (typeof PEOPLE)[number];

let world: Awaited<ReturnType<typeof twoShops>>;
let people: Record<Person, Actor>;

beforeAll(async () => {
  world = await twoShops();
  const [shop, other] = world.shops;
  const [manager, colleague, clerk] = [
    await buildPerson(shop.workshop, ["workshopManager"]),
    await buildPerson(world.seller, ["assessor"]),
    await buildPerson(world.seller, ["accounts"]),
  ];
  people = {
    technician: workerOf(shop),
    manager: actorAt(shop.workshop, manager, ["workshopManager"]),
    neighbour: workerOf(other),
    assessor: actorAt(world.seller, world.assessor, ["assessor"]),
    colleague: actorAt(world.seller, colleague, ["assessor"]),
    clerk: actorAt(world.seller, clerk, ["accounts"]),
  };
});

/** What is true of a claim at any moment, as a person with a list of the rules would keep it. */
type Model = { state: string; holder: Person | null; judge: Person | null; revision: number };

const ofWorkshop = (who: Person) => who === "technician" || who === "manager";
const judges = (who: Person) => who === "assessor" || who === "colleague";
const holds = (model: Model, who: Person) => model.state === "beingJudged" && model.holder === who;

type Verb = {
  /** Whether the rules let this person do it now: written by hand, not read from the product's table. */
  readonly may: (model: Model, who: Person) => boolean;
  readonly then: (model: Model, who: Person) => Partial<Model>;
  readonly act: (actor: Actor, claim: { number: string; id: string }) => Promise<{ ok: boolean }>;
};

async function decide(actor: Actor, { number, id }: { number: string; id: string }, behind: number) {
  const lines = await adminQuery<{ id: string }>("select id from claim_lines where claim_id = $1", [id]);
  const [claim] = await adminQuery<{ revision: number }>("select revision from claims where id = $1", [id]);
  return decideClaim(actor, {
    number,
    revision: (claim?.revision ?? 0) - behind,
    lines: lines.map((line) => ({
      lineId: line.id,
      outcome: "upheld",
      shares: { maker: "1", carrier: "", fitter: "", user: "", wear: "" },
      reasonCode: "faultOfThePart",
      reason: "It grabs when warm.",
    })),
    letter: "We uphold the claim.",
    returnWaivedReason: "The log is clear.",
  });
}

const idle = { holder: null } as const;

const VERBS: Readonly<Record<string, Verb>> = {
  file: {
    may: ({ state }, who) => ofWorkshop(who) && state === "draft",
    then: ({ revision }) => ({ state: "filed", revision: revision + 1 }),
    act: (actor, { number }) => fileClaim(actor, { number }),
  },
  discard: {
    may: ({ state }, who) => ofWorkshop(who) && state === "draft",
    then: () => ({ state: "discarded" }),
    act: (actor, { number }) => discardDraft(actor, { number }),
  },
  withdraw: {
    may: ({ state }, who) => ofWorkshop(who) && ["filed", "beingJudged", "answerNeeded"].includes(state),
    then: () => ({ state: "withdrawn", ...idle }),
    act: (actor, { number }) => withdrawClaim(actor, { number, reason: "Found the fault." }),
  },
  answer: {
    may: ({ state }, who) => ofWorkshop(who) && state === "answerNeeded",
    then: ({ revision }) => ({ state: "filed", revision: revision + 1, ...idle }),
    act: (actor, { number }) => answerQuery(actor, { number }),
  },
  contest: {
    may: ({ state }, who) => who === "manager" && state === "decided",
    then: () => ({ state: "contested" }),
    act: (actor, { number }) => contestVerdict(actor, { number, reason: "Look at photo 3." }),
  },
  take: {
    may: ({ state, judge }, who) => judges(who) && ["filed", "contested"].includes(state) && judge !== who,
    then: (_model, who) => ({ state: "beingJudged", holder: who }),
    act: (actor, { number }) => takeClaim(actor, { number }),
  },
  takeOver: {
    may: ({ state, judge }, who) => judges(who) && state === "beingJudged" && judge !== who,
    then: (_model, who) => ({ holder: who }),
    act: (actor, { number }) => takeOverClaim(actor, { number }),
  },
  putBack: {
    may: holds,
    then: () => ({ state: "filed", ...idle }),
    act: (actor, { number }) => putBackClaim(actor, { number, reason: "Not my field." }),
  },
  ask: {
    may: holds,
    then: () => ({ state: "answerNeeded" }),
    act: (actor, { number }) => askWorkshop(actor, { number, question: "Which air gap?", rowIds: [] }),
  },
  decide: {
    may: holds,
    then: (_model, who) => ({ state: "decided", judge: who, ...idle }),
    act: (actor, claim) => decide(actor, claim, 0),
  },
  // A verdict on what was sent before the newest revision never goes through.
  decideOnOldRevision: {
    may: () => false,
    then: () => ({}),
    act: (actor, claim) => decide(actor, claim, 1),
  },
};

type Press = { readonly who: Person; readonly verb: string };

/** Presses worth trying in a state: those the rules allow, and the holder's verdict on an old revision. */
const likely = (model: Model): Press[] =>
  PEOPLE.flatMap((who) =>
    Object.entries(VERBS).flatMap(([verb, rule]) =>
      rule.may(model, who) || (verb === "decideOnOldRevision" && holds(model, who)) ? [{ who, verb }] : [],
    ),
  );

// Three presses in four are likely ones: blind presses alone would seldom get a claim as far as a verdict.
const steps = fc.array(
  fc.record({
    isLikely: fc.boolean(),
    isStillLikely: fc.boolean(),
    pick: fc.nat({ max: 9_999 }),
    blind: fc.record({ who: fc.constantFrom(...PEOPLE), verb: fc.constantFrom(...Object.keys(VERBS)) }),
  }),
  { minLength: 8, maxLength: LONGEST },
);

type Step = { isLikely: boolean; isStillLikely: boolean; pick: number; blind: Press };

const pressOf = ({ isLikely, isStillLikely, pick, blind }: Step, model: Model): Press => {
  const presses = isLikely || isStillLikely ? likely(model) : [];
  return presses[pick % Math.max(1, presses.length)] ?? blind;
};

const factsOf = async (id: string) => {
  const [facts] = await adminQuery(
    `select c.state, c.revision,
       (select count(*)::integer from timeline_entries t where t.claim_id = c.id) as entries,
       (select count(*)::integer from claim_revisions r where r.claim_id = c.id) as revisions
     from claims c where c.id = $1`,
    [id],
  );
  return facts;
};

async function newClaim() {
  const [shop] = world.shops;
  const unit = await world.sell(shop);
  const claim = await draftReady(shop, { unitId: unit.id, partId: world.part.id });
  await excuseMissingRows(people.technician, claim.number);
  return claim;
}

describe("a claim under any order of presses by anybody", () => {
  it(`moves only as the rules say, with one entry a move (${RUNS} walks)`, { timeout: 300_000 }, async () => {
    const tried = new Map<string, number>();
    await fc.assert(
      fc.asyncProperty(steps, async (walk) => {
        const claim = await newClaim();
        let model: Model = { state: "draft", holder: null, judge: null, revision: 0 };
        let entries = 0;
        for (const step of walk) {
          const { who, verb } = pressOf(step, model);
          tried.set(verb, (tried.get(verb) ?? 0) + 1);
          const rule = VERBS[verb];
          if (!rule) continue;
          const expected = rule.may(model, who);
          const outcome = await rule.act(people[who], claim);
          expect({ verb, who, state: model.state, ok: outcome.ok }).toEqual({
            verb,
            who,
            state: model.state,
            ok: expected,
          });
          if (expected) {
            model = { ...model, ...rule.then(model, who) };
            entries += 1;
          }
          const { state, revision } = model;
          expect(await factsOf(claim.id)).toEqual({ state, revision, entries, revisions: revision });
        }
      }),
      { numRuns: RUNS, endOnFailure: true },
    );
    // Every verb was pressed: a rule nobody tries proves nothing.
    expect([...tried.keys()].toSorted()).toEqual(Object.keys(VERBS).toSorted());
  });
});
