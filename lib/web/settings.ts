import "server-only";
import { z } from "zod";

const settings = z.object({
  PUBLIC_URL: z.url(),
  NEXTAUTH_SECRET: z.string().min(32),
  STORE_ENDPOINT: z.url(),
  STORE_REGION: z.string().min(1),
  STORE_BUCKET: z.string().min(3),
  STORE_ACCESS_KEY_ID: z.string().min(1),
  STORE_SECRET_ACCESS_KEY: z.string().min(1),
  SMTP_HOST: z.string().min(1),
  SMTP_PORT: z.coerce.number().int(),
  MAIL_FROM: z.string().min(3),
  /** How many proxies of ours a request passes before it reaches us. */
  TRUSTED_PROXY: z.coerce.number().int().min(1).max(5),
});

const given = settings.partial();
type Given = z.infer<typeof given>;

/** The settings of this process, checked when they are first asked for. Throws, naming what is missing. */
export function setting<Name extends keyof Given>(name: Name): NonNullable<Given[Name]> {
  const read = given.safeParse({ [name]: process.env[name] }).data?.[name];
  if (read === undefined)
    throw new Error(`The setting ${name} is missing or wrong: start the product with npm start`);
  return read;
}

/** A setting an installation may leave out. Throws where it is given and wrong. */
export const settingIfGiven = <Name extends keyof Given>(name: Name): NonNullable<Given[Name]> | undefined =>
  process.env[name] === undefined || process.env[name] === "" ? undefined : setting(name);

/** Where this installation is reached. Links in mails are made from it and never from a request's headers. */
export const publicUrl = (path = "/"): string => new URL(path, setting("PUBLIC_URL")).href;

export const isSecure = (): boolean => setting("PUBLIC_URL").startsWith("https:");
