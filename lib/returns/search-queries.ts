import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { claimPath } from "@/lib/claims/paths";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { bestMatches } from "./match";
import { printReturnNumber } from "./number";
import { receivesParts } from "./parcel-service";
import { PARCELS, presentParcel, type ParcelRow } from "./lists-queries";
import { returnPath } from "./paths";
import { meaningsOf, type Meaning } from "./scan-anything";
import type { MatchView, ParcelItem } from "./view";

type Place = `/goods-in/${string}` | `/claims/${string}`;

const BY_NUMBER = "select number from part_returns where seller_id = $1 and number = $2";
const BY_CLAIM = `select c.number as "claimNumber", (select r.number from part_returns r where r.claim_id = c.id
    order by r.called_in_at desc, r.id desc limit 1) as number
  from claims c where c.seller_id = $1 and c.number = $2`;
// A part on its way or at the bench comes before one whose claim is over.
const BY_SERIAL = `select c.number as "claimNumber", r.number from claim_lines l join claims c on c.id = l.claim_id
    left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
    left join lateral (select n.number, n.called_in_at from return_lines x join part_returns n on n.id = x.return_id
      where x.line_id = l.id order by n.called_in_at desc, n.id desc limit 1) r on true
  where l.seller_id = $1 and (l.unit_id = any (select id from units where seller_id = $1 and serial_normal = $2)
    or (u.id is null and l.return_state in ('awaited', 'sent', 'received', 'missing')
      and upper(regexp_replace(l.serial_typed, '[^[:alnum:]]', '', 'g')) = $2))
  order by (l.return_state in ('awaited', 'sent', 'received', 'missing')) desc, r.called_in_at desc nulls last limit 1`;

type Hit = { number: string | null; claimNumber?: string };

async function placeOf(work: Work, meaning: Meaning): Promise<Place | null> {
  const own = work.actor.organisationId;
  const [hit] =
    meaning.means === "return"
      ? await rows<Hit>(work, BY_NUMBER, [own, meaning.number])
      : meaning.means === "claim"
        ? await rows<Hit>(work, BY_CLAIM, [own, meaning.number])
        : await rows<Hit>(work, BY_SERIAL, [own, meaning.serialNormal]);
  if (!hit) return null;
  if (hit.number !== null) return returnPath({ number: hit.number });
  return hit.claimNumber === undefined ? null : claimPath({ number: hit.claimNumber });
}

/**
 * Where a scanned text leads: the return it names, the return or the sheet of the claim it names, the newest return of
 * the unit it names. Null where this organisation knows nothing of it.
 */
export const findPlace = (actor: Actor, text: string): Promise<Place | null> =>
  unitOfWork(actor, async (work) => {
    if (!receivesParts(actor)) return null;
    for (const meaning of meaningsOf(text, todayOf(actor))) {
      const place = await placeOf(work, meaning);
      if (place !== null) return place;
    }
    return null;
  });

type ExpectedRow = {
  number: string;
  claimNumber: string;
  workshopName: string;
  senders: string[];
  parts: { number: string; name: string; serial: string | null }[];
};

const MOST_COMPARED = 500;

// Everything that has not arrived: on its way, awaited, or given up as lost or never sent.
const EXPECTED = `select r.number, c.number as "claimNumber", w.name as "workshopName",
    array(select distinct t from unnest(array[w.name, w.legal_name] || array(select s.name from sites s
      where s.organisation_id = w.id)) t) as senders,
    json_agg(json_build_object('number', p.part_number, 'name', p.name, 'serial', coalesce(u.serial, l.serial_typed))) as parts
  from claim_lines l join return_lines x on x.line_id = l.id join part_returns r on r.id = x.return_id
    join claims c on c.id = l.claim_id join organisations w on w.id = l.workshop_id
    join parts p on p.seller_id = l.seller_id and p.id = l.part_id
    left join units u on u.seller_id = l.seller_id and u.id = l.unit_id
  where l.seller_id = $1 and l.return_state in ('awaited', 'sent', 'missing')
  group by r.id, r.number, c.number, w.id, w.name, w.legal_name
  order by r.due_on desc, r.number limit $2`;

export type ParcelView = { readonly parcel: ParcelItem; readonly matches: readonly MatchView[] };

/** A parcel without a return, with the returns it may belong to, the likeliest first; null for one that is not ours to match. */
export const findParcel = (actor: Actor, id: string): Promise<ParcelView | null> =>
  unitOfWork(actor, async (work) => {
    if (!receivesParts(actor)) return null;
    const [parcel] = await rows<ParcelRow>(
      work,
      `${PARCELS} where id::text = $2 and seller_id = $1 and return_id is null`,
      [actor.organisationId, id],
    );
    if (!parcel) return null;
    const expected = await rows<ExpectedRow>(work, EXPECTED, [actor.organisationId, MOST_COMPARED]);
    const matches = bestMatches(parcel, expected).map(
      ({ expected: { senders: _senders, ...one }, reasons }) => ({
        ...one,
        printed: printReturnNumber(one.number),
        reasons,
      }),
    );
    return { parcel: presentParcel(parcel), matches };
  });
