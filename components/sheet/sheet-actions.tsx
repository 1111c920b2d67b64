import { useTranslations } from "next-intl";
import { LinkButton } from "@/components/ui/link-button";
import { ActionButton } from "@/components/record-form/action-button";
import type { SheetView } from "@/lib/claims/sheet/view";
import type { FormAction } from "@/lib/kernel/action-result";
import { ReasonDrawer } from "./reason-drawer";
import { VerdictActions, type AfterVerdict } from "./verdict-actions";

type Actions = {
  take: FormAction;
  takeOver: FormAction;
  putBack: FormAction;
  park: FormAction;
  withdraw: FormAction;
} & AfterVerdict;
type SheetActionsProps = {
  sheet: SheetView;
  base: `/claims/${string}`;
  colleagues: readonly { id: string; name: string }[];
  actions: Actions;
};

/** What this person can do with the claim now. The same table that guards the service draws these. */
export function SheetActions({ sheet, base, colleagues, actions }: SheetActionsProps) {
  const t = useTranslations("sheet.actions");
  const can = (move: SheetView["moves"][number]) => sheet.moves.includes(move);
  const { number } = sheet;
  if (sheet.moves.length === 0 && !sheet.canTakeOver) return null;
  return (
    <div className="flex flex-wrap items-start gap-2 print:hidden">
      {can("take") ? <ActionButton action={actions.take} fields={{ number }} label={t("take")} /> : null}
      {can("decide") ? (
        <LinkButton href={`${base}/decide`} kind="primary">
          {t("decide")}
        </LinkButton>
      ) : null}
      {can("ask") ? (
        <LinkButton href={`${base}/ask`} kind="secondary">
          {t("ask")}
        </LinkButton>
      ) : null}
      {can("answer") ? (
        <LinkButton href={`${base}/evidence`} kind="primary">
          {t("answer")}
        </LinkButton>
      ) : null}
      {can("decide") && colleagues.length > 0 ? (
        <ReasonDrawer
          action={actions.park}
          number={number}
          trigger={t("park")}
          label={t("parkQuestion")}
          field="question"
          choices={{
            name: "colleagueId",
            label: t("parkWith"),
            options: colleagues.map(({ id, name }) => ({ value: id, label: name })),
          }}
          submit={t("park")}
        />
      ) : null}
      {can("putBack") ? (
        <ReasonDrawer
          action={actions.putBack}
          number={number}
          trigger={t("putBack")}
          label={t("putBackReason")}
          field="reason"
          submit={t("putBack")}
        />
      ) : null}
      {can("withdraw") ? (
        <ReasonDrawer
          action={actions.withdraw}
          number={number}
          trigger={t("withdraw")}
          label={t("withdrawReason")}
          field="reason"
          submit={t("withdraw")}
        />
      ) : null}
      <VerdictActions sheet={sheet} actions={actions} />
      {sheet.canTakeOver ? (
        <span className="flex flex-wrap items-center gap-3">
          <span className="text-ink-2">{t("heldBy", { name: sheet.holderName ?? "" })}</span>
          <ActionButton
            action={actions.takeOver}
            fields={{ number }}
            label={t("takeOver")}
            kind="secondary"
          />
        </span>
      ) : null}
    </div>
  );
}
