import { getTranslations } from "next-intl/server";
import type { FieldSection } from "@/components/record-form/record-form";
import type { ReturnLineView } from "@/lib/returns/view";
import { conditionField } from "../../condition-field";

type Asked = {
  readonly lines: readonly ReturnLineView[];
  readonly isQuarantine: boolean;
  /** The parcel was written down before: how it looked is known. */
  readonly isKnownParcel: boolean;
};

/** The questions of a parcel being opened: how it looked, each part in it with its serial, and where they are put. */
export async function receiveSections({
  lines,
  isQuarantine,
  isKnownParcel,
}: Asked): Promise<FieldSection[]> {
  const t = await getTranslations("goodsIn.receive");
  const yesNo = [
    { value: "yes", label: t("yes") },
    { value: "no", label: t("no") },
  ];
  const parcel: FieldSection = {
    fields: [
      ...(isQuarantine || isKnownParcel ? [] : [await conditionField(t("condition"))]),
      ...(isKnownParcel
        ? []
        : [
            {
              kind: "lines",
              name: "note",
              label: t("note"),
              isOptional: true,
              rows: 2,
              maxLength: 1000,
            } as const,
          ]),
    ],
  };
  const parts = lines.map((line, place): FieldSection => ({
    title: t("lineTitle", { line: line.lineNumber, part: line.partName }),
    note: line.serial ? t("claimed", { serial: line.serial }) : t("noSerial"),
    fields: [
      { kind: "oneOf", name: `lines.${place}.isHere`, label: t("isHere"), value: "yes", choices: yesNo },
      {
        kind: "line",
        name: `lines.${place}.serialSeen`,
        label: t("serialSeen"),
        isOptional: true,
        isSerial: true,
        maxLength: 80,
      },
    ],
  }));
  const place: FieldSection = {
    fields: [
      {
        kind: "line",
        name: "place",
        label: t(isQuarantine ? "placeQuarantine" : "place"),
        hint: t(isQuarantine ? "placeQuarantineHint" : "placeHint"),
        isSerial: true,
        maxLength: 40,
      },
    ],
  };
  return [...(parcel.fields.length > 0 ? [parcel] : []), ...parts, place];
}
