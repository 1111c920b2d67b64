import clsx from "clsx";
import { useTranslations } from "next-intl";

// Lines of uneven length, as text has; they do not move.
const WIDTHS = ["w-11/12", "w-4/5", "w-full", "w-2/3", "w-5/6"] as const;

/** Room kept for what is still coming, at the height it will have: a table's rows or a text's lines. */
export function Skeleton({ rows, kind = "text" }: { rows: number; kind?: "text" | "table" }) {
  const t = useTranslations("ui");
  const lines = Array.from({ length: rows }, (_, index) => index);
  return (
    <div role="status">
      <span className="sr-only">{t("loading")}</span>
      {lines.map((line) => (
        <div
          key={line}
          aria-hidden="true"
          className={clsx("flex items-center", kind === "table" ? "h-row border-b border-rule" : "h-[1.5em]")}
        >
          <span className={clsx("h-[0.6em] rounded-sheet bg-well", WIDTHS[line % WIDTHS.length])} />
        </div>
      ))}
    </div>
  );
}
