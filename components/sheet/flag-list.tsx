import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { TextLink } from "@/components/ui/link-button";
import { printClaimNumber } from "@/lib/claims/number";
import { claimPath } from "@/lib/claims/paths";
import { readableValues } from "@/lib/kernel/readable";
import type { SheetProps } from "./shared";

/** What is worth a second look. It accuses nobody: the words name the fact and where it stands. */
export function FlagList({ sheet, locale }: SheetProps) {
  const t = useTranslations("sheet.flags");
  if (sheet.flags.length === 0) return null;
  return (
    <Banner kind="wanting" title={t("title")}>
      <ul className="grid gap-1">
        {sheet.flags.map((flag) => {
          const other = flag.detail.otherClaim;
          return (
            <li key={`${flag.kind}-${flag.lineNumber}-${other ?? ""}`}>
              {t.has(flag.kind)
                ? t(flag.kind, {
                    line: flag.lineNumber ?? 1,
                    ...readableValues(flag.detail, locale),
                    otherClaim: other ? printClaimNumber(other) : "",
                  })
                : flag.kind}{" "}
              {other ? (
                <TextLink href={claimPath({ number: other })}>
                  {t("open", { number: printClaimNumber(other) })}
                </TextLink>
              ) : null}
            </li>
          );
        })}
      </ul>
    </Banner>
  );
}
