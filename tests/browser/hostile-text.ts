import pg from "pg";

// Texts that would run, load or break something if they were ever taken for more than text. `N` is the number each one
// reports by; the element around its end is found in the page if the text became markup without running.
const VECTORS = [
  "<script>hostile(N)</script>",
  "<img src=x onerror=hostile(N)>",
  "<svg onload=hostile(N)>",
  "<svg><script>hostile(N)</script></svg>",
  '<iframe srcdoc="<script>parent.hostile(N)</script>"></iframe>',
  "<iframe src=javascript:parent.hostile(N)></iframe>",
  "<a href=javascript:hostile(N) autofocus onfocus=hostile(N)>press</a>",
  "<details open ontoggle=hostile(N)>",
  "<input autofocus onfocus=hostile(N)>",
  "<video><source onerror=hostile(N)></video>",
  "<math><mtext><table><mglyph><style><img src=x onerror=hostile(N)>",
  "<object data=javascript:hostile(N)></object>",
  "<embed src=javascript:hostile(N)>",
  '<meta http-equiv=refresh content="0;url=javascript:hostile(N)">',
  "<base href=//elsewhere.test/N/>",
  "<link rel=stylesheet href=//elsewhere.test/N.css>",
  "<style>@import '//elsewhere.test/N.css';</style>",
  "<form action=javascript:hostile(N)><button autofocus onfocus=hostile(N)>",
  '<noscript><p title="</noscript><img src=x onerror=hostile(N)>">',
  "<!--><img src=x onerror=hostile(N)>-->",
  "<img src='//elsewhere.test/N.png'>",
  "${hostile(N)}",
  "{{constructor.constructor('hostile(N)')()}}",
  "javascript:hostile(N)",
  '" autofocus onfocus=hostile(N) x="',
  "' autofocus onfocus='hostile(N)' x='",
  "\\u003cscript\\u003ehostile(N)\\u003c/script\\u003e",
  "&lt;script&gt;hostile(N)&lt;/script&gt; &#60;img src=x onerror=hostile(N)&#62;",
  '"])</script><script>hostile(N)</script>',
  "$L1 $@0 $undefined {link} <b>hostile(N)</b> '{x, plural, other {#}}'",
] as const;
/** Ways out of the place a text may stand in: an attribute, a title, a field, a script, a style, a comment. */
const WAYS_OUT = [
  "",
  '">',
  "'>",
  "</title>",
  "</textarea>",
  "</script>",
  "</style>",
  "-->",
  "]]>",
  '\\">',
] as const;

export const HOSTILE: readonly string[] = WAYS_OUT.flatMap((out, wayAt) =>
  VECTORS.map((vector, at) => {
    const number = String(wayAt * VECTORS.length + at);
    return `${out}${vector.replaceAll("N", number)}<x-h>h${number}h`;
  }),
);

/** The numbers of the hostile texts that can be read in a text. */
export const hostileIn = (text: string): number[] =>
  [...text.matchAll(/h(\d+)h/g)].map(([, number]) => Number(number));

/** Columns and members of JSON people write words into, by their names; codes, keys and digits have others. */
const WRITTEN =
  /^(name|legal_name|address|.*_?name|note|reason|question|parked_question|body|letter|title|instructions|serial|serial_typed|serial_seen|frame_serial|model|raw_text|instrument|place|carrier|tracking_number|.*_written|send_to|device|reference|return_waived_reason|exemption_reason|part_number|account_number|invoice_number|rule_number|code)$/;
const WRITTEN_MEMBER =
  /(name|note|reason|question|letter|installer|earlierWork|serial|frameSerial|vehicleModel|raw|text|instrument|address|title|written|remark|words|label|instructions)$/i;
const NO_WORDS = new Set(["batches.code", "installers.code"]);
/** Members whose reasons are codes of ours. */
const CODED_MEMBERS = new Set(["notGiven"]);

type Column = { table: string; column: string; type: "text" | "jsonb" };

const COLUMNS = `select c.table_name as "table", c.column_name as "column", c.data_type as "type"
  from information_schema.columns c join information_schema.tables t using (table_schema, table_name)
  where c.table_schema = 'public' and t.table_type = 'BASE TABLE' and c.is_generated = 'NEVER'
    and c.data_type in ('text', 'jsonb') and c.table_name not in ('worker_heartbeats', 'outbox', 'login_attempts')`;

/** Those short enough for a field of 60 characters: JSON is read by its shape, which says how long a text may be. */
const SHORT = HOSTILE.filter(({ length }) => length <= 60);

let next = 0;
const another = (): string => SHORT[(next += 1) % SHORT.length] ?? "";

/** The same JSON with hostile words wherever words stood. */
function withHostileWords(value: unknown, name = ""): unknown {
  if (typeof value === "string") return WRITTEN_MEMBER.test(name) && value !== "" ? another() : value;
  if (CODED_MEMBERS.has(name)) return value;
  if (Array.isArray(value)) return value.map((one) => withHostileWords(one, name));
  if (typeof value !== "object" || value === null) return value;
  const isAnswers = name === "cannotGet";
  return Object.fromEntries(
    Object.entries(value).map(([key, one]) => [key, withHostileWords(one, isAnswers ? "text" : key)]),
  );
}

