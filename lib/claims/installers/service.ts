import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { writeToAudit } from "@/lib/people/audit-service";
import { allows } from "@/lib/people/rights-queries";
import type { InstallerChange, NewInstaller } from "./schema";

type Kept = { readonly id: string };
type Refused = "notAllowed" | "notFound" | "installerTwice";

/** One at a time for each workshop: the next code and the names are read under it. */
const lockInstallers = (work: Work) =>
  rows(work, "select pg_advisory_xact_lock(hashtextextended('installers:' || $1, 0))", [
    work.actor.organisationId,
  ]);

const isTaken = async (work: Work, name: string, exceptId: string | null): Promise<boolean> => {
  const found = await rows(
    work,
    "select id from installers where workshop_id = $1 and lower(name) = lower($2) and id is distinct from $3",
    [work.actor.organisationId, name, exceptId],
  );
  return found.length > 0;
};

const keeping = (actor: Actor, keep: (work: Work) => Promise<Outcome<Kept, Refused>>) =>
  unitOfWork(actor, async (work): Promise<Outcome<Kept, Refused>> => {
    if (!(await allows(work, "keepInstallers"))) return refuse("notAllowed");
    await lockInstallers(work);
    return keep(work);
  });

/** Adds somebody who fits parts, under a code of their own that says nothing about the person. Refuses a name that is there. */
export const addInstaller = (actor: Actor, { name }: NewInstaller) =>
  keeping(actor, async (work) => {
    if (await isTaken(work, name, null)) return refuse("installerTwice", { name }, "name");
    const [made] = await rows<Kept>(
      work,
      `insert into installers (workshop_id, name, code)
       select $1, $2, 'F' || lpad((coalesce(max(substring(code from '^F([0-9]{1,6})$')::int), 0) + 1)::text, 2, '0')
       from installers where workshop_id = $1 returning id`,
      [actor.organisationId, name],
    );
    if (!made) throw new Error("an installer was not kept");
    await writeToAudit(work, "installer.added", { installerId: made.id });
    return ok(made);
  });

/** Keeps another name, or that they left or are back. The code stays: verdicts and records speak of it. */
export const changeInstaller = (actor: Actor, { installerId, name, works }: InstallerChange) =>
  keeping(actor, async (work) => {
    if (await isTaken(work, name, installerId)) return refuse("installerTwice", { name }, "name");
    const [kept] = await rows<Kept>(
      work,
      `update installers set name = $3, left_on = case when $4 = 'left' then coalesce(left_on, current_date) end
       where workshop_id = $1 and id = $2 returning id`,
      [actor.organisationId, installerId, name, works],
    );
    if (!kept) return refuse("notFound");
    await writeToAudit(work, "installer.changed", { installerId, works });
    return ok(kept);
  });
