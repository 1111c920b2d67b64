import { getTranslations } from "next-intl/server";
import { ReturnCard } from "@/components/returns/return-card";
import type { CellsAnswer } from "@/components/returns/label-links";
import { LinkButton } from "@/components/ui/link-button";
import type { SheetView } from "@/lib/claims/sheet/view";
import { claimDigits } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { findCallIn } from "@/lib/returns/call-in-queries";
import { listReturnsOfClaim } from "@/lib/returns/card-queries";
import { SETTLING_MOVES } from "@/lib/returns/lifecycle";
import type { ReturnView } from "@/lib/returns/view";
import { may, type Session } from "@/lib/web/session";
import { dispatchAction, settleAction } from "./return-actions";

type CalledInProps = { session: Session; sheet: SheetView; cells: CellsAnswer };

const hasMoves = ({ lines }: ReturnView): boolean =>
  lines.some(({ moves }) =>
    moves.some((move) => move === "dispatch" || SETTLING_MOVES.some((one) => one === move)),
  );

/** The parts of a claim that were called in; and for who judges it, the way to call one in. */
export async function CalledIn({ session, sheet, cells }: CalledInProps) {
  const { actor } = session;
  const number = claimDigits(sheet.number);
  const isJudging = sheet.moves.includes("decide");
  const [t, returns, callIn] = await Promise.all([
    getTranslations("returns.card"),
    listReturnsOfClaim(actor, number),
    isJudging ? findCallIn(actor, number) : null,
  ]);
  const path = claimPath({ number });
  const withForms = returns.find(hasMoves);
  return (
    <>
      {returns.map((returned) => (
        <ReturnCard
          key={returned.number}
          returned={returned}
          claimPath={path}
          cells={cells}
          isOfGoodsIn={may(session, "receiveParts")}
          hasForms={returned === withForms}
          actions={{ dispatch: dispatchAction, settle: settleAction }}
          limits={sheet.limits}
          locale={actor.locale}
          timeZone={actor.timeZone}
        />
      ))}
      {callIn ? (
        <p className="flex flex-wrap items-center gap-x-4 gap-y-2 print:hidden">
          <LinkButton href={`${path}/call-in`} kind="secondary">
            {t("callIn")}
          </LinkButton>
          <span className="text-ink-2">{t("callInNote")}</span>
        </p>
      ) : null}
    </>
  );
}
