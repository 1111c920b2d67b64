import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { minutesAndSeconds } from "@/lib/evidence/duration";
import type { BenchView } from "@/lib/returns/view";

/** Said before the finding is written: until when "no fault found" is closed, by which figure, and how long it ran so far. */
export function RunNeeded({ bench }: { bench: BenchView }) {
  const t = useTranslations("goodsIn.bench");
  const { claimSeconds, neededSeconds, log, loggedSeconds } = bench;
  const time = (seconds: number) => t("time", minutesAndSeconds(seconds));
  const isLongEnough = loggedSeconds !== null && loggedSeconds >= neededSeconds;
  const soFar =
    loggedSeconds === null
      ? t(log !== null && log.summary === null ? "logBeingRead" : "noLogYet")
      : t("ranSoFar", { ran: time(loggedSeconds) });
  return (
    <Banner kind={isLongEnough ? "proven" : "wanting"} title={t(isLongEnough ? "runOpen" : "runTitle")}>
      <p>{t(claimSeconds === null ? "runByDefault" : "runByClaim", { needed: time(neededSeconds) })}</p>
      <p>{soFar}</p>
    </Banner>
  );
}
