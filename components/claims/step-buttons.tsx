import { useTranslations } from "next-intl";
import { SubmitButton } from "@/components/ui/submit-button";

/** On to the next page; the page is saved either way. */
export function StepButtons() {
  const t = useTranslations("draft");
  return (
    <div className="grid gap-2 sm:flex">
      <SubmitButton wide>{t("goOn")}</SubmitButton>
      <SubmitButton kind="secondary" wide name="go" value="check">
        {t("toCheck")}
      </SubmitButton>
    </div>
  );
}
