import "server-only";
import type { Actor } from "@/lib/access/actor";
import { hasRight } from "@/lib/access/rights";
import { rows, unitOfWork, type Work } from "@/lib/db/unit-of-work";
import { dayInZone } from "@/lib/kernel/calendar-day";
import { LIMITS, mostBytes } from "@/lib/kernel/limits";
import { readAll } from "@/lib/storage/objects";
import { checked, readLines, type Check } from "./check";
import { presentImport, presentPreview } from "./present";
import { readCsv, type CsvFile } from "./read-csv";
import { findCatalogue, findRecorded } from "./recorded-queries";
import { importInput } from "./schema";
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
  const [own] = await rows<{ sells: boolean }>(work, "select sells from organisations where id = $1", [
    work.actor.organisationId,
  ]);
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
  const read = readCsv(await readAll(objectKey, mostBytes("runLog")), LIMITS.importLines);
  if (!read.ok) throw new Error(`the stored file ${objectKey} cannot be read: ${read.code}`);
  return read.value;
}

/** Every line of a file against the accounts, parts, invoice lines and units of this organisation, as of now. */
export async function checkFile(work: Work, file: CsvFile): Promise<Check> {
  const today = dayInZone(new Date(), work.actor.timeZone);
  const catalogue = await findCatalogue(work, file);
  const read = readLines(file, { catalogue, today });
  return checked(read, await findRecorded(work, read));
}

export type ImportSheet = { readonly sent: ImportView; readonly preview: PreviewView | null };

/** A file with its preview, as of now; one that is imported has none. */
export async function findImportSheet(actor: Actor, importId: string): Promise<ImportSheet | null> {
  const found = await findImport(actor, importId);
  if (!found) return null;
  const sent = presentImport(found);
  if (sent.isImported) return { sent, preview: null };
  const file = await storedFile(found);
  const check = await unitOfWork(actor, (work) => checkFile(work, file));
  return { sent, preview: presentPreview(check, importId, actor.locale) };
}
