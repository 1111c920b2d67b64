import { getTranslations } from "next-intl/server";
import { refuse } from "@/lib/kernel/outcome";
import { readLifeCurves } from "@/lib/reports";
import { csvOf } from "@/lib/reports/life-curves/csv";
import { lifeCurvesQuery } from "@/lib/reports/life-curves/schema";
import { route } from "@/lib/web/route";
import { may } from "@/lib/web/session";

// With the byte order mark, spreadsheets read the file as the UTF-8 it is.
const BYTE_ORDER_MARK = "\ufeff";

/** The batches of a view as a file: one row a batch, units in the heads, the switches in every row. */
export const GET = route({ name: "GET /life-curves" }, async ({ session, request }) => {
  if (!may(session, "seeLifeCurves")) return refuse("notFound");
  const search = new URL(request.url).searchParams;
  const query = lifeCurvesQuery.parse({ ...Object.fromEntries(search), batch: search.getAll("batch") });
  const found = await readLifeCurves(session.actor, query);
  if (!found) return refuse("notFound");
  const t = await getTranslations({ locale: session.actor.locale, namespace: "lifeCurves.csv" });
  return new Response(BYTE_ORDER_MARK + csvOf(found.view, t), {
    headers: {
      "content-type": "text/csv; charset=utf-8; header=present",
      "content-disposition": `attachment; filename="life-curves-${found.view.query.cut}.csv"`,
    },
  });
});

export const dynamic = "force-dynamic";
