import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import type { PartFamily } from "@/lib/parts/family";

/** The usual cautions where the work is. They defer to the maker's manual, local law and licensed practice. */
export function Cautions({ family }: { family: PartFamily }) {
  const t = useTranslations("families");
  const title = useTranslations("draft");
  return (
    <Banner kind="caution" title={title("cautions")}>
      <ul className="list-disc pl-5">
        {family.cautions.map((caution) => (
          <li key={caution}>{t(`cautions.${caution}`)}</li>
        ))}
      </ul>
    </Banner>
  );
}
