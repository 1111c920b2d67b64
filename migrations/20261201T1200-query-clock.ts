type Run = (sql: string) => Promise<unknown>;

/** Callable by `worker` alone, run as `keeper` with a fixed search path. */
const guarded = (signature: string, returns: string, body: string) => `
  create function guarded.${signature} returns ${returns} language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$ ${body} $body$;
  revoke all on function guarded.${signature.replace(/\bp_\w+\s/g, "")} from public;
  grant execute on function guarded.${signature.replace(/\bp_\w+\s/g, "")} to worker;
`;

const DAYS = "query_id uuid, asked_on text, lapses_on text, today text, reminders_sent integer";
// Days are those of the workshop, whose time it is that runs out.
const OPEN_DAYS = `q.id, (q.asked_at at time zone o.time_zone)::date::text, c.query_lapses_on::text,
  (now() at time zone o.time_zone)::date::text, q.reminders_sent`;
const OPEN_QUERIES = `claims c join claim_queries q on q.claim_id = c.id and q.answered_at is null
  join organisations o on o.id = c.workshop_id`;
const IS_OPEN = "c.state = 'answerNeeded' and c.query_lapses_on is not null";

/** Every open query, by its days alone. */
const waitingQueries = guarded(
  "waiting_queries()",
  `table (${DAYS})`,
  `begin
     return query select ${OPEN_DAYS} from ${OPEN_QUERIES} where ${IS_OPEN} order by c.query_lapses_on, q.id;
   end`,
);

/** Locks the claim of a query and says how the query stands; nothing where somebody else has the claim at this moment. */
const holdQuery = guarded(
  "hold_query(p_query uuid)",
  `table (${DAYS}, number text, family text, distributor text, question text, row_ids jsonb)`,
  `begin
     perform 1 from claims c where c.id = (select q.claim_id from claim_queries q where q.id = p_query)
       for update skip locked;
     if not found then return; end if;
     -- A statement of its own: what is read now is what stands under the lock, not what stood before it.
     return query select ${OPEN_DAYS}, c.number, c.family, s.name, q.question, q.items
       from ${OPEN_QUERIES} join organisations s on s.id = c.seller_id where q.id = p_query and ${IS_OPEN};
   end`,
);

// Not granted to anybody: the two functions below call it as keeper. Without an organisation the key of a mail cannot
// be taken beforehand by somebody who writes to the outbox in the name of one.
const mailOfQuery = `
  create function guarded.mail_of_query(p_query uuid, p_kind text, p_dedupe text, p_params jsonb, p_asker_too boolean)
    returns void language sql set search_path = pg_catalog, public, pg_temp as $body$
    insert into outbox (kind, dedupe_key, recipient, locale, params)
      select p_kind, p_dedupe || ':' || u.id, u.email, u.locale, p_params || jsonb_build_object('name', u.name)
      from claim_queries q join claims c on c.id = q.claim_id join users u on u.disabled_at is null
      where q.id = p_query and (
        (exists (select 1 from memberships m where m.user_id = u.id and m.organisation_id = c.workshop_id
            and m.disabled_at is null)
          and (u.id = c.created_by_id or exists (select 1 from membership_roles r where r.user_id = u.id
            and r.organisation_id = c.workshop_id and r.role = 'workshopManager')))
        or (p_asker_too and u.id = q.asked_by_id and exists (select 1 from memberships m where m.user_id = u.id
          and m.organisation_id = c.seller_id and m.disabled_at is null)))
      on conflict do nothing $body$;
  revoke all on function guarded.mail_of_query(uuid, text, text, jsonb, boolean) from public;
`;

// No person did it: the entry carries the product's name and no organisation.
const entry = (kind: string, detail: string) => `
  insert into timeline_entries (claim_id, seq, seller_id, workshop_id, kind, actor_name, detail, prev_hash, hash)
    values (claim.id, 0, claim.seller_id, claim.workshop_id, '${kind}', 'Partproof', ${detail}, '', '');`;

const DECLARED = "declare claim claims; asked claim_queries; today date;";
const LOCKED = `
  select * into claim from claims c where c.id = (select q.claim_id from claim_queries q where q.id = p_query) for update;
  select * into asked from claim_queries q where q.id = p_query;
  if claim.id is null or claim.state <> 'answerNeeded' or asked.answered_at is not null then return false; end if;
  select (now() at time zone o.time_zone)::date into today from organisations o where o.id = claim.workshop_id;`;

