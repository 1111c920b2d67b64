import "server-only";
import type { Actor } from "@/lib/access/actor";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { presentCatalogue, type CatalogueRow, type CatalogueView } from "./present";
import { CATALOGUE_PAGE_SIZE, type CatalogueQuery } from "./schema";
import type { Successor } from "./supersession";

const ROW = `
  select p.part_number as "partNumber", p.name, p.family, m.name as maker, s.part_number as "supersededBy",
    p.serial_tracked as "serialTracked"
  from parts p join makers m on m.seller_id = p.seller_id and m.id = p.maker_id
    left join parts s on s.seller_id = p.seller_id and s.id = p.superseded_by_id
  where p.seller_id = $1`;

const MATCHES = `($2 = '' or p.part_number ilike $3 or p.name ilike $3 or exists (select 1 from makers mm
  where mm.seller_id = p.seller_id and mm.id = p.maker_id and mm.name ilike $3))`;

const like = (text: string) => `%${text.replace(/[\\%_]/gu, (sign) => `\\${sign}`)}%`;

/** One page of the actor's own catalogue, in the order of part numbers. */
export const listCatalogue = (actor: Actor, { q, page }: CatalogueQuery): Promise<CatalogueView> =>
  unitOfWork(actor, async (work) => {
    const typed = q.trim();
    const bind = [actor.organisationId, typed, like(typed)];
    const [counted] = await rows<{ total: number }>(
      work,
      `select count(*)::int as total from parts p where p.seller_id = $1 and ${MATCHES}`,
      bind,
    );
    const total = counted?.total ?? 0;
    // An address may name a page that has gone: it then shows the last one there is.
    const shown = Math.min(page, Math.max(1, Math.ceil(total / CATALOGUE_PAGE_SIZE)));
    const parts = await rows<CatalogueRow>(
      work,
      `${ROW} and ${MATCHES} order by p.part_number limit ${CATALOGUE_PAGE_SIZE} offset $4`,
      [...bind, (shown - 1) * CATALOGUE_PAGE_SIZE],
    );
    return presentCatalogue(parts, { total, page: shown });
  });

/** A part of the actor's own catalogue by its number, or null. */
export const findCataloguePart = (actor: Actor, partNumber: string): Promise<CatalogueRow | null> =>
  unitOfWork(actor, async (work) => {
    const [part] = await rows<CatalogueRow>(work, `${ROW} and p.part_number = $2`, [
      actor.organisationId,
      partNumber,
    ]);
    return part ?? null;
  });

/** Names of the makers in the actor's catalogue. */
export const listMakers = (actor: Actor): Promise<string[]> =>
  unitOfWork(actor, async (work) => {
    const makers = await rows<{ name: string }>(
      work,
      "select name from makers where seller_id = $1 order by name limit 500",
      [actor.organisationId],
    );
    return makers.map(({ name }) => name);
  });

/** Every part of the actor's catalogue that another one took the place of. */
export const listSuccessors = (work: Work): Promise<Successor[]> =>
  rows<Successor>(
    work,
    `select p.part_number as "partNumber", s.part_number as successor
     from parts p join parts s on s.seller_id = p.seller_id and s.id = p.superseded_by_id where p.seller_id = $1`,
    [work.actor.organisationId],
  );
