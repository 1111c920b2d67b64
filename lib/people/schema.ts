import { z } from "zod";

/** How long a password is: the length of a short sentence at least, and short enough to be hashed in one go. */
export const PASSWORD_CHARACTERS = { least: 12, most: 128 } as const;

export type PasswordFault = "tooShort" | "tooLong";

/** What is wrong with a new password, or null. Its length alone counts: rules about signs make passwords weaker. */
export function passwordFault(password: string): PasswordFault | null {
  if (password.length < PASSWORD_CHARACTERS.least) return "tooShort";
  return password.length > PASSWORD_CHARACTERS.most ? "tooLong" : null;
}

export const PREFERRED_LANGUAGES = ["en", "de"] as const;
export const PREFERRED_THEMES = ["system", "light", "dark"] as const;
export const PREFERRED_DENSITIES = ["byDevice", "shop", "office", "ledger"] as const;

/** How a person likes to see the product. */
export const preferencesInput = z.object({
  locale: z.enum(PREFERRED_LANGUAGES),
  theme: z.enum(PREFERRED_THEMES),
  density: z.enum(PREFERRED_DENSITIES),
});
export type Preferences = z.infer<typeof preferencesInput>;

/** The old and the new password as typed; what is wrong with them is said in sentences of their own. */
export const passwordChangeInput = z.object({
  current: z.string().max(4000),
  password: z.string().max(4000),
});
export type PasswordChangeInput = z.infer<typeof passwordChangeInput>;

/** One of a person's own sessions. */
export const ownSessionInput = z.object({ session: z.uuid() });

/** One of the organisations a person works for. */
export const workplaceInput = z.object({ organisation: z.uuid() });

/** An act that needs nothing but the person who does it. */
export const nothingInput = z.object({});
