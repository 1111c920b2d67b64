"use client";

import clsx from "clsx";
import type { ReactElement, ReactNode } from "react";
import { Tooltip as AriaTooltip, TooltipTrigger } from "react-aria-components/Tooltip";
import { panelStyle } from "./panel-style";

/** Words for a button that shows only a sign. The button still carries its own name; nothing lives in a tip alone. */
export function Tooltip({ tip, children }: { tip: ReactNode; children: ReactElement }) {
  return (
    <TooltipTrigger delay={400} closeDelay={100}>
      {children}
      <AriaTooltip offset={6} className={clsx(panelStyle, "max-w-64 px-2.5 py-1 text-14")}>
        {tip}
      </AriaTooltip>
    </TooltipTrigger>
  );
}
