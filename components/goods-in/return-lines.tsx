import { useTranslations } from "next-intl";
import { ReturnLine } from "@/components/returns/return-line";
import { Card } from "@/components/ui/card";
import { TextLink } from "@/components/ui/link-button";
import type { Locale } from "@/lib/kernel/locale";
import { benchPath } from "@/lib/returns/paths";
import type { ReturnView } from "@/lib/returns/view";

type ReturnLinesProps = { returned: ReturnView; locale: Locale; timeZone: string };

/** Where each part of the return is now, and the way to the bench of those that are here. */
export function ReturnLines({ returned, locale, timeZone }: ReturnLinesProps) {
  const t = useTranslations("goodsIn.receive");
  const words = useTranslations("returns.card");
  return (
    <Card title={words("title")} note={returned.printed}>
      <div className="grid gap-4">
        {returned.lines.map((line) => (
          <div key={line.lineId} className="grid gap-2">
            <ReturnLine line={line} limits={null} locale={locale} timeZone={timeZone} />
            {line.moves.includes("examine") || line.finding ? (
              <p>
                <TextLink href={benchPath({ number: returned.number, lineNumber: line.lineNumber })}>
                  {t(line.finding ? "benchSeen" : "bench")}
                </TextLink>
              </p>
            ) : null}
          </div>
        ))}
      </div>
    </Card>
  );
}
