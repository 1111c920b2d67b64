import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { buttonStyle } from "@/components/ui/button-style";
import { TextLink } from "@/components/ui/link-button";

export type CellsAnswer = "sound" | "unsafe" | undefined;
type LabelLinksProps = {
  returnNumber: string;
  claimPath: `/claims/${string}`;
  asksForDanger: boolean;
  cells: CellsAnswer;
};

/** The label to print. A battery is looked at first: one that is not sound gets none. */
export function LabelLinks({ returnNumber, claimPath, asksForDanger, cells }: LabelLinksProps) {
  const t = useTranslations("returns.label");
  if (asksForDanger && cells === "unsafe")
    return (
      <Banner
        kind="caution"
        title={t("refusedTitle")}
        isLive
        actions={<TextLink href={`${claimPath}#called-in`}>{t("again")}</TextLink>}
      >
        {t("refused")}
      </Banner>
    );
  if (asksForDanger && cells !== "sound")
    return (
      <form action={`${claimPath}#called-in`} className="grid gap-3">
        <Banner kind="caution" title={t("askTitle")}>
          {t("ask")}
        </Banner>
        <p className="flex flex-wrap gap-2">
          <Button type="submit" name="cells" value="sound" kind="secondary">
            {t("sound")}
          </Button>
          <Button type="submit" name="cells" value="unsafe" kind="secondary">
            {t("unsafe")}
          </Button>
        </p>
      </form>
    );
  const address = (size: "a4" | "roll") =>
    `/api/v1/returns/${returnNumber}/label?size=${size}${asksForDanger ? "&cells=sound" : ""}`;
  return (
    <p className="flex flex-wrap gap-2">
      <a href={address("a4")} className={buttonStyle({ kind: "secondary" })}>
        {t("print")}
      </a>
      <a href={address("roll")} className={buttonStyle({ kind: "secondary" })}>
        {t("printRoll")}
      </a>
    </p>
  );
}
