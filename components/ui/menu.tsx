"use client";

import clsx from "clsx";
import type { ReactElement, ReactNode } from "react";
import {
  Menu as AriaMenu,
  MenuItem as AriaMenuItem,
  MenuTrigger,
  Popover,
  Separator,
  type MenuItemProps as AriaMenuItemProps,
} from "react-aria-components/Menu";
import { listItemStyle, panelStyle } from "./panel-style";

/** A list of things to do, opened by a button. Children are MenuItem and MenuRule. */
export function Menu({
  trigger,
  label,
  children,
}: {
  trigger: ReactElement;
  label: string;
  children: ReactNode;
}) {
  return (
    <MenuTrigger>
      {trigger}
      <Popover offset={4} className={clsx(panelStyle, "min-w-48")}>
        <AriaMenu aria-label={label} className="grid max-h-96 overflow-auto p-1 outline-none">
          {children}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  );
}

type MenuItemProps = Omit<AriaMenuItemProps, "className" | "style" | "children"> & {
  children: ReactNode;
  /** A key hint or a count at the right end. */
  aside?: ReactNode;
  isDanger?: boolean;
};

/** One line of a menu: an act (`onAction`) or a place (`href`). */
export function MenuItem({ children, aside, isDanger = false, textValue, ...props }: MenuItemProps) {
  const words = textValue ?? (typeof children === "string" ? children : undefined);
  return (
    <AriaMenuItem {...props} textValue={words} className={clsx(listItemStyle, isDanger && "text-refused")}>
      <span>{children}</span>
      {aside ? <span className="text-small text-ink-2">{aside}</span> : null}
    </AriaMenuItem>
  );
}

/** A line between kinds of things. */
export function MenuRule() {
  return <Separator className="my-1 border-t border-rule" />;
}
