type Run = (sql: string) => Promise<unknown>;

// A photo or log that another claim of the same distributor already holds: the distributor is told, the sender is not.
const seenBefore = `
  create function guarded.flag_seen_before(p_evidence uuid) returns void language plpgsql security definer
    set search_path = pg_catalog, public, pg_temp as $body$
    begin
      insert into claim_flags (claim_id, seller_id, workshop_id, kind, detail)
        select e.claim_id, e.seller_id, e.workshop_id,
          case e.kind when 'photo' then 'photoSeenBefore' when 'runLog' then 'logSeenBefore' else 'documentSeenBefore' end,
          jsonb_build_object('otherClaim', c.number, 'name', e.original_name)
        from evidence_files e
          join lateral (select o.claim_id from evidence_files o where o.seller_id = e.seller_id and o.sha256 = e.sha256
            and o.claim_id <> e.claim_id order by o.received_at limit 1) other on true
          join claims c on c.id = other.claim_id
        where e.id = p_evidence and e.workshop_id = ctx_org();
    end $body$;
  revoke all on function guarded.flag_seen_before(uuid) from public;
  grant execute on function guarded.flag_seen_before(uuid) to web;
`;

export const up = async (run: Run) => {
  await run(
    `create policy keeper_read on evidence_files for select to keeper using (true); grant select on evidence_files to keeper;`,
  );
  await run(`set local role keeper`);
  await run(seenBefore);
  await run(`set local role partproof_owner`);
};

export const down = (run: Run) =>
  run(`set local role keeper; drop function guarded.flag_seen_before(uuid); set local role partproof_owner;
    drop policy keeper_read on evidence_files; revoke select on evidence_files from keeper;`);
