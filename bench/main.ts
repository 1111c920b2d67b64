import { availableParallelism, cpus } from "node:os";
import type pg from "pg";
import { sequelize } from "@/lib/db/sequelize";
import { coverageLines, passwordLines } from "./computations";
import { adminOf, copyClaims, copyUnits, rememberOriginals } from "./copies";
import { listLines, listsOf, measureLists } from "./lists";
import { seededActor } from "./people";
import { runLogLines } from "./run-logs";
import { measureSerials, serialLines, serialsOf } from "./serials";
import { measureSheets, sheetLines, sheetsOf } from "./sheets";
import { tableOf, type Line } from "./table";
import { uploadLines } from "./uploads";

/** At this size most counts of the views have reached their limit, as in any house at work. */
const CLAIMS = 2000;
const UNITS = 300_000;

const say = (text: string) => process.stdout.write(`${text}\n`);

/** Does one part and says how long it took. */
async function part<T>(name: string, work: () => Promise<T>): Promise<T> {
  const startedMs = performance.now();
  const result = await work();
  say(`${name} (${((performance.now() - startedMs) / 1000).toFixed(1)} s)`);
  return result;
}

async function databaseLines(admin: pg.Client): Promise<Line[]> {
  const originals = await rememberOriginals(admin);
  const [distributor, workshop] = [await seededActor(admin, "ada"), await seededActor(admin, "maren")];
  const serials = await serialsOf(admin, workshop);
  const sheets = await sheetsOf(admin, distributor, workshop);
  const { rows } = await admin.query<{ number: string }>(
    "select number from claims where seller_id = $1 and state = 'decided' order by number limit 1",
    [distributor.organisationId],
  );
  const lists = listsOf(distributor, workshop, rows[0]?.number ?? "");

  const fewUnits = await part("Serials among few", () => measureSerials(workshop, serials));
  await part(`Units copied up to ${UNITS}`, () => copyUnits(admin, UNITS, originals.units));
  const manyUnits = await part("Serials among many", () => measureSerials(workshop, serials));

  const fold = Math.ceil(CLAIMS / originals.claims);
  await part(`Claims copied up to N = ${fold * originals.claims}`, () => copyClaims(admin, 1, fold - 1));
  const small = await part("Lists at N", () => measureLists(lists, 13));
  const smallSheets = await part("Sheets at N", () => measureSheets(sheets));
  await part("Claims copied up to 10N", () => copyClaims(admin, fold, 10 * fold - 1));
  const medium = await part("Lists at 10N", () => measureLists(lists, 11));
  await part("Claims copied up to 50N", () => copyClaims(admin, 10 * fold, 50 * fold - 1));
  const large = await part("Lists at 50N", () => measureLists(lists, 11));
  const largeSheets = await part("Sheets at 50N", () => measureSheets(sheets));
  return [
    ...listLines([small, medium, large]),
    ...serialLines(fewUnits, manyUnits, { few: originals.units, many: UNITS }),
    ...(await sheetLines(sheets, smallSheets, largeSheets)),
  ];
}

async function measureAll(): Promise<void> {
  const admin = await adminOf(process.env["DATABASE_URL_ADMIN"] ?? "");
  try {
    const lines = [
      ...(await databaseLines(admin)),
      ...(await part("Run logs", runLogLines)),
      ...(await part("Uploads", uploadLines)),
      ...(await part("Passwords", passwordLines)),
      ...(await part("Coverage", coverageLines)),
    ];
    const { rows } = await admin.query<{ server_version: string }>("show server_version");
    const [cpu] = cpus();
    say(`\n${tableOf(lines)}\n`);
    say(
      `Measured on ${availableParallelism()} cores (${cpu?.model.trim() ?? "unknown"}), Node ${process.versions.node}, PostgreSQL ${rows[0]?.server_version ?? "unknown"}.`,
    );
  } finally {
    await admin.end();
    await sequelize.close();
  }
}

await measureAll();
