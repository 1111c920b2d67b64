import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { presentBook, type StoredRule } from "./present";
import type { RuleView } from "./rule-view";

export type BookOwner = { readonly id: string; readonly name: string };

export type Book = {
  readonly owners: readonly BookOwner[];
  readonly owner: BookOwner | null;
  readonly day: CalendarDay;
  readonly rules: readonly RuleView[];
};

/**
 * The rules in force today of one of the organisations whose Rule book the actor may read: their own, and those of the
 * distributors they buy from. An owner nobody may read is as good as none named: the first one is shown.
 */
export const readBook = (actor: Actor, ownerId: string): Promise<Book> =>
  unitOfWork(actor, async (work) => {
    const day = todayOf(actor);
    const owners = await rows<BookOwner>(
      work,
      `select o.id, o.name from organisations o
       where o.sells and (o.id = $1 or exists (select 1 from trading_accounts t
         where t.seller_id = o.id and t.buyer_id = $1))
       order by (o.id = $1) desc, o.name`,
      [actor.organisationId],
    );
    const owner = owners.find(({ id }) => id === ownerId) ?? owners[0] ?? null;
    if (!owner) return { owners, owner, day, rules: [] };
    const stored = await rows<StoredRule>(
      work,
      `select v.id, v.kind, v.rule_number as "ruleNumber", v.title, v.family, p.part_number as "partNumber",
         v.valid_from as "validFrom", v.body
       from rule_book_versions v left join parts p on p.seller_id = v.seller_id and p.id = v.part_id
       where v.seller_id = $1`,
      [owner.id],
    );
    return { owners, owner, day, rules: presentBook(stored, day) };
  });
