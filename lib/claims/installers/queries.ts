import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { rows, unitOfWork } from "@/lib/db/unit-of-work";
import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { EARLY_DAYS, type InstallerCounts } from "./record";

// A fitting counts once its first days are over, or once it has failed within them: before that nothing is known of it.
// Claims that ended without a verdict count for nobody; a part that was not at fault is no failure of who fitted it.
const RECORDS = `
  with fitted as (
    select f.id, f.installer_id, f.fitted_on, min(c.failed_on) filter (where c.failed_on - f.fitted_on between 0 and $2)
        as failed_on, bool_or(coalesce(l.attribution ->> 'fitter', '0') <> '0' and l.verdict is not null) as was_fitting
    from fittings f
      left join claim_lines l on l.workshop_id = f.workshop_id and l.seller_id = f.seller_id and l.unit_id = f.unit_id
        and l.fitting_id = f.id
      left join claims c on c.id = l.claim_id and c.state not in ('draft', 'discarded', 'withdrawn', 'lapsed')
    where f.workshop_id = $1 group by f.id)
  select i.id, i.name, i.code, i.left_on as "leftOn", count(t.id)::int as fitted,
    count(t.id) filter (where t.failed_on is not null or t.fitted_on <= $3::date - $2::int)::int as watched,
    count(t.failed_on)::int as early, count(t.id) filter (where t.was_fitting)::int as "foundFitting"
  from installers i left join fitted t on t.installer_id = i.id
  where i.workshop_id = $1`;

export type InstallerRow = InstallerCounts & {
  readonly id: string;
  readonly name: string;
  readonly code: string;
  readonly leftOn: CalendarDay | null;
};

const bindings = (actor: Actor) => [actor.organisationId, EARLY_DAYS, todayOf(actor)];

/** Who fits parts at the actor's workshop, by name, with what became of what they fitted. */
export const listInstallerRecords = (actor: Actor): Promise<InstallerRow[]> =>
  unitOfWork(actor, (work) =>
    rows<InstallerRow>(
      work,
      `${RECORDS} group by i.id order by i.left_on nulls first, i.name`,
      bindings(actor),
    ),
  );

/** One of them, or null where the workshop has none of that id. */
export const findInstaller = (actor: Actor, id: string): Promise<InstallerRow | null> =>
  unitOfWork(actor, async (work) => {
    const [found] = await rows<InstallerRow>(work, `${RECORDS} and i.id::text = $4 group by i.id`, [
      ...bindings(actor),
      id,
    ]);
    return found ?? null;
  });
