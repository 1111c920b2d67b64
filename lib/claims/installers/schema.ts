import { z } from "zod";

/** What the list of installers may say was just done. */
const NOTES = ["added", "kept"] as const;

export const installersQuery = z.object({ note: z.enum(NOTES).optional().catch(undefined) });

const name = z
  .string()
  .max(500, "tooLong")
  .transform((text) => text.replace(/\s+/gu, " ").trim())
  .pipe(z.string().min(1, "missing").max(120, "tooLong"));

export const newInstallerInput = z.strictObject({ name });
export const installerInput = z.strictObject({
  installerId: z.uuid(),
  name,
  works: z.enum(["here", "left"]),
});

export type NewInstaller = z.infer<typeof newInstallerInput>;
export type InstallerChange = z.infer<typeof installerInput>;
