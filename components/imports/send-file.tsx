import { useTranslations } from "next-intl";
import { Card } from "@/components/ui/card";
import { controlOf, Field, inputStyle } from "@/components/ui/field";
import { SubmitButton } from "@/components/ui/submit-button";

type SendFileProps = {
  limitMb: number;
  /** Why the last file was not taken, said at the field. */
  refusal?: string;
};

/** A plain form with one file in it: it works before any script has loaded. */
export function SendFile({ limitMb, refusal }: SendFileProps) {
  const t = useTranslations("imports.send");
  const field = { name: "file", label: t("label"), hint: t("hint", { limitMb }), error: refusal };
  return (
    <Card isInCharge title={t("title")}>
      <form
        action="/api/v1/invoice-imports"
        method="post"
        encType="multipart/form-data"
        className="grid gap-4"
      >
        <Field {...field}>
          <input
            {...controlOf(field)}
            type="file"
            accept=".csv,.txt,text/csv,text/plain"
            required
            className={`${inputStyle} py-2 file:mr-4 file:border-0 file:bg-transparent file:font-semibold file:text-petrol`}
          />
        </Field>
        <div>
          <SubmitButton>{t("button")}</SubmitButton>
        </div>
      </form>
    </Card>
  );
}
