import "server-only";
import { fn, UniqueConstraintError } from "sequelize";
import type { Actor } from "@/lib/access/actor";
import { rows, undoing, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { LIMITS, mostBytes } from "@/lib/kernel/limits";
import { ok, refuse, type Outcome } from "@/lib/kernel/outcome";
import { importKey } from "@/lib/storage/keys";
import { copyOnce, readAll, remove } from "@/lib/storage/objects";
import { receiveFile, type Received, type ReceiveRefusal } from "@/lib/storage/receive";
import { InvoiceImport } from "@/models/invoice-import";
import type { Check } from "./check";
import { headingsIn } from "./heading";
import { checkFile, findImport, mayImport, storedFile } from "./queries";
import type { CsvFile } from "./csv-file";
import { readCsv } from "./csv-service";
import type { ImportRefusal, ImportResult, StoredMapping } from "./schema";
import { inTurn } from "./turns-service";
import { writeLines } from "./write-service";

export type ImportSent = { readonly importId: string; readonly wasSentBefore: boolean };

/** What receiving says of any file, in the words of this one. */
const OURS: Readonly<Record<ReceiveRefusal, ImportRefusal>> = {
  fileMissing: "fileMissing",
  fileEmpty: "fileEmpty",
  fileTooBig: "importTooBig",
  uploadBroken: "uploadBroken",
  uploadTooMany: "uploadTooMany",
  fileTypeNotAllowed: "importNotCsv",
  fileTypeHeic: "importNotCsv",
  fileNameDisagrees: "importNotCsv",
  fileNotText: "importNotCsv",
};

const isReceiving = (code: ReceiveRefusal | "notAllowed"): code is ReceiveRefusal =>
  Object.hasOwn(OURS, code);

/** The file as rows, or why it cannot be read, its missing columns named as the person would write them. */
async function fileFrom(bytes: Uint8Array, actor: Actor): Promise<Outcome<CsvFile, ImportRefusal>> {
  const read = await readCsv(bytes, LIMITS.importLines);
  if (read.ok || read.code !== "importColumnsMissing") return read;
  return refuse(read.code, { columns: headingsIn(String(read.detail.columns), actor.locale) });
}

const mappingOf = ({ delimiter, encoding, heading }: CsvFile): StoredMapping => ({
  delimiter,
  encoding,
  columns: [...heading.places.keys()],
  unread: [...heading.unread],
});

const keyOf = (actor: Actor, sha256: string): string => `${importKey(sha256)}/${actor.organisationId}`;

/** Notes the file once: the same bytes sent again are the import they were. */
async function noteFile(work: Work, received: Received, file: CsvFile): Promise<ImportSent | null> {
  const { transaction, actor } = work;
  const { sha256 } = received;
  const [made] = await rows<{ id: string }>(
    work,
    `insert into invoice_imports (seller_id, sha256, file_name, object_key, mapping, line_count, created_by_id)
     values ($1, $2, $3, $4, $5, $6, $7) on conflict (seller_id, sha256) do nothing returning id`,
    [
      actor.organisationId,
      sha256,
      received.name,
      keyOf(actor, sha256),
      JSON.stringify(mappingOf(file)),
      file.rows.length,
      actor.userId,
    ],
  );
  if (made) return { importId: made.id, wasSentBefore: false };
  const known = await InvoiceImport.findOne({
    where: { sellerId: actor.organisationId, sha256 },
    transaction,
  });
  return known ? { importId: known.id, wasSentBefore: true } : null;
}

async function keep(actor: Actor, received: Received): Promise<Outcome<ImportSent, ImportRefusal>> {
  const bytes = await readAll(received.quarantine, mostBytes("runLog"));
  const file = await fileFrom(bytes, actor);
  if (!file.ok) return file;
  await copyOnce(received.quarantine, keyOf(actor, received.sha256));
  const sent = await unitOfWork(actor, (work) => noteFile(work, received, file.value));
  return sent ? ok(sent) : refuse("uploadBroken", { name: received.name });
}

/**
 * Receives one invoice file and keeps it for its preview; nothing of it counts yet. The same bytes again give the earlier
 * import. Refuses what cannot be read as a whole, with a sentence that says why.
 */
export async function receiveInvoiceFile(
  actor: Actor,
  request: Request,
): Promise<Outcome<ImportSent, ImportRefusal>> {
  const received = await receiveFile(request, async () => {
    const isAllowed = await unitOfWork(actor, mayImport);
    return isAllowed ? ok("runLog" as const) : refuse("notAllowed");
  });
  if (!received.ok)
    return isReceiving(received.code) ? refuse(OURS[received.code], received.detail) : refuse("notAllowed");
  try {
    return await inTurn(received.value, () => keep(actor, received.value));
  } finally {
    await remove(received.value.quarantine).catch(() => undefined);
  }
}

const resultOf = ({ totals, unchangedCount }: Check): ImportResult => ({
  invoiceLines: totals.invoiceLines,
  units: totals.units,
  batches: totals.batches,
  unchanged: unchangedCount,
  sums: totals.sums.map(({ minor, currency }) => ({ minor: String(minor), currency })),
});

export type ImportLinesRefusal = "notFound" | "importHasProblems" | "importRunning" | "importClashed";
type Imported = { readonly importId: string };

const ONE_AT_A_TIME =
  "select pg_try_advisory_xact_lock(hashtextextended('invoice-import ' || $1, 0)) as mine";

/** The file's row, held until the transaction ends; null where it is nobody's or somebody else's. */
const importForChange = ({ transaction, actor }: Work, id: string): Promise<InvoiceImport | null> =>
  InvoiceImport.findOne({
    where: { id, sellerId: actor.organisationId },
    transaction,
    lock: transaction.LOCK.UPDATE,
  });

async function importFile(
  work: Work,
  importId: string,
  file: CsvFile,
): Promise<Outcome<Imported, ImportLinesRefusal>> {
  // Two files of one distributor at a time could each find the same invoice line missing.
  const [lock] = await rows<{ mine: boolean }>(work, ONE_AT_A_TIME, [work.actor.organisationId]);
  if (!lock?.mine) return refuse("importRunning");
  const kept = await importForChange(work, importId);
  if (!kept) return refuse("notFound");
  if (kept.state === "imported") return ok({ importId });
  const check = await checkFile(work, file);
  if (check.problemLineCount > 0) return refuse("importHasProblems", { count: check.problemLineCount });
  await writeLines(work, check.fresh);
  await kept.update(
    { state: "imported", importedAt: fn("now"), mapping: { ...kept.mapping, result: resultOf(check) } },
    { transaction: work.transaction },
  );
  return ok({ importId });
}

/**
 * Imports a file whole, checked again inside the transaction, or nothing of it. A file that is imported already stays as
 * it is. Refuses `notFound`, `importHasProblems` with how many lines have any, `importRunning` while another file of this
 * organisation is being imported, and `importClashed` where somebody wrote the same line or serial meanwhile.
 */
export async function importLines(
  actor: Actor,
  { importId }: { readonly importId: string },
): Promise<Outcome<Imported, ImportLinesRefusal>> {
  const found = await findImport(actor, importId);
  if (!found) return refuse("notFound");
  if (found.state === "imported") return ok({ importId });
  try {
    return await inTurn(found, async () => {
      const file = await storedFile(found);
      return undoing<Imported, ImportLinesRefusal>(actor, (work) => importFile(work, importId, file));
    });
  } catch (fault) {
    if (fault instanceof UniqueConstraintError) return refuse("importClashed");
    throw fault;
  }
}
