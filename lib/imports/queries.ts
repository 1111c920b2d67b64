import "server-only";
import type { Actor } from "@/lib/access/actor";
import { todayOf } from "@/lib/access/today-queries";
import { hasRight } from "@/lib/access/rights";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { LIMITS, mostBytes } from "@/lib/kernel/limits";
import { readAll } from "@/lib/storage/objects";
import { Organisation } from "@/models/organisation";
import { checked, readLines, type Check } from "./check";
import { presentImport, presentPreview } from "./present";
import type { CsvFile } from "./csv-file";
import { readCsv } from "./csv-service";
import { findCatalogue, findRecorded } from "./recorded-queries";
import { importInput } from "./schema";
import { inSlices } from "./slices-service";
import { inTurn } from "./turns-service";
import type { ImportView, PreviewView } from "./view";

/** A file that was sent, with how it was read and what came of it. */
export type ImportRow = {
  id: string;
  fileName: string;
  objectKey: string;
  mapping: unknown;
  state: "previewed" | "imported";
  lineCount: number;
  byName: string | null;
  createdAt: Date;
  importedAt: Date | null;
};

const IMPORT = `
  select i.id, i.file_name as "fileName", i.object_key as "objectKey", i.mapping, i.state, i.line_count as "lineCount",
    u.name as "byName", i.created_at as "createdAt", i.imported_at as "importedAt"
  from invoice_imports i left join users u on u.id = i.created_by_id
  where i.seller_id = $1`;

const MOST_LISTED = 50;

/** Whether this person may import: the right, in an organisation that sells. */
export async function mayImport(work: Work): Promise<boolean> {
  if (!hasRight(work.actor.roles, "importInvoiceLines", { sells: true, buys: false })) return false;
  const { transaction, actor } = work;
  const own = await Organisation.findByPk(actor.organisationId, { attributes: ["sells"], transaction });
  return own?.sells === true;
}

/** The files sent most recently. */
export const listImports = (actor: Actor): Promise<ImportView[]> =>
  unitOfWork(actor, async (work) => {
    if (!(await mayImport(work))) return [];
    const found = await rows<ImportRow>(work, `${IMPORT} order by i.created_at desc limit ${MOST_LISTED}`, [
      actor.organisationId,
    ]);
    return found.map(presentImport);
  });

/** A file by its id, if it is this organisation's and this person may import. */
export const findImport = (actor: Actor, importId: string): Promise<ImportRow | null> =>
  unitOfWork(actor, async (work) => {
    if (!importInput.safeParse({ importId }).success || !(await mayImport(work))) return null;
    const [found] = await rows<ImportRow>(work, `${IMPORT} and i.id = $2`, [actor.organisationId, importId]);
    return found ?? null;
  });

/** The stored file, read again. Throws where it is gone or cannot be read any more: it could when it was sent. */
export async function storedFile({ objectKey }: Pick<ImportRow, "objectKey">): Promise<CsvFile> {
  const read = await readCsv(await readAll(objectKey, mostBytes("runLog")), LIMITS.importLines);
  if (!read.ok) throw new Error(`the stored file ${objectKey} cannot be read: ${read.code}`);
  return read.value;
}

const AWAKE_EVERY_MS = 2_000;

/** The database ends a transaction in which nothing has happened for ten seconds; reading a large file may take longer. */
function keepingAwake(work: Work): () => Promise<void> {
  let askedAt = performance.now();
  return async () => {
    if (performance.now() - askedAt < AWAKE_EVERY_MS) return;
    await rows(work, "select 1 as awake");
    askedAt = performance.now();
  };
}

/** Every line of a file against the accounts, parts, invoice lines and units of this organisation, as of now. */
export async function checkFile(work: Work, file: CsvFile): Promise<Check> {
  const today = todayOf(work.actor);
  const catalogue = await findCatalogue(work, file);
  const awake = keepingAwake(work);
  const read = await inSlices(readLines(file, { catalogue, today }), awake);
  return inSlices(checked(read, await findRecorded(work, read)), awake);
}

const waiting = new Map<string, Promise<Check>>();

/** The check of a stored file. Whoever asks again while the same question still waits for its turn gets that answer. */
function checkStored(actor: Actor, found: ImportRow): Promise<Check> {
  const question = `${actor.userId} ${found.id}`;
  const asked = waiting.get(question);
  if (asked) return asked;
  let hasBegun = false;
  const answer = inTurn(found, async () => {
    hasBegun = true;
    waiting.delete(question);
    const file = await storedFile(found);
    return unitOfWork(actor, (work) => checkFile(work, file));
  });
  if (!hasBegun) waiting.set(question, answer);
  return answer;
}

export type ImportSheet = { readonly sent: ImportView; readonly preview: PreviewView | null };

/** A file with its preview, as of now; one that is imported has none. */
export async function findImportSheet(actor: Actor, importId: string): Promise<ImportSheet | null> {
  const found = await findImport(actor, importId);
  if (!found) return null;
  const sent = presentImport(found);
  if (sent.isImported) return { sent, preview: null };
  const check = await checkStored(actor, found);
  return { sent, preview: presentPreview(check, importId, actor.locale) };
}
