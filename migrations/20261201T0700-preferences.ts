type Run = (sql: string) => Promise<unknown>;

// An invited person reads who invited them before they have a session, so row security has nobody to answer for yet.
// It tells the name of one organisation to whoever holds the link, and nothing once the link is spent.
const linkOrganisation = `
  create function guarded.link_organisation(p_token_hash text) returns text language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$
    begin
      return (select o.name from single_use_links l
        join memberships m on m.user_id = l.user_id and m.disabled_at is null
        join organisations o on o.id = m.organisation_id
        where l.token_hash = p_token_hash and l.used_at is null and l.expires_at > now()
        order by m.created_at desc, o.id limit 1);
    end $body$;
  revoke all on function guarded.link_organisation(text) from public;
  grant execute on function guarded.link_organisation(text) to web;
`;

export const up = async (run: Run) => {
  await run(`set local role keeper`);
  await run(linkOrganisation);
  await run(`set local role partproof_owner`);
};

export const down = (run: Run) =>
  run(
    `set local role keeper; drop function guarded.link_organisation(text); set local role partproof_owner;`,
  );
