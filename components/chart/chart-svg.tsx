import clsx from "clsx";
import type { ReactNode } from "react";

type ChartSvgProps = {
  title: string;
  description: string;
  width: number;
  height: number;
  className: string;
  children: ReactNode;
};

/** The sheet a figure with links is drawn on: a group with a name, so that its points can be reached. */
export function ChartSvg({ title, description, width, height, className, children }: ChartSvgProps) {
  return (
    <svg
      role="group"
      aria-label={title}
      viewBox={`0 0 ${width} ${height}`}
      className={clsx("h-auto w-full font-text tabular-nums", className)}
      fontSize={15}
    >
      <title>{title}</title>
      <desc>{description}</desc>
      {children}
    </svg>
  );
}
