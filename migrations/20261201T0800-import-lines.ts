type Run = (sql: string) => Promise<unknown>;

// A first import writes many lines for few buyers before the planner knows the table. With the seller in second place this
// index then looked as good as the key of the units' reference to their line, and each unit walked through all lines of its
// buyer. A workshop buys from few sellers, and its newest purchases are what is asked for.
export const up = (run: Run) =>
  run(`drop index invoice_lines_by_buyer;
    create index invoice_lines_by_buyer on invoice_lines (buyer_id, invoiced_on);`);

export const down = (run: Run) =>
  run(`drop index invoice_lines_by_buyer;
    create index invoice_lines_by_buyer on invoice_lines (buyer_id, seller_id, invoiced_on);`);
