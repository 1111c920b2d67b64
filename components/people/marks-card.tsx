import { getTranslations } from "next-intl/server";
import { Card } from "@/components/ui/card";
import { CLAIM_MARKS } from "@/components/ui/mark-states";
import { ClaimMark, LateMark } from "@/components/ui/status-mark";

type ClaimState = keyof typeof CLAIM_MARKS;

const isState = (text: string): text is ClaimState => text in CLAIM_MARKS;
const STATES = Object.keys(CLAIM_MARKS).filter(isState);

const LINE = "grid items-baseline gap-x-6 gap-y-1 border-b border-rule py-2.5 sm:grid-cols-[12rem_1fr]";

/** Every mark of a claim with what it says about whose turn it is. */
export async function MarksCard() {
  const t = await getTranslations("help.marks");
  return (
    <Card id="marks" title={t("title")} isInCharge>
      <p className="mb-3 max-w-measure text-ink-2">{t("intro")}</p>
      <dl>
        {STATES.map((state) => (
          <div key={state} className={LINE}>
            <dt>
              <ClaimMark state={state} />
            </dt>
            <dd>{t(`claim.${state}`)}</dd>
          </div>
        ))}
        <div className={LINE}>
          <dt>
            <LateMark daysOver={3} />
          </dt>
          <dd>{t("late")}</dd>
        </div>
      </dl>
    </Card>
  );
}
