import { contestVerdict } from "@/lib/claims/contesting/service";
import { decideClaim } from "@/lib/claims/deciding/service";
import { takeClaim } from "@/lib/claims/judging/service";
import { allocateCredit, takeBackAllocation } from "@/lib/day-book/allocating/service";
import { counterCredit } from "@/lib/day-book/issuing/counter-service";
import { issueCredit } from "@/lib/day-book/issuing/service";
import { adminQuery } from "../support/database";
import type { CreditWorld, DecidedClaim } from "./credit-world";

/** What a reader finds wrong in one look at the whole book of a distributor. */
export async function violations(seller: { readonly id: string }): Promise<string[]> {
  // One statement is one moment: every figure comes from its own rows.
  const found = await adminQuery<{ what: string }>(
    `with note as (
       select n.*, (select coalesce(sum(a.amount_minor), 0) from credit_allocations a where a.note_id = n.id) as allocated,
         (select coalesce(sum(l.net_minor), 0) from credit_note_lines l where l.note_id = n.id) as lines,
         exists (select 1 from credit_notes c where c.counters_id = n.id) as countered
       from credit_notes n where n.seller_id = $1),
     posting as (select p.*, e.kind from ledger_postings p join ledger_entries e on e.seller_id = p.seller_id and e.sequence = p.sequence
       where p.seller_id = $1)
     select 'entry ' || sequence || ' does not sum to nothing' as what from posting group by sequence, currency having sum(amount_minor) <> 0
     union all select 'the book does not sum to nothing' from posting group by currency having sum(amount_minor) <> 0
     union all select number || ' is allocated beyond its total' from note where allocated > total_minor or allocated < 0
     union all select number || ' is countered and allocated' from note where countered and allocated <> 0
     union all select number || ' is not the sum of its lines and tax' from note where total_minor <> lines + tax_minor
     union all select 'credited is not allocated and open' where
       (select coalesce(sum(case kind when 'credit' then total_minor else -total_minor end), 0) from note)
       <> (select coalesce(sum(allocated), 0) + coalesce(sum(case when kind = 'credit' and not countered then total_minor - allocated else 0 end), 0) from note)
     union all select 'what is owed is not what is open' where
       (select coalesce(-sum(amount_minor), 0) from posting where account = 'workshopPayable')
       <> (select coalesce(sum(case when kind = 'credit' and not countered then total_minor - allocated else 0 end), 0) from note)`,
    [seller.id],
  );
  return found.map(({ what }) => what);
}

type Standing = { number: string; rows: number; open: string; allocationId: string | null };

const noteOf = async (claimId: string): Promise<Standing | undefined> => {
  const [note] = await adminQuery<Standing>(
    `select n.number, (select count(*)::integer from credit_allocations a where a.note_id = n.id) as rows,
       (n.total_minor - (select coalesce(sum(a.amount_minor), 0) from credit_allocations a where a.note_id = n.id))::text as open,
       (select a.id from credit_allocations a where a.note_id = n.id and a.takes_back_id is null
          and not exists (select 1 from credit_allocations x where x.takes_back_id = a.id) order by random() limit 1) as "allocationId"
     from credit_notes n where n.claim_id = $1 and n.kind = 'credit'
       and not exists (select 1 from credit_notes c where c.counters_id = n.id)`,
    [claimId],
  );
  return note;
};

const amountText = (minor: bigint) => `${minor / 100n}.${String(minor % 100n).padStart(2, "0")}`;
const pick = <One>(from: readonly One[]): One => {
  const one = from[Math.floor(Math.random() * from.length)];
  if (one === undefined) throw new RangeError("nothing to pick from");
  return one;
};

type Operation = (world: CreditWorld, claim: DecidedClaim) => Promise<string>;
const codeOf = (outcome: { ok: boolean; code?: string }) => (outcome.ok ? "ok" : (outcome.code ?? ""));

