import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { RadioGroup } from "@/components/ui/choice-group";
import { SubmitButton } from "@/components/ui/submit-button";
import { PREFERRED_DENSITIES, PREFERRED_LANGUAGES, PREFERRED_THEMES } from "@/lib/people/schema";

type PreferencesCardProps = {
  language: string;
  theme: string;
  density: string | null;
  save: (form: FormData) => Promise<void>;
};

/** How a person likes to see the product, on every device they sign in on. */
export async function PreferencesCard({ language, theme, density, save }: PreferencesCardProps) {
  const t = await getTranslations("account.preferences");
  return (
    <Card id="preferences" title={t("title")} note={t("note")}>
      <form action={save} className="grid gap-6">
        <RadioGroup
          name="locale"
          label={t("language.label")}
          chosen={language === "de" ? "de" : "en"}
          choices={PREFERRED_LANGUAGES.map((value) => ({
            value,
            label: <span lang={value}>{t(`language.${value}`)}</span>,
          }))}
        />
        <RadioGroup
          name="theme"
          label={t("theme.label")}
          chosen={theme}
          choices={PREFERRED_THEMES.map((value) => ({ value, label: t(`theme.${value}`) }))}
        />
        <RadioGroup
          name="density"
          label={t("density.label")}
          chosen={density ?? "byDevice"}
          choices={PREFERRED_DENSITIES.map((value) => ({
            value,
            label: t(`density.${value}.label`),
            hint: t(`density.${value}.hint`),
          }))}
        />
        <div>
          <SubmitButton>{t("save")}</SubmitButton>
        </div>
      </form>
    </Card>
  );
}
