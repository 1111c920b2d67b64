import { getTranslations } from "next-intl/server";
import type { Actor } from "@/lib/access/actor";
import { printClaimNumber } from "@/lib/claims/number";
import { formatDay } from "@/lib/kernel/format";
import { findForLabel } from "@/lib/returns/label-queries";
import { makeReturnLabel, type LabelText } from "@/lib/returns/label-service";
import { labelCode, normaliseReturnNumber } from "@/lib/returns/number";
import { labelQuery } from "@/lib/returns/schema";
import type { ReturnView } from "@/lib/returns/view";
import { route } from "@/lib/web/route";

const LONGEST_NOTE = 300;

async function textOf(returned: ReturnView, { locale }: Actor): Promise<LabelText> {
  const t = await getTranslations({ locale, namespace: "returns.label.paper" });
  const { workshopName, siteName, instructions } = returned;
  return {
    title: t("title"),
    number: returned.printed,
    code: labelCode(returned.number, returned.claimNumber),
    claim: t("claim", { number: printClaimNumber(returned.claimNumber) }),
    toHead: t("to"),
    to: returned.sendTo,
    by: t("by", { day: formatDay(returned.dueOn, locale) }),
    fromHead: t("from"),
    from: siteName === null ? workshopName : `${workshopName}, ${siteName}`,
    note: instructions === "" ? t("noNote") : instructions.slice(0, LONGEST_NOTE),
  };
}

/** The label for the parcel as a PDF, for a sheet or a roll. */
export const GET = route<{ number: string }>(
  { name: "GET /returns/{number}/label" },
  async ({ session: { actor }, params, request }) => {
    const { size, cells } = labelQuery.parse(Object.fromEntries(new URL(request.url).searchParams));
    const number = normaliseReturnNumber(params.number) ?? "";
    const found = await findForLabel(actor, { number, cells });
    if (!found.ok) return found;
    const madeAt = new Date(found.value.calledInAt);
    const label = await makeReturnLabel(await textOf(found.value, actor), {
      size,
      locale: actor.locale,
      madeAt,
    });
    return new Response(Uint8Array.from(label), {
      headers: {
        "content-type": "application/pdf",
        "content-disposition": `inline; filename="${found.value.printed}.pdf"`,
      },
    });
  },
);
