import { getTranslations } from "next-intl/server";
import type { FormField } from "@/components/record-form/fields";
import type { FieldSection } from "@/components/record-form/record-form";
import { formatNumber } from "@/lib/kernel/format";
import type { Locale } from "@/lib/kernel/locale";
import { familyOf } from "@/lib/parts/families";
import { readingKindOf, type PartFamily } from "@/lib/parts/family";
import { FINDING_KINDS } from "@/lib/returns/kinds";
import type { BenchStepView, BenchView } from "@/lib/returns/view";

type ReadStep = Extract<BenchStepView, { does: "read" }>;

/** What the workshop measured, in words, so that it stands beside the field it is compared with. */
async function measuredBefore({ theirs }: ReadStep, locale: Locale): Promise<string | undefined> {
  const [t, words] = await Promise.all([
    getTranslations("goodsIn.bench"),
    getTranslations("returns.finding"),
  ]);
  if (theirs.length === 0) return undefined;
  const values = theirs.map(({ value, unit, temperatureCelsius: celsius }) => {
    if (value === null) return words("openCircuit");
    const figures = { value: formatNumber(value, locale, { most: 2 }), unit };
    return celsius === null
      ? words("reading", figures)
      : words("readingAt", { ...figures, celsius: formatNumber(celsius, locale, { most: 1 }) });
  });
  return t("theirsOf", { values: values.join(", ") });
}

/** The fields of one reading: the value with its unit, and its temperature where that belongs to it. */
async function readingFields(
  family: PartFamily | null,
  step: ReadStep,
  locale: Locale,
): Promise<FormField[]> {
  const { reading } = step;
  const [t, names] = await Promise.all([
    getTranslations("goodsIn.bench"),
    getTranslations("ruleBook.readings"),
  ]);
  const kind = family && readingKindOf(family, reading);
  if (!kind) return [];
  const value: FormField = {
    kind: "line",
    name: `readings.${reading}.raw`,
    label: kind.unit === "" ? names(reading) : `${names(reading)}, ${kind.unit}`,
    hint: await measuredBefore(step, locale),
    isOptional: true,
    maxLength: 60,
  };
  const temperature: FormField = {
    kind: "line",
    name: `readings.${reading}.temperature`,
    label: t("temperature"),
    isOptional: true,
    maxLength: 20,
  };
  return kind.temperature === "notNeeded" ? [value] : [value, temperature];
}

/** The form of a finding: what it is, in words, the run, what was looked at and what was measured. */
export async function findingSections({ line, steps }: BenchView, locale: Locale): Promise<FieldSection[]> {
  const [t, words] = await Promise.all([getTranslations("goodsIn.bench"), getTranslations("returns")]);
  const family = familyOf(line.family);
  const readings = steps.flatMap((step) => (step.does === "read" ? [step] : []));
  return [
    {
      fields: [
        {
          kind: "oneOf",
          name: "kind",
          label: t("kind"),
          choices: FINDING_KINDS.map((value) => ({ value, label: words(`findings.${value}`) })),
        },
        { kind: "lines", name: "note", label: t("note"), hint: t("noteHint"), rows: 4, maxLength: 4000 },
        {
          kind: "line",
          name: "runMinutes",
          label: t("runMinutes"),
          hint: t("runMinutesHint"),
          isOptional: true,
          maxLength: 20,
        },
      ],
    },
    {
      title: t("readings"),
      fields: (await Promise.all(readings.map((step) => readingFields(family, step, locale)))).flat(),
    },
    {
      title: t("looks"),
      fields: steps.flatMap((step): FormField[] =>
        step.does === "look"
          ? [
              {
                kind: "line",
                name: `looks.${step.id}`,
                label: words(`steps.${step.id}`),
                isOptional: true,
                maxLength: 400,
              },
            ]
          : [],
      ),
    },
  ];
}
