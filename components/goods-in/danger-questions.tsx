import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { buttonStyle } from "@/components/ui/button-style";
import { Card } from "@/components/ui/card";
import { CheckboxGroup } from "@/components/ui/choice-group";
import { SubmitRow } from "@/components/ui/submit-button";
import { DANGER_SIGNS } from "@/lib/returns/kinds";

type DangerQuestionsProps = { path: string; parcelId: string | undefined };

/** Asked before anything else of a battery. A plain form with the answer in its address: it works without script. */
export function DangerQuestions({ path, parcelId }: DangerQuestionsProps) {
  const t = useTranslations("goodsIn.danger");
  const signs = useTranslations("goodsIn.signs");
  const parcel = parcelId === undefined ? "" : `&parcel=${parcelId}`;
  return (
    <Card isInCharge title={t("title")}>
      <form action={path} className="grid gap-4">
        <input type="hidden" name="looked" value="yes" />
        {parcelId === undefined ? null : <input type="hidden" name="parcel" value={parcelId} />}
        <CheckboxGroup
          name="signs"
          label={t("ask")}
          choices={DANGER_SIGNS.map((value) => ({ value, label: signs(value) }))}
        />
        <SubmitRow>
          <Button type="submit" kind="primary">
            {t("some")}
          </Button>
          <a href={`${path}?looked=yes${parcel}`} className={buttonStyle({ kind: "secondary" })}>
            {t("none")}
          </a>
        </SubmitRow>
      </form>
    </Card>
  );
}

/** Said as soon as a sign was seen: what not to do with it, and where it goes. */
export function DangerCaution() {
  const t = useTranslations("goodsIn.danger");
  return (
    <Banner kind="caution" title={t("cautionTitle")} isLive>
      {t("caution")}
    </Banner>
  );
}
