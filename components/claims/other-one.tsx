import { useTranslations } from "next-intl";
import { Banner } from "@/components/ui/banner";
import { Button } from "@/components/ui/button";
import { Card } from "@/components/ui/card";
import { Serial } from "@/components/ui/serial";
import { TextField } from "@/components/ui/text-field";

type Unit = { unitId: string; serial: string; partName: string };
type OtherOneProps = {
  number: string;
  typed: string;
  units: readonly Unit[];
  isSearched: boolean;
  refused?: string;
  lines: readonly string[];
  add: (form: FormData) => Promise<void>;
  remove: (form: FormData) => Promise<void>;
};

const REFUSALS = ["notFound", "unitOfOtherSeller", "lineTwice", "linesFull"] as const;

/** "Add the other one": a pair that was changed together is one claim with two lines. */
export function OtherOne({ number, typed, units, isSearched, refused, lines, add, remove }: OtherOneProps) {
  const t = useTranslations("draft.other");
  const known = REFUSALS.find((code) => code === refused);
  return (
    <Card title={t("title")}>
      <div className="grid gap-4">
        {known ? <Banner kind="refused">{t(`refused.${known}`)}</Banner> : null}
        <form className="grid gap-3">
          <TextField
            name="other"
            label={t("serial")}
            hint={t("hint")}
            isSerial
            defaultValue={typed}
            maxLength={80}
          />
          <Button type="submit" kind="secondary" wide>
            {t("lookUp")}
          </Button>
        </form>
        {isSearched && units.length === 0 ? (
          <p className="text-wanting">{t("unknown", { serial: typed })}</p>
        ) : null}
        {units.map((unit) => (
          <form
            key={unit.unitId}
            action={add}
            className="grid items-center gap-3 border-t border-rule pt-3 sm:grid-cols-[1fr_auto]"
          >
            <input type="hidden" name="number" value={number} />
            <input type="hidden" name="unitId" value={unit.unitId} />
            <p>
              {unit.partName} <Serial value={unit.serial} />
            </p>
            <Button type="submit">{t("add")}</Button>
          </form>
        ))}
        {lines.map((serial, place) =>
          place === 0 ? null : (
            <form
              key={serial}
              action={remove}
              className="flex items-center justify-between gap-3 border-t border-rule pt-3"
            >
              <input type="hidden" name="number" value={number} />
              <input type="hidden" name="place" value={place} />
              <Serial value={serial} />
              <Button type="submit" kind="quiet" small>
                {t("remove")}
              </Button>
            </form>
          ),
        )}
      </div>
    </Card>
  );
}