const issue: Operation = async ({ clerk }, claim) => {
  const [row] = await adminQuery<{ count: number }>(
    "select count(*)::integer as count from credit_notes where claim_id = $1 and kind = 'credit'",
    [claim.id],
  );
  return codeOf(await issueCredit(clerk, { number: claim.number, issuedBefore: row?.count ?? 0 }));
};

const allocate =
  (part: (open: bigint) => bigint): Operation =>
  async ({ clerk }, claim) => {
    const note = await noteOf(claim.id);
    if (!note) return "noNote";
    const amount = amountText(part(BigInt(note.open)));
    const how = pick(["invoice", "paidOut"] as const);
    const form = { number: note.number, how, amount, reference: "R 1", rowsBefore: note.rows };
    return codeOf(await allocateCredit(clerk, form));
  };

const takeBack: Operation = async ({ clerk }, claim) => {
  const note = await noteOf(claim.id);
  if (!note?.allocationId) return "noNote";
  return codeOf(await takeBackAllocation(clerk, { number: note.number, allocationId: note.allocationId }));
};

const counter: Operation = async ({ clerk }, claim) => {
  const note = await noteOf(claim.id);
  return note ? codeOf(await counterCredit(clerk, { number: note.number, reason: "Void." })) : "noNote";
};

/** The workshop objects, and the assessor who did not decide gives another verdict. */
const reverse: Operation = async ({ assessor, second, managers, seller, shops }, claim) => {
  const manager = managers[claim.shop === shops[0] ? 0 : 1];
  const objected = await contestVerdict(manager, { number: claim.number, reason: "No." });
  if (!objected.ok) return codeOf(objected);
  for (const judge of [assessor, second]) {
    if (!(await takeClaim(judge, claim)).ok) continue;
    const [line] = await adminQuery<{ id: string }>("select id from claim_lines where claim_id = $1", [
      claim.id,
    ]);
    const outcome = pick(["upheld", "upheldInPart", "declined"] as const);
    const shares = { maker: "", carrier: "", fitter: "", user: "", wear: "" };
    const given = {
      upheld: { shares: { ...shares, maker: "1" }, reasonCode: "faultOfThePart" as const },
      upheldInPart: { shares: { ...shares, maker: "1/2", wear: "1/2" }, reasonCode: "sharedCause" as const },
      declined: { shares: { ...shares, user: "1" }, reasonCode: "useOutsideLimits" as const },
    }[outcome];
    const decided = await decideClaim(judge, {
      number: claim.number,
      revision: 1,
      letter: "Heard again.",
      returnWaivedReason: "Photographs.",
      lines: [{ lineId: line?.id ?? seller.id, outcome, reason: "Heard.", ...given }],
    });
    return `reversed ${codeOf(decided)}`;
  }
  return "nobodyTook";
};

const OPERATIONS: readonly Operation[] = [
  issue,
  issue,
  allocate((open) => open),
  allocate((open) => open / 3n + 1n),
  allocate((open) => open + 1n),
  takeBack,
  takeBack,
  counter,
  reverse,
];

export type Run = {
  readonly done: ReadonlyMap<string, number>;
  readonly looks: number;
  readonly wrong: readonly string[];
};

/** So many clients for so many seconds over the claims, while a reader looks every 50 ms. */
export async function runBank(
  world: CreditWorld,
  claims: readonly DecidedClaim[],
  { clients, seconds }: { clients: number; seconds: number },
): Promise<Run> {
  const until = Date.now() + seconds * 1000;
  const done = new Map<string, number>();
  const wrong: string[] = [];
  let looks = 0;
  const client = async () => {
    while (Date.now() < until) {
      const code = await pick(OPERATIONS)(world, pick(claims));
      done.set(code, (done.get(code) ?? 0) + 1);
    }
  };
  const reader = async () => {
    while (Date.now() < until) {
      wrong.push(...(await violations(world.seller)));
      looks += 1;
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  };
  await Promise.all([reader(), ...Array.from({ length: clients }, client)]);
  wrong.push(...(await violations(world.seller)));
  return { done, looks, wrong };
}
