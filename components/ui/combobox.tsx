"use client";

import type { ReactNode } from "react";
import { Button } from "react-aria-components/Button";
import {
  ComboBox as AriaComboBox,
  FieldError,
  Input,
  Label,
  ListBox,
  ListBoxItem,
  Popover,
  Text,
  type ComboBoxProps as AriaComboBoxProps,
} from "react-aria-components/ComboBox";
import clsx from "clsx";
import { useTranslations } from "next-intl";
import { inputStyle, type FieldText } from "./field";
import { Glyph } from "./glyph";
import { listItemStyle, panelStyle } from "./panel-style";

export type ComboboxOption = { id: string; label: string; detail?: ReactNode };
type ComboboxProps = FieldText &
  Omit<
    AriaComboBoxProps<ComboboxOption>,
    "children" | "className" | "style" | "items" | "defaultItems" | "name" | "id"
  > & {
    options: readonly ComboboxOption[];
    /** Set when the list comes already filtered, from a search on the server. */
    isFilteredElsewhere?: boolean;
  };

/** Type to narrow a long list. The form receives the id of the choice, or the text where free text is allowed. */
export function Combobox({ options, isFilteredElsewhere = false, ...props }: ComboboxProps) {
  const { label, hint, error, caution, isOptional, ...combo } = props;
  const t = useTranslations("ui");
  const list = isFilteredElsewhere ? { items: options } : { defaultItems: options };
  return (
    <AriaComboBox
      {...combo}
      id={combo.id ?? combo.name}
      {...list}
      isInvalid={Boolean(error)}
      menuTrigger="focus"
      className="grid max-w-measure gap-1.5"
    >
      <Label className="font-semibold">
        {label}
        {isOptional ? <span className="font-normal text-ink-2"> {t("optional")}</span> : null}
      </Label>
      {(hint ?? caution) ? (
        <Text slot="description" className="max-w-measure text-small text-ink-2">
          {hint} {caution}
        </Text>
      ) : null}
      <div className="relative">
        <Input className={clsx(inputStyle, "pr-12")} />
        <Button className="absolute inset-y-0 right-0 flex w-11 items-center justify-center rounded-control text-ink-2 hover:text-ink">
          <Glyph name="down" />
        </Button>
      </div>
      <FieldError className="flex gap-1.5 text-small font-semibold text-refused">
        <Glyph name="stop" />
        <span>{error}</span>
      </FieldError>
      <Popover offset={8} className={clsx(panelStyle, "w-(--trigger-width)")}>
        <ListBox<ComboboxOption>
          className="max-h-80 overflow-auto p-1 outline-none"
          renderEmptyState={() => <p className="px-3 py-2 text-small text-ink-2">{t("noneFits")}</p>}
        >
          {(option) => (
            <ListBoxItem id={option.id} textValue={option.label} className={listItemStyle}>
              <span>{option.label}</span>
              {option.detail ? <span className="text-small text-ink-2">{option.detail}</span> : null}
            </ListBoxItem>
          )}
        </ListBox>
      </Popover>
    </AriaComboBox>
  );
}
