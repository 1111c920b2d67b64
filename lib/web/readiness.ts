import "server-only";
import { readdirSync } from "node:fs";
import { HeadBucketCommand } from "@aws-sdk/client-s3";
import { beforeSignIn } from "@/lib/db/unit-of-work";
import { bucket, store } from "@/lib/storage/client";

const WAIT_MS = 2_000;

/** Whether a check succeeds within two seconds; a hanging part is a missing part. */
const holds = async (check: () => Promise<boolean>): Promise<boolean> => {
  const late = new Promise<boolean>((resolve) => setTimeout(() => resolve(false), WAIT_MS).unref());
  return Promise.race([check().catch(() => false), late]);
};

/** How many migrations this build was made with. */
const expected = () => readdirSync("migrations").filter((name) => /^2.*\.ts$/u.test(name)).length;

export type Readiness = { database: boolean; migrations: boolean; store: boolean; worker: boolean };

/** What the product needs to do its work, part by part. */
export async function readiness(): Promise<Readiness> {
  const [database, migrations, storage, worker] = await Promise.all([
    holds(async () => (await beforeSignIn("select 1 as one", [])).length === 1),
    holds(async () => {
      const [row] = await beforeSignIn<{ count: number }>(
        "select count(*)::int as count from bookkeeping.schema_migrations",
        [],
      );
      return row?.count === expected();
    }),
    holds(async () => {
      await store().send(new HeadBucketCommand({ Bucket: bucket() }));
      return true;
    }),
    holds(async () => {
      const seen = await beforeSignIn(
        "select name from worker_heartbeats where seen_at > now() - interval '1 minute'",
        [],
      );
      return seen.length > 0;
    }),
  ]);
  return { database, migrations, store: storage, worker };
}
