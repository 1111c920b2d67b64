import { useTranslations } from "next-intl";
import { Button } from "@/components/ui/button";
import { TextLink } from "@/components/ui/link-button";
import { TextField } from "@/components/ui/text-field";

/** The first question. A plain form with the serial in its address: it works without script and can be bookmarked. */
export function SerialSearch({ serial }: { serial: string }) {
  const t = useTranslations("start");
  return (
    <form action="/claims/new" className="grid gap-4">
      <TextField
        name="serial"
        label={t("serial")}
        hint={t("serialHint")}
        isSerial
        autoFocus
        defaultValue={serial}
        maxLength={80}
      />
      <Button type="submit" kind="primary" wide>
        {t("lookUp")}
      </Button>
      <p>
        <TextLink href="/claims/new?way=hand">{t("noSerial")}</TextLink>
      </p>
    </form>
  );
}