/** A column whose own rule lets no such text in needs no page to stand it. */
const takenByNoCheck = (fault: unknown): null => {
  if (fault instanceof pg.DatabaseError && fault.code === "23514") return null;
  throw fault;
};

const freeSql = (table: string) => `alter table "${table}" disable trigger user`;
const textSql = ({ table, column }: Column) =>
  `update "${table}" t set "${column}" = ($1::text[])[1 + (r.n + $2) % 300] || ' ' || r.n
   from (select ctid, row_number() over () as n from "${table}") r where t.ctid = r.ctid and t."${column}" <> ''`;
const jsonSql = ({ table, column }: Column) =>
  `select ctid::text as at, "${column}" as value from "${table}" where "${column}" is not null limit 5000`;
const newJsonSql = ({ table, column }: Column) =>
  `update "${table}" t set "${column}" = v.value from unnest($1::tid[], $2::jsonb[]) v (at, value) where t.ctid = v.at`;

async function rewriteText(client: pg.Client, column: Column): Promise<number> {
  const { rowCount } = await client.query(textSql(column), [HOSTILE, (next += 7)]);
  return rowCount ?? 0;
}

async function rewriteJson(client: pg.Client, column: Column): Promise<number> {
  const { rows } = await client.query<{ at: string; value: unknown }>(jsonSql(column));
  const rewritten = rows.map(({ value }) => JSON.stringify(withHostileWords(value)));
  await client.query(newJsonSql(column), [rows.map(({ at }) => at), rewritten]);
  return rows.length;
}

/** What is said on every claim that was sent: all the hostile texts, in messages of 40. */
const SAY = `insert into claim_messages (claim_id, seller_id, workshop_id, author_id, author_name, author_organisation_id, audience, body)
  select c.id, c.seller_id, c.workshop_id, u.id, u.name, c.workshop_id, 'both', $1
  from claims c cross join lateral (select id, name from users u where exists (select 1 from memberships m
    where m.user_id = u.id and m.organisation_id = c.workshop_id) limit 1) u where c.state <> 'draft'`;

/**
 * Puts hostile words wherever the demo has words, past every check of ours: what a page shows must be text whatever is
 * stored. Gives the columns, with how many rows were changed.
 */
export async function makeEverythingHostile(): Promise<Map<string, number>> {
  const client = new pg.Client({ connectionString: process.env["DATABASE_URL_ADMIN"] });
  await client.connect();
  const changed = new Map<string, number>();
  try {
    const { rows } = await client.query<Column>(COLUMNS);
    // What is written once is rewritten here: this database is thrown away with the test.
    for (const table of new Set(rows.map((column) => column.table))) await client.query(freeSql(table));
    for (const column of rows) {
      const name = `${column.table}.${column.column}`;
      if (NO_WORDS.has(name) || (column.type === "text" && !WRITTEN.test(column.column))) continue;
      const rewrite = column.type === "text" ? rewriteText : rewriteJson;
      const count = await rewrite(client, column).catch(takenByNoCheck);
      if (count !== null) changed.set(name, count);
    }
    for (let at = 0; at < HOSTILE.length; at += 40)
      await client.query(SAY, [HOSTILE.slice(at, at + 40).join("\n")]);
  } finally {
    await client.end();
  }
  return changed;
}

/** Lets the worker write every kind of mail in both languages, with all hostile texts in each place for words. */
export async function sendHostileMails(recipient: string): Promise<number> {
  const words = HOSTILE.join("\n");
  const link = `${process.env["PUBLIC_URL"]}/claims/4107-3826`;
  const params = {
    ...{
      link,
      number: "4107-3826",
      distributor: words,
      workshop: words,
      organisation: words,
      inviter: words,
    },
    ...{ name: words, part: words, question: words, letter: words, family: "brake", rowIds: ["label"] },
    ...{ outcome: "declined", days: 7, minutes: 30, revision: 2 },
    ...{ answerBy: "2026-06-01", contestUntil: "2026-06-01" },
  };
  const kinds = ["passwordReset", "invitation", "queryAsked", "queryReminder", "claimLapsed"];
  const client = new pg.Client({ connectionString: process.env["DATABASE_URL_ADMIN"] });
  await client.connect();
  try {
    const { rowCount } = await client.query(
      `insert into outbox (kind, dedupe_key, recipient, locale, params)
       select k, 'hostile:' || k || l, $1, l, $2 from unnest($3::text[]) k, unnest(array['en', 'de']) l`,
      [recipient, JSON.stringify(params), [...kinds, "queryAnswered", "claimDecided"]],
    );
    return rowCount ?? 0;
  } finally {
    await client.end();
  }
}
