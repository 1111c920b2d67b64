import { useTranslations } from "next-intl";
import { Button } from "@/components/ui/button";
import { TextField } from "@/components/ui/text-field";

/** The first thing at goods-in: whatever is scanned or typed leads to where it belongs. A plain form, without script too. */
export function ScanField({ text, parcelId }: { text: string; parcelId: string | undefined }) {
  const t = useTranslations("goodsIn");
  return (
    <form action="/goods-in" className="grid gap-3 sm:flex sm:items-end">
      {parcelId === undefined ? null : <input type="hidden" name="parcel" value={parcelId} />}
      <div className="sm:w-96">
        <TextField
          name="find"
          label={t("scan")}
          hint={t("scanHint")}
          isSerial
          autoFocus
          autoComplete="off"
          defaultValue={text}
          maxLength={400}
        />
      </div>
      <Button type="submit" kind="primary">
        {t("find")}
      </Button>
    </form>
  );
}
