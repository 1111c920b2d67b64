import clsx from "clsx";
import { useTranslations } from "next-intl";
import type { ReactNode } from "react";
import { Glyph } from "./glyph";

export type FieldText = {
  /** Name in the form; also the id unless one is given, so an error summary can link to it. */
  name: string;
  id?: string;
  label: ReactNode;
  hint?: ReactNode;
  /** Stops the form: what is wrong and how to put it right. */
  error?: string;
  /** Never stops the form: something looks odd, keep it or change it. */
  caution?: ReactNode;
  isOptional?: boolean;
};

const idOf = ({ id, name }: FieldText) => id ?? name;

/** What a native input needs so that label, hint, caution and error are read with it. */
export function controlOf(field: FieldText) {
  const id = idOf(field);
  const describedBy = [
    field.hint && `${id}-hint`,
    field.caution && `${id}-caution`,
    field.error && `${id}-error`,
  ];
  return {
    id,
    name: field.name,
    "aria-describedby": describedBy.filter(Boolean).join(" ") || undefined,
    "aria-invalid": field.error ? true : undefined,
  } as const;
}

/** The box of every typed control. */
export const inputStyle = clsx(
  "min-h-control w-full rounded-control border border-edge bg-card px-3 text-body text-ink placeholder:text-ink-3",
  "hover:border-ink-2 aria-invalid:border-refused aria-invalid:shadow-[inset_0_0_0_1px_var(--refused)]",
);

/** Label above, hint under it, then the control, then what is odd or wrong. Plain HTML: works without script. */
export function Field({ children, ...field }: FieldText & { children: ReactNode }) {
  const id = idOf(field);
  return (
    <div className="grid max-w-measure gap-1.5">
      <label htmlFor={id} className="font-semibold">
        <FieldLabel {...field} />
      </label>
      <FieldHint id={id} hint={field.hint} />
      {children}
      <FieldNotes id={id} error={field.error} caution={field.caution} />
    </div>
  );
}

type FieldGroupProps = FieldText & { children: ReactNode; isOneOf?: boolean };

/** Several controls under one question: the same parts around a `<fieldset>`. `isOneOf` when exactly one is chosen. */
export function FieldGroup({ children, isOneOf = false, ...field }: FieldGroupProps) {
  const { id, "aria-describedby": describedBy, "aria-invalid": isInvalid } = controlOf(field);
  // Single radios cannot be marked as wrong, the group they form can; boxes carry the mark themselves.
  const group = isOneOf ? ({ role: "radiogroup", "aria-invalid": isInvalid } as const) : {};
  return (
    <fieldset {...group} aria-describedby={describedBy} className="grid min-w-0 gap-2">
      <legend className="mb-1 font-semibold">
        <FieldLabel {...field} />
      </legend>
      <FieldHint id={id} hint={field.hint} />
      {children}
      <FieldNotes id={id} error={field.error} caution={field.caution} />
    </fieldset>
  );
}

function FieldLabel({ label, isOptional }: FieldText) {
  const t = useTranslations("ui");
  return (
    <>
      {label}
      {isOptional ? <span className="font-normal text-ink-2"> {t("optional")}</span> : null}
    </>
  );
}

function FieldHint({ id, hint }: { id: string; hint: ReactNode }) {
  if (!hint) return null;
  return (
    <p id={`${id}-hint`} className="max-w-measure text-small text-ink-2">
      {hint}
    </p>
  );
}

function FieldNotes({ id, error, caution }: Pick<FieldText, "error" | "caution"> & { id: string }) {
  return (
    <>
      {caution ? (
        <p id={`${id}-caution`} className="flex max-w-measure gap-1.5 text-small text-wanting">
          <Glyph name="warning" />
          <span>{caution}</span>
        </p>
      ) : null}
      {error ? (
        <p id={`${id}-error`} className="flex max-w-measure gap-1.5 text-small font-semibold text-refused">
          <Glyph name="stop" />
          <span>{error}</span>
        </p>
      ) : null}
    </>
  );
}
