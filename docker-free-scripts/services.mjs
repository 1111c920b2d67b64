import { join } from "node:path";
import { root } from "./machine.mjs";
import { prepareDatabase } from "./postgres.mjs";
import { tsxArgs, runTsx } from "./tsx.mjs";
import { waitFor } from "./processes.mjs";
import { step } from "./report.mjs";

/** The store with its bucket, and the mail catcher. */
export async function startFakes(processes, environment) {
  const env = { ...process.env, ...environment };
  processes.start("object-store", [join(root, "docker-free-scripts/object-store.mjs")], env);
  processes.start("mail-catcher", [join(root, "docker-free-scripts/mail-catcher.mjs")], env);
  await waitFor(environment.STORE_ENDPOINT, { seconds: 10, isGood: (response) => response.status === 403 });
  await waitFor(`${environment.MAILBOX_URL}/api/mails`, { seconds: 10 });
  await makeBucket(environment);
  return `store ${environment.STORE_ENDPOINT}, mails ${environment.MAILBOX_URL}`;
}

async function makeBucket(environment) {
  // The pinned SDK runs on Node 20; that a later one will not is known, and no news at every start.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = "true";
  const { CreateBucketCommand, S3Client } = await import("@aws-sdk/client-s3");
  const client = new S3Client({
    endpoint: environment.STORE_ENDPOINT,
    region: environment.STORE_REGION,
    forcePathStyle: true,
    credentials: {
      accessKeyId: environment.STORE_ACCESS_KEY_ID,
      secretAccessKey: environment.STORE_SECRET_ACCESS_KEY,
    },
  });
  await client.send(new CreateBucketCommand({ Bucket: environment.STORE_BUCKET }));
  client.destroy();
}

/** Roles, migrations and, in an empty database, the demo. */
export async function fillDatabase(environment, secrets, { today } = {}) {
  const admin = Object.assign(new URL(environment.DATABASE_URL_ADMIN), { pathname: "/postgres" }).href;
  const database = new URL(environment.DATABASE_URL_ADMIN).pathname.slice(1);
  await step("Database roles", () => prepareDatabase(admin, secrets, database));
  await step("Migrations", () =>
    runTsx("lib/db/migrate-main.ts", ["up"], environment).replaceAll("\n", ", "),
  );
  await step(
    "Demo data",
    () =>
      runTsx("seeders/main.ts", ["--if-empty", ...(today ? [`--today=${today}`] : [])], environment)
        .split("\n")
        .at(-1) ?? "",
  );
}

export const nextArgs = (command, port) => [
  join(root, "node_modules/next/dist/bin/next"),
  command,
  "-p",
  String(port),
  "-H",
  "127.0.0.1",
];
export const workerArgs = () => tsxArgs("lib/jobs/worker-main.ts");
