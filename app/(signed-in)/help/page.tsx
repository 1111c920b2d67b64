import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { AskCard, KeysCard, LimitsCard } from "@/components/people/help-cards";
import { MarksCard } from "@/components/people/marks-card";
import { Banner } from "@/components/ui/banner";
import { PageHeader } from "@/components/ui/page-header";
import { listAdministrators } from "@/lib/people/account/queries";
import { requireSession } from "@/lib/web/session";
import { KEYS } from "./keys";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("help");
  return { title: t("title") };
}

const CAUTIONS = ["outOfUse", "hot", "turning", "batteries"] as const;

/** What the marks say, what the keys do, what may be sent, and who knows more. */
export default async function HelpPage() {
  const [{ actor, organisation }, t] = await Promise.all([requireSession(), getTranslations("help")]);
  const people = await listAdministrators(actor);
  const named = (key: string) => (t.has(`keys.names.${key}`) ? t(`keys.names.${key}`) : key);
  const lines = KEYS.map(({ does, keys }) => ({
    words: t(`keys.does.${does}`),
    keys: keys.map((held) => held.map(named)),
  }));
  return (
    <>
      <PageHeader title={t("title")} />
      <Banner kind="caution" title={t("cautions.title")}>
        <ul className="list-disc pl-5">
          {CAUTIONS.map((caution) => (
            <li key={caution}>{t(`cautions.${caution}`)}</li>
          ))}
        </ul>
        <p className="mt-2">{t("cautions.manual")}</p>
      </Banner>
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <MarksCard />
        <div className="grid min-w-0 gap-6">
          <KeysCard lines={lines} />
          <LimitsCard />
          <AskCard people={people} organisation={organisation.name} />
        </div>
      </div>
    </>
  );
}
