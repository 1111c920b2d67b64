import type { Locale } from "@/lib/kernel/locale";
import type { Role } from "./roles";

declare const sessionChecked: unique symbol;

/**
 * Someone whose session was checked in this request. Only `lib/web/session.ts` makes one (tests: `actorAt`), so a
 * read or a write that forgot the check does not compile.
 */
export type Actor = {
  readonly [sessionChecked]: true;
  readonly userId: string;
  readonly name: string;
  readonly organisationId: string;
  readonly roles: ReadonlySet<Role>;
  readonly locale: Locale;
  readonly timeZone: string;
  readonly requestId: string;
};
