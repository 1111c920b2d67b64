import type { SheetView } from "@/lib/claims/sheet/view";
import type { Locale } from "@/lib/kernel/locale";

/** What every part of the sheet is given: the claim, and how the reader reads. */
export type SheetProps = { readonly sheet: SheetView; readonly locale: Locale; readonly timeZone: string };
