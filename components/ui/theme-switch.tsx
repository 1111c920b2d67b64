"use client";

import { Monitor, Moon, Sun } from "lucide-react";
import { useTranslations } from "next-intl";
import { useTheme } from "next-themes";
import { useSyncExternalStore } from "react";

const CHOICES = [
  { value: "system", Icon: Monitor },
  { value: "light", Icon: Sun },
  { value: "dark", Icon: Moon },
] as const;

export type ThemeChoice = (typeof CHOICES)[number]["value"];

const never = () => () => {};

/**
 * Three-way choice of the theme. The browser knows the answer, the server does not: nothing is marked until it asks.
 * `onChoose` is where the choice is kept with the person.
 */
export function ThemeSwitch({ onChoose }: { onChoose?: (theme: ThemeChoice) => void }) {
  const t = useTranslations("ui.theme");
  const { theme, setTheme } = useTheme();
  const isInBrowser = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

  return (
    <fieldset className="grid gap-1.5">
      <legend className="mb-1 font-semibold">{t("label")}</legend>
      <div className="flex w-fit flex-wrap rounded-control border border-edge bg-card">
        {CHOICES.map(({ value, Icon }) => (
          <label
            key={value}
            className="relative flex min-h-target cursor-pointer items-center gap-2 border-l border-edge px-3 py-1 text-small first:border-l-0 hover:bg-well has-checked:bg-well has-checked:font-semibold has-checked:text-petrol has-focus-visible:z-1 has-focus-visible:outline-3 has-focus-visible:outline-offset-3 has-focus-visible:outline-focus"
          >
            <input
              type="radio"
              name="theme"
              value={value}
              checked={isInBrowser && theme === value}
              onChange={() => {
                setTheme(value);
                onChoose?.(value);
              }}
              className="absolute inset-0 appearance-none outline-none"
            />
            <Icon aria-hidden="true" className="size-5 stroke-[1.75]" />
            {t(value)}
          </label>
        ))}
      </div>
    </fieldset>
  );
}
