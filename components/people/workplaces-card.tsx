import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { SubmitButton } from "@/components/ui/submit-button";
import type { Workplace } from "@/lib/people/account/view";

type WorkplacesCardProps = {
  places: readonly Workplace[];
  /** The organisation of this very request. */
  currentId: string;
  change: (form: FormData) => Promise<void>;
};

/** The organisations a person works for, and the way from one to another. */
export async function WorkplacesCard({ places, currentId, change }: WorkplacesCardProps) {
  const t = await getTranslations("account.workplaces");
  return (
    <Card id="workplaces" title={t("title")} note={t("count", { count: places.length })}>
      <ul>
        {places.map(({ id, name }) => (
          <li
            key={id}
            aria-current={id === currentId || undefined}
            className="flex min-h-11 flex-wrap items-center justify-between gap-x-6 gap-y-2 border-b border-rule py-2 last:border-b-0"
          >
            <span className="min-w-0 wrap-break-word">{name}</span>
            {id === currentId ? (
              <span className="text-small text-ink-2">{t("thisOne")}</span>
            ) : (
              <form action={change}>
                <input type="hidden" name="organisation" value={id} />
                <SubmitButton kind="secondary" small aria-label={t("switchNamed", { name })}>
                  {t("switch")}
                </SubmitButton>
              </form>
            )}
          </li>
        ))}
      </ul>
      {places.length > 1 ? <p className="mt-4 text-small text-ink-2">{t("hint")}</p> : null}
    </Card>
  );
}
