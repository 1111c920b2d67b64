import type { ComponentProps, ReactNode } from "react";

type NativeInput = Omit<ComponentProps<"input">, "type" | "className" | "children">;
export type CheckProps = NativeInput & { label: ReactNode; hint?: ReactNode };

/** One box to tick, with words beside it that can be pressed too. */
export function Checkbox({ label, hint, ...input }: CheckProps) {
  return (
    <CheckRow label={label} hint={hint}>
      <input {...input} type="checkbox" className="check mt-[0.15em] rounded-sheet" />
    </CheckRow>
  );
}

/** One of several; at home in a ChoiceGroup. */
export function Radio({ label, hint, ...input }: CheckProps) {
  return (
    <CheckRow label={label} hint={hint}>
      <input {...input} type="radio" className="check mt-[0.15em] rounded-full" />
    </CheckRow>
  );
}

function CheckRow({ label, hint, children }: { label: ReactNode; hint: ReactNode; children: ReactNode }) {
  return (
    <label className="flex min-h-target w-fit max-w-measure cursor-pointer items-start gap-3 py-1">
      {children}
      <span>
        {label}
        {hint ? <span className="block text-small text-ink-2">{hint}</span> : null}
      </span>
    </label>
  );
}