/** A reminder, once. The last day moves only where it has passed without any, and then only to a later one. */
const remindQuery = guarded(
  "remind_query(p_query uuid, p_reminder integer, p_lapses_on date, p_params jsonb)",
  "boolean",
  `${DECLARED}
   begin
     ${LOCKED}
     if asked.reminders_sent >= p_reminder then return false; end if;
     if p_lapses_on < today or (p_lapses_on <> claim.query_lapses_on
         and (asked.reminders_sent > 0 or claim.query_lapses_on >= today)) then
       raise exception 'the last day of a query stays' using errcode = 'PP003';
     end if;
     update claim_queries set reminders_sent = p_reminder where id = p_query;
     update claims set query_lapses_on = p_lapses_on where id = claim.id and query_lapses_on <> p_lapses_on;
     ${entry("reminded", "jsonb_build_object('round', asked.round, 'reminder', p_reminder, 'answerBy', p_lapses_on)")}
     perform guarded.mail_of_query(p_query, 'queryReminder', 'queryReminder:' || p_query || ':' || p_reminder, p_params, false);
     return true;
   end`,
);

/** The end of a claim whose query nobody answered. Its units are free again; not before its day, not without a reminder. */
const lapseQuery = guarded(
  "lapse_query(p_query uuid, p_params jsonb)",
  "boolean",
  `${DECLARED}
   begin
     ${LOCKED}
     if claim.query_lapses_on is null or claim.query_lapses_on >= today or asked.reminders_sent = 0 then return false; end if;
     update claims set state = 'lapsed', holder_id = null, held_until = null, parked_with_id = null, parked_question = null
       where id = claim.id;
     update claim_lines set holds_unit = false where claim_id = claim.id and holds_unit;
     ${entry("lapse", "jsonb_build_object('answerBy', claim.query_lapses_on)")}
     perform guarded.mail_of_query(p_query, 'claimLapsed', 'claimLapsed:' || p_query, p_params, true);
     return true;
   end`,
);

export const up = async (run: Run) => {
  await run(`
    alter table claim_queries add column reminders_sent integer not null default 0 check (reminders_sent between 0 and 2);
    create index claims_answer_needed on claims (query_lapses_on) where state = 'answerNeeded';
    create policy keeper_clock on claims for update to keeper
      using (state = 'answerNeeded') with check (state in ('answerNeeded', 'lapsed'));
    grant update (state, query_lapses_on, holder_id, held_until, parked_with_id, parked_question) on claims to keeper;
    create policy keeper_read on claim_queries for select to keeper using (true);
    create policy keeper_clock on claim_queries for update to keeper
      using (answered_at is null) with check (answered_at is null);
    grant select, update (reminders_sent) on claim_queries to keeper;
    create policy keeper_clock on timeline_entries for insert to keeper
      with check (kind in ('reminded', 'lapse') and actor_id is null and actor_organisation_id is null);
    grant insert on timeline_entries to keeper;
    grant select on claim_moves to keeper;
  `);
  await run(`set local role keeper; grant usage on schema guarded to worker;`);
  for (const part of [waitingQueries, holdQuery, mailOfQuery, remindQuery, lapseQuery]) await run(part);
  await run(`set local role partproof_owner`);
};

export const down = async (run: Run) => {
  await run(`set local role keeper;
    drop function guarded.lapse_query(uuid, jsonb), guarded.remind_query(uuid, integer, date, jsonb),
      guarded.mail_of_query(uuid, text, text, jsonb, boolean), guarded.hold_query(uuid), guarded.waiting_queries();
    revoke usage on schema guarded from worker; set local role partproof_owner;`);
  await run(`
    revoke select on claim_moves from keeper;
    revoke insert on timeline_entries from keeper;
    drop policy keeper_clock on timeline_entries;
    revoke select, update (reminders_sent) on claim_queries from keeper;
    drop policy keeper_clock on claim_queries;
    drop policy keeper_read on claim_queries;
    revoke update (state, query_lapses_on, holder_id, held_until, parked_with_id, parked_question) on claims from keeper;
    drop policy keeper_clock on claims;
    drop index claims_answer_needed;
    alter table claim_queries drop column reminders_sent;
  `);
};
