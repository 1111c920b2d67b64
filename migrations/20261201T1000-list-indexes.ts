type Run = (sql: string) => Promise<unknown>;

// A page of a list reads the first claims of each of its states in the order it shows them, and an index hands them out
// in that order: its cost is that of the page. The claims of one state are counted in the index alone.
export const up = (run: Run) =>
  run(`
    create index claims_received_urgent on claims
      (seller_id, state, safety_reported desc, answer_due_at, filed_at nulls first, id);
    create index claims_received_filed on claims (seller_id, state, filed_at nulls first, id) include (workshop_id);
    create index claims_received_asked on claims (seller_id, state, asked_minor, id);
    create index claims_received_due on claims (seller_id, state, answer_due_at, id);
    create index claims_own_urgent on claims
      (workshop_id, state, safety_reported desc, answer_due_at, filed_at nulls first, id);
    create index claims_own_filed on claims (workshop_id, state, filed_at nulls first, id) include (seller_id);
    create index claims_own_asked on claims (workshop_id, state, asked_minor, id);
    create index claims_own_due on claims (workshop_id, state, answer_due_at, id);
    create index claims_held on claims
      (holder_id, state, safety_reported desc, answer_due_at, filed_at nulls first, id) where holder_id is not null;
    create index claims_parked on claims
      (parked_with_id, state, safety_reported desc, answer_due_at, filed_at nulls first, id) where parked_with_id is not null;
    drop index claims_by_seller_state;
  `);

export const down = (run: Run) =>
  run(`
    create index claims_by_seller_state on claims (seller_id, state, filed_at);
    drop index claims_received_urgent, claims_received_filed, claims_received_asked, claims_received_due,
      claims_own_urgent, claims_own_filed, claims_own_asked, claims_own_due, claims_held, claims_parked;
  `);
