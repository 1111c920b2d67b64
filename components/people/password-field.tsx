"use client";

import clsx from "clsx";
import { useState, useSyncExternalStore } from "react";
import { buttonStyle } from "@/components/ui/button-style";
import { controlOf, Field, inputStyle, type FieldText } from "@/components/ui/field";

export type ShowTexts = { readonly show: string; readonly hide: string };
type PasswordFieldProps = FieldText & { autoComplete: "new-password" | "current-password"; texts: ShowTexts };

const never = () => () => {};

/** A password that can be looked at before it is sent, pasted, and filled in by a password manager. */
export function PasswordField({ autoComplete, texts, ...field }: PasswordFieldProps) {
  const [isShown, setShown] = useState(false);
  // Without script the button could do nothing: its room is kept, and it is not there.
  const isInBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  return (
    <Field {...field}>
      <span className="flex gap-2">
        <input
          {...controlOf(field)}
          type={isShown ? "text" : "password"}
          autoComplete={autoComplete}
          autoCapitalize="none"
          autoCorrect="off"
          spellCheck={false}
          className={clsx(inputStyle, "min-w-0")}
        />
        <button
          type="button"
          aria-pressed={isShown}
          aria-controls={field.id ?? field.name}
          onClick={() => setShown(!isShown)}
          className={clsx(buttonStyle(), !isInBrowser && "invisible")}
        >
          <span className="grid">
            <span className={clsx("col-start-1 row-start-1", isShown && "invisible")}>{texts.show}</span>
            <span className={clsx("col-start-1 row-start-1", !isShown && "invisible")}>{texts.hide}</span>
          </span>
        </button>
      </span>
    </Field>
  );
}
