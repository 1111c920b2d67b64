type Run = (sql: string) => Promise<unknown>;

/** Callable by `web` alone, run as `keeper` with a fixed search path. */
const guarded = (signature: string, returns: string, body: string) => `
  create function guarded.${signature} returns ${returns} language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$ ${body} $body$;
  revoke all on function guarded.${signature.replace(/\bp_\w+\s/g, "")} from public;
  grant execute on function guarded.${signature.replace(/\bp_\w+\s/g, "")} to web;
`;

// What no session variable can claim: that the person is an administrator at work for this organisation.
const isAdministrator = `exists (select 1 from memberships m
    join users u on u.id = m.user_id and u.disabled_at is null
    join membership_roles r on r.organisation_id = m.organisation_id and r.user_id = m.user_id and r.role = 'administrator'
    where m.organisation_id = ctx_org() and m.user_id = ctx_actor() and m.disabled_at is null)`;

/**
 * A workshop the product does not know yet, with its first site; or, found by its tax number, the one it knows.
 * Nothing else tells a distributor whether an organisation it does not trade with exists.
 */
const openWorkshop = guarded(
  "open_workshop(p_given jsonb)",
  "table (organisation_id uuid, was_known boolean)",
  `declare tax text := upper(regexp_replace(coalesce(p_given ->> 'taxNumber', ''), '[^[:alnum:]]', '', 'g')); made uuid;
   begin
     if not (${isAdministrator} and exists (select 1 from organisations o where o.id = ctx_org() and o.sells)) then
       raise exception 'only an administrator of a distributor opens a workshop' using errcode = 'PP002';
     end if;
     if length(tax) >= 6 then
       -- Two distributors that enter the same workshop at once must not make two of it.
       perform pg_advisory_xact_lock(hashtextextended(tax, 9));
       select o.id into made from organisations o
         where o.buys and o.id <> ctx_org() and upper(regexp_replace(o.tax_number, '[^[:alnum:]]', '', 'g')) = tax
         order by o.created_at limit 1;
       if made is not null then return query select made, true; return; end if;
     end if;
     made := gen_random_uuid();
     insert into organisations (id, name, legal_name, sells, buys, address, country, tax_number, currency, time_zone, languages)
       values (made, p_given ->> 'name', p_given ->> 'legalName', false, true, p_given ->> 'address', p_given ->> 'country',
         nullif(p_given ->> 'taxNumber', ''), p_given ->> 'currency', p_given ->> 'timeZone', array[p_given ->> 'language']);
     insert into sites (organisation_id, name, address)
       values (made, p_given ->> 'siteName', p_given ->> 'siteAddress');
     return query select made, false;
   end`,
);

/** When each of the organisation's people was last at work for it, and whether they ever set a password. */
const peopleSeen = guarded(
  "people_seen()",
  "table (user_id uuid, last_seen_at timestamptz, has_password boolean)",
  `begin
     if not ${isAdministrator} then
       raise exception 'only an administrator sees who was at work' using errcode = 'PP002';
     end if;
     return query select m.user_id, (select max(s.last_seen_at) from sessions s
           where s.user_id = m.user_id and s.organisation_id = m.organisation_id), u.password_hash is not null
       from memberships m join users u on u.id = m.user_id where m.organisation_id = ctx_org();
   end`,
);

export const up = async (run: Run) => {
  await run(`
    create policy keeper_insert on organisations for insert to keeper with check (buys and not sells);
    create policy keeper_insert on sites for insert to keeper with check (true);
    grant insert on organisations, sites to keeper;
  `);
  await run(`set local role keeper`);
  for (const part of [openWorkshop, peopleSeen]) await run(part);
  await run(`set local role partproof_owner`);
};

export const down = async (run: Run) => {
  await run(`set local role keeper; drop function guarded.open_workshop(jsonb), guarded.people_seen();
    set local role partproof_owner;`);
  await run(`
    revoke insert on organisations, sites from keeper;
    drop policy keeper_insert on sites;
    drop policy keeper_insert on organisations;
  `);
};
