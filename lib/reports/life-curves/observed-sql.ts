import { NO_BATCH } from "./outcomes";

// One row for each unit of a part, in the database alone; each is looked up in indexes by its id, so that twice the units
// cost twice as much: when its service began, when and how its observation ended.
// $1 distributor, $2 part ids, $3 data cut, $4 lag in days, $5 start rule ('fitting' or 'lag'), $6 time zone,
// $7 the workshop with the most claims, or null.

/** The terms of each part number from each day on, by the rule of lib/rule-book: part before family before general. */
const SPANS = `spans as materialized (
  select p.id as part_id, d.valid_from as from_on,
    lead(d.valid_from) over (partition by p.id order by d.valid_from) as to_on,
    (w.body ->> 'coverMonths')::int as cover_months, (w.body ->> 'shelfLimitMonths')::int as shelf_months,
    (w.body ->> 'filingLimitDays')::int as filing_days, w.body ->> 'startsWithoutFitting' as without_fitting,
    (w.body ->> 'replacementMinimumDays')::int as minimum_days
  from parts p
    cross join lateral (select distinct r.valid_from from rule_book_versions r where r.seller_id = $1
      and r.kind = 'terms' and (r.family is null or r.family = p.family) and (r.part_id is null or r.part_id = p.id)) d
    cross join lateral (select r.body from rule_book_versions r where r.seller_id = $1 and r.kind = 'terms'
      and (r.family is null or r.family = p.family) and (r.part_id is null or r.part_id = p.id)
      and r.valid_from <= d.valid_from
      order by (r.part_id is not null) desc, (r.family is not null) desc, r.valid_from desc limit 1) w
  where p.seller_id = $1 and p.id = any ($2::uuid[]))`;

/** The fittings of a unit known at the data cut: the first, and the last removal where none is open any more. */
const FITTED = `select min(f.fitted_on) as first_on, count(*) as times,
      case when bool_and(f.removed_on is not null and f.removed_on <= $3::date) then max(f.removed_on) end as removed_on
    from fittings f where f.seller_id = $1 and f.unit_id = u.id and f.fitted_on <= $3::date`;

/** The claim that tells of a unit: one that was not declined before one that was, the earliest failure of them. */
const CLAIMED = `select t.* from (
      select l.claim_id, c.failed_on,
        case when c.state in ('withdrawn', 'lapsed') then 'declined'
          when c.state not in ('decided', 'contested', 'settled') or (c.decided_at at time zone $6)::date > $3::date
            then 'undecided'
          when coalesce(l.verdict, c.outcome) = 'declined' then 'declined'
          when coalesce(l.attribution ->> 'maker', '0') !~ '^0*(/[0-9]+)?$' then 'confirmed'
          else 'otherCause' end as told
      from claim_lines l join claims c on c.id = l.claim_id
      where l.seller_id = $1 and l.unit_id = u.id and c.state not in ('draft', 'discarded')
        and c.failed_on <= $3::date and coalesce(c.filed_on, c.filed_at::date) <= $3::date) t
    order by (t.told = 'declined'), t.failed_on, t.claim_id limit 1`;

/** What a unit supplied under a claim keeps of its chain: the end of the cover of the unit that was bought. */
const ROOT = `with recursive chain as (
      select u.replaces_unit_id as at_id, 1 as depth where u.supplied_under_claim and u.replaces_unit_id is not null
      union all select e.replaces_unit_id, c.depth + 1 from chain c join units e on e.seller_id = $1 and e.id = c.at_id
        where e.supplied_under_claim and e.replaces_unit_id is not null and c.depth < 20)
    select least((select min(f.fitted_on) from fittings f where f.seller_id = $1 and f.unit_id = e.id)
        + make_interval(months => s.cover_months),
      l.shipped_on + make_interval(months => s.cover_months + s.shelf_months))::date as ends_on
    from chain c join units e on e.seller_id = $1 and e.id = c.at_id
      join invoice_lines l on l.seller_id = $1 and l.id = e.invoice_line_id
      join spans s on s.part_id = e.part_id and l.shipped_on >= s.from_on and (s.to_on is null or l.shipped_on < s.to_on)
    order by c.depth desc limit 1`;

