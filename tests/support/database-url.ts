export const TEMPLATE = "template_partproof";

export type Login = "ADMIN" | "MIGRATOR" | "WEB" | "WORKER";

/** The address of a database on the cluster of this run, as one of its logins. */
export function databaseUrl(login: Login, database: string): string {
  const url = process.env[`DATABASE_URL_${login}`];
  if (!url)
    throw new Error(
      `DATABASE_URL_${login} is not set: run the tests with node docker-free-scripts/test-database.mjs`,
    );
  return Object.assign(new URL(url), { pathname: `/${database}` }).href;
}
