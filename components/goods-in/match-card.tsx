import { useTranslations } from "next-intl";
import { ActionButton } from "@/components/record-form/action-button";
import { Card } from "@/components/ui/card";
import { Serial } from "@/components/ui/serial";
import type { FormAction } from "@/lib/kernel/action-result";
import type { MatchView } from "@/lib/returns/view";

type MatchCardProps = { match: MatchView; parcelId: string; isInCharge: boolean; action: FormAction };

/** A return that may be in the parcel, and why. */
export function MatchCard({ match, parcelId, isInCharge, action }: MatchCardProps) {
  const t = useTranslations("goodsIn.match");
  const reasons = match.reasons.map((reason) => t(`reasons.${reason}`)).join(", ");
  return (
    <Card isInCharge={isInCharge} title={match.workshopName} note={match.printed}>
      <p className="mb-2 font-semibold">{t("because", { reasons })}</p>
      <ul className="mb-4 grid gap-1">
        {match.parts.map((part, place) => (
          <li key={place}>
            {part.name} <span className="text-small text-ink-2">{part.number}</span>{" "}
            {part.serial ? <Serial value={part.serial} /> : null}
          </li>
        ))}
      </ul>
      <ActionButton
        action={action}
        fields={{ parcelId, number: match.number }}
        label={t("submit", { printed: match.printed })}
        isWideOnPhone
        kind={isInCharge ? "primary" : "secondary"}
      />
    </Card>
  );
}
