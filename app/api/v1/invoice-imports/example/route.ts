import { exampleFile } from "@/lib/imports/example";
import { route } from "@/lib/web/route";

const NAME = "invoice-lines.csv";

// With the byte order mark, spreadsheets read the file as the UTF-8 it is.
const BYTE_ORDER_MARK = "\ufeff";

/** The example file, in the headings and with the decimal mark of the person's language. */
export const GET = route({ name: "GET /invoice-imports/example" }, async ({ session }) =>
  Promise.resolve(
    new Response(BYTE_ORDER_MARK + exampleFile(session.actor.locale), {
      headers: {
        "content-type": "text/csv; charset=utf-8",
        "content-disposition": `attachment; filename="${NAME}"`,
      },
    }),
  ),
);

export const dynamic = "force-dynamic";
