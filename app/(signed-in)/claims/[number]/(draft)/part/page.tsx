import type { Metadata } from "next";
import { getTranslations } from "next-intl/server";
import { DraftForm } from "@/components/claims/draft-form";
import { LineFields } from "@/components/claims/line-fields";
import { OtherOne } from "@/components/claims/other-one";
import { StepButtons } from "@/components/claims/step-buttons";
import { StepHead } from "@/components/claims/step-head";
import { VehicleFields } from "@/components/claims/vehicle-fields";
import { listInstallers, listUnitsOfDraft } from "@/lib/claims/filing/queries";
import { draftSentences } from "@/lib/web/draft-wording";
import { todayOf } from "@/lib/access/today-queries";
import { lookUpSerial } from "@/lib/parts/queries";
import { addLineAction, removeLineAction, saveStepAction } from "../actions";
import { loadStep, type StepProps } from "../load-step";

export async function generateMetadata(): Promise<Metadata> {
  const t = await getTranslations("draft");
  return { title: t("steps.part") };
}

type Search = { other?: string; refused?: string };

/** First page of the flow: which unit, in which vehicle, fitted by whom and when, and what took its place. */
export default async function PartStepPage(props: StepProps & { searchParams: Promise<Search> }) {
  const { session, checked, showsAll } = await loadStep(props);
  const { actor } = session;
  const { draft, claim } = checked;
  const [units, installers, sentences, search] = await Promise.all([
    listUnitsOfDraft(actor, draft),
    listInstallers(actor),
    draftSentences(checked.problems, "part", { showsAll, locale: actor.locale }),
    props.searchParams,
  ]);
  const other = search.other?.trim() ? await lookUpSerial(actor, search.other.slice(0, 80)) : null;
  return (
    <div className="grid max-w-2xl gap-6">
      <StepHead
        number={claim.number}
        step="part"
        problems={sentences}
        isAnswer={claim.state === "answerNeeded"}
      />
      <DraftForm number={claim.number} action={saveStepAction} savedAt={checked.savedAt.toISOString()}>
        <input type="hidden" name="step" value="part" />
        {draft.lines.map((line, place) => (
          <LineFields
            key={line.unitId ?? place}
            line={line}
            place={place}
            unit={units[place] ?? null}
            part={checked.context.lines[place]?.part ?? null}
            installers={installers}
            problems={sentences}
            locale={actor.locale}
            today={todayOf(actor)}
            isAlone={draft.lines.length === 1}
          />
        ))}
        <VehicleFields draft={draft} problems={sentences} locale={actor.locale} today={todayOf(actor)} />
        <StepButtons />
      </DraftForm>
      <OtherOne
        number={claim.number}
        typed={search.other ?? ""}
        units={other && other.kind !== "unknown" ? other.units : []}
        isSearched={other !== null}
        refused={search.refused}
        lines={draft.lines.map((line) => line.serial)}
        add={addLineAction}
        remove={removeLineAction}
      />
    </div>
  );
}
