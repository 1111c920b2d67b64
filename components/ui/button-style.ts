import clsx from "clsx";

const KINDS = {
  primary:
    "border-petrol bg-petrol text-on-petrol hover:border-petrol-deep hover:bg-petrol-deep active:bg-petrol-deep pressed:bg-petrol-deep",
  secondary:
    "border-petrol bg-card text-petrol hover:border-petrol-deep hover:bg-well hover:text-petrol-deep",
  quiet: "border-transparent text-petrol hover:bg-well hover:text-petrol-deep",
  danger: "border-refused bg-card text-refused hover:bg-refused-wash",
} as const;

export type ButtonKind = keyof typeof KINDS;
export type ButtonLook = { kind?: ButtonKind; small?: boolean; wide?: boolean };

/** The one look of everything that is pressed, whether it is a button, a link or a summary. */
export const buttonStyle = ({ kind = "secondary", small = false, wide = false }: ButtonLook = {}): string =>
  clsx(
    "relative inline-flex items-center justify-center gap-2 overflow-hidden rounded-control border-2 text-center leading-5 font-semibold no-underline transition-colors duration-state print:hidden",
    small ? "min-h-target px-2.5 py-0.5 text-small" : "min-h-control px-4 py-1 text-body",
    wide && "w-full",
    KINDS[kind],
  );
