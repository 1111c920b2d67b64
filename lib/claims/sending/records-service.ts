import "server-only";
import { rows, type Work } from "@/lib/db/unit-of-work";
import { calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { normaliseSerial } from "@/lib/labels/serial";
import type { Claim } from "@/models/claim";
import { Fitting } from "@/models/fitting";
import type { ClaimDraft } from "../draft";
import type { ClaimFacts, FactLine } from "../facts-shape";

/** The vehicle of that frame serial at this workshop, made on first sight. */
async function keepVehicle(work: Work, facts: ClaimFacts): Promise<string | null> {
  const [vehicle] = await rows<{ id: string }>(
    work,
    `insert into vehicles (workshop_id, frame_serial, frame_serial_normal, model) values ($1, $2, $3, $4)
     on conflict (workshop_id, frame_serial_normal)
       do update set model = case when excluded.model = '' then vehicles.model else excluded.model end
     returning id`,
    [
      work.actor.organisationId,
      facts.vehicle.frameSerial,
      normaliseSerial(facts.vehicle.frameSerial),
      facts.vehicle.model,
    ],
  );
  return vehicle?.id ?? null;
}

/** A name typed for the first time becomes an installer of the workshop, under a code that says nothing about the person. */
async function keepInstaller(work: Work, name: string): Promise<string | null> {
  if (name.trim() === "") return null;
  const [known] = await rows<{ id: string }>(
    work,
    "select id from installers where workshop_id = $1 and lower(name) = lower($2)",
    [work.actor.organisationId, name.trim()],
  );
  if (known) return known.id;
  const [made] = await rows<{ id: string }>(
    work,
    `insert into installers (workshop_id, name, code)
     select $1, $2, 'F' || lpad((count(*) + 1)::text, 2, '0') from installers where workshop_id = $1
     on conflict do nothing returning id`,
    [work.actor.organisationId, name.trim()],
  );
  return made?.id ?? null;
}

type Fitted = Pick<Fitting, "unitId" | "vehicleId" | "position" | "fittedOn" | "removedOn" | "installerId">;

/** The unit's fitting in this workshop: the running one is corrected, otherwise a new one begins. */
async function keepFitting({ transaction, actor }: Work, sellerId: string, fitted: Fitted): Promise<void> {
  const whose = { sellerId, workshopId: actor.organisationId, unitId: fitted.unitId };
  const known = await Fitting.findOne({ where: whose, order: [["fittedOn", "DESC"]], transaction });
  const removedOn = fitted.removedOn ?? known?.removedOn ?? null;
  const installerId = fitted.installerId ?? known?.installerId ?? null;
  const kept = { ...fitted, removedOn, installerId };
  await (known
    ? known.update(kept, { transaction })
    : Fitting.create({ ...whose, ...kept }, { transaction }));
}

/** A removal before the fitting cannot be: the day is then left open for the distributor to ask about. */
const removalOf = (line: FactLine, facts: ClaimFacts): CalendarDay | null =>
  facts.repairedOn && line.fittedOn && facts.repairedOn >= line.fittedOn
    ? calendarDay(facts.repairedOn)
    : null;

/**
 * Keeps what a claim tells about units in service: the vehicle, who fitted the part and when, and that the replacement's
 * own life has begun. Later claims and the life data of the part start from these.
 */
export async function recordService(
  work: Work,
  claim: Claim,
  { facts, draft }: { facts: ClaimFacts; draft: ClaimDraft },
): Promise<void> {
  const vehicleId = await keepVehicle(work, facts);
  await claim.update({ vehicleId }, { transaction: work.transaction });
  for (const line of facts.lines) {
    const installerId = await keepInstaller(work, draft.lines[line.lineNumber - 1]?.installer ?? "");
    if (line.unit && line.fittedOn)
      await keepFitting(work, claim.sellerId, {
        unitId: line.unit.id,
        vehicleId,
        position: line.position,
        fittedOn: calendarDay(line.fittedOn),
        removedOn: removalOf(line, facts),
        installerId,
      });
    if (line.replacement?.unitId && line.replacement.fittedOn)
      await keepFitting(work, claim.sellerId, {
        unitId: line.replacement.unitId,
        vehicleId,
        position: line.position,
        fittedOn: calendarDay(line.replacement.fittedOn),
        removedOn: null,
        installerId: null,
      });
  }
}

/** Writes the lines of the claim as sent, and asks for each unit: who comes second is told nothing of it. */
export async function writeLines(work: Work, claim: Claim, facts: ClaimFacts): Promise<void> {
  for (const line of facts.lines) {
    const [written] = await rows<{ id: string }>(
      work,
      `insert into claim_lines (claim_id, seller_id, workshop_id, line_number, part_id, unit_id, invoice_line_id, quantity,
         serial_typed, fitting_id, asked_minor)
       values ($1, $2, $3, $4, $5, $6, $7, $8, $9,
         (select id from fittings where seller_id = $2 and workshop_id = $3 and unit_id = $6 order by fitted_on desc limit 1), $10)
       on conflict (claim_id, line_number) do update set part_id = excluded.part_id, unit_id = excluded.unit_id,
         invoice_line_id = excluded.invoice_line_id, quantity = excluded.quantity, serial_typed = excluded.serial_typed,
         fitting_id = excluded.fitting_id, asked_minor = excluded.asked_minor
       returning id`,
      [
        claim.id,
        claim.sellerId,
        claim.workshopId,
        line.lineNumber,
        line.part.id,
        line.unit?.id ?? null,
        line.invoiceLine?.id ?? null,
        line.quantity,
        line.serialTyped,
        line.askedMinor,
      ],
    );
    if (written && line.unit) await rows(work, "select guarded.hold_unit($1)", [written.id]);
  }
}
