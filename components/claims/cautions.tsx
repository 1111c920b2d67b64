import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Glyph } from "@/components/ui/glyph";
import type { PartFamily } from "@/lib/parts/family";

/**
 * The usual cautions where the work is. They defer to the maker's manual, local law and licensed practice. On a page
 * after the one that showed them in full they fold away, and open with a press.
 */
export function Cautions({ family, isFolded = false }: { family: PartFamily; isFolded?: boolean }) {
  const t = useTranslations("families");
  const title = useTranslations("draft");
  const list = (
    <ul className="list-disc pl-5">
      {family.cautions.map((caution) => (
        <li key={caution}>{t(`cautions.${caution}`)}</li>
      ))}
    </ul>
  );
  return (
    <Banner kind="caution" title={title("cautions")}>
      {isFolded ? (
        <details className="group">
          <summary className="flex min-h-target w-fit list-none items-center gap-1.5 font-semibold underline underline-offset-4 [&::-webkit-details-marker]:hidden">
            <Glyph name="down" className="-rotate-90 group-open:rotate-0" />
            {title("cautionsShow", { count: family.cautions.length })}
          </summary>
          {list}
        </details>
      ) : (
        list
      )}
    </Banner>
  );
}
