import { useTranslations } from "next-intl";
import { ActionButton } from "@/components/record-form/action-button";
import type { SheetView } from "@/lib/claims/sheet/view";
import type { FormAction } from "@/lib/kernel/action-result";
import { ReasonDrawer } from "./reason-drawer";

export type AfterVerdict = { contest: FormAction; accept: FormAction; reopen: FormAction };

/** What can be done with a verdict: object while its days last, accept it and give them up, open a settled claim again. */
export function VerdictActions({ sheet, actions }: { sheet: SheetView; actions: AfterVerdict }) {
  const t = useTranslations("sheet.actions");
  const { number, moves } = sheet;
  return (
    <>
      {moves.includes("contest") ? (
        <ReasonDrawer
          action={actions.contest}
          number={number}
          trigger={t("contest")}
          kind="secondary"
          label={t("contestReason")}
          field="reason"
          submit={t("contest")}
        />
      ) : null}
      {sheet.canAccept ? (
        <ActionButton action={actions.accept} fields={{ number }} label={t("accept")} kind="secondary" />
      ) : null}
      {moves.includes("reopen") ? (
        <ReasonDrawer
          action={actions.reopen}
          number={number}
          trigger={t("reopen")}
          label={t("reopenReason")}
          field="reason"
          submit={t("reopen")}
        />
      ) : null}
    </>
  );
}