/** End of cover: the earlier of (fitting + term) and (shipment + [shelf limit + term]); a replacement has a least cover. */
const COVER_ENDS = `case
    when r.ends_on is not null
      then greatest(r.ends_on, (coalesce(f.first_on, l.shipped_on) + s.minimum_days))
    when f.first_on is null and s.without_fitting = 'shipment'
      then (l.shipped_on + make_interval(months => s.cover_months))::date
    else least(f.first_on + make_interval(months => s.cover_months),
      l.shipped_on + make_interval(months => s.cover_months + s.shelf_months))::date end`;

/** A unit that failed was in use: its start is estimated. One without claim and fitting is on the shelf. */
const KNOWN = `known as materialized (
  select u.id as unit_id, u.batch_id, u.buyer_id, l.shipped_on, f.times, f.removed_on, c.claim_id, c.failed_on,
    c.told,
    case when $5 = 'fitting' and f.first_on is not null then f.first_on
      when $5 = 'lag' or c.claim_id is not null then l.shipped_on + $4::int end as start_on,
    not ($5 = 'fitting' and f.first_on is not null) as assumed,
    least($3::date, (${COVER_ENDS}) - 1 + s.filing_days) as observed_to
  from units u
    left join invoice_lines l on l.seller_id = u.seller_id and l.id = u.invoice_line_id
    left join lateral (${FITTED}) f on true
    left join lateral (${CLAIMED}) c on true
    left join lateral (${ROOT}) r on true
    left join spans s on s.part_id = u.part_id and l.shipped_on >= s.from_on
      and (s.to_on is null or l.shipped_on < s.to_on)
  where u.seller_id = $1 and u.part_id = any ($2::uuid[]) and (l.shipped_on is null or l.shipped_on <= $3::date))`;

/** Observation ends at the failure, at the removal, or when nobody claims any more, whichever comes first. */
const ENDED = `ended as materialized (
  select k.*,
    case when k.shipped_on is null then 'noShipment' when k.start_on is null then 'shelf'
      when k.failed_on <= k.observed_to then k.told
      when k.removed_on <= k.observed_to and k.claim_id is null then 'removed'
      when k.observed_to < $3::date then 'coverEnded' else 'running' end as ended_as,
    case when k.failed_on <= k.observed_to then k.failed_on
      when k.claim_id is null then least(k.removed_on, k.observed_to) else k.observed_to end as end_on
  from known k)`;

/** Days in service: several fittings add up, the days between them do not count. */
const SERVED = `served as materialized (
  select e.*, case when not e.assumed and e.times > 1 then
      (select sum(greatest(0, least(coalesce(f.removed_on, e.end_on), e.end_on) - f.fitted_on)) from fittings f
        where f.seller_id = $1 and f.unit_id = e.unit_id and f.fitted_on <= e.end_on)::int
    else e.end_on - e.start_on end as age_days
  from ended e)`;

const PLACED = `observed as (
  select unit_id, coalesce(batch_id, '${NO_BATCH}'::uuid) as batch_id, claim_id, failed_on,
     assumed and start_on is not null as assumed, coalesce(buyer_id = $7::uuid, false) as at_largest,
    case when ended_as in ('noShipment', 'shelf') then ended_as
      when age_days >= 0 then ended_as
      when ended_as in ('confirmed', 'otherCause', 'undecided', 'declined') then 'beforeStart'
      when observed_to < $3::date then 'afterCover' else 'shelf' end as outcome,
    case when ended_as not in ('noShipment', 'shelf') and age_days >= 0 then age_days end as age_days
  from served)`;

/** `observed`: one row a unit with batch_id, claim_id, failed_on, outcome, age_days, assumed, at_largest. */
export const OBSERVED = `with ${[SPANS, KNOWN, ENDED, SERVED, PLACED].join(",\n")}`;
