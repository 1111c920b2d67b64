import { execFileSync, spawnSync } from "node:child_process";
import { createHash, randomBytes } from "node:crypto";
import { chmodSync, chownSync, existsSync, mkdirSync, rmSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { isRoot, postgresBin, root } from "./machine.mjs";
import { Stop } from "./report.mjs";

/** Runs a program of the database as the user that may: never as root. */
const command = (name, args) => {
  const program = join(postgresBin(), name);
  return isRoot ? ["runuser", ["-u", "postgres", "--", program, ...args]] : [program, args];
};

const run = (name, args) => {
  const [program, all] = command(name, args);
  const done = spawnSync(program, all, { encoding: "utf8", cwd: "/" });
  return { status: done.status, text: `${done.stdout ?? ""}${done.stderr ?? ""}` };
};

const must = (name, args) => {
  const { status, text } = run(name, args);
  if (status !== 0) throw new Stop(`${name} failed:\n${text.trim()}`);
  return text;
};

const idOf = (flag) => Number(execFileSync("id", [flag, "postgres"], { encoding: "utf8" }));

/** Whether the database's user can enter every folder on the way. */
const canEnter = (folder) =>
  !isRoot || spawnSync("runuser", ["-u", "postgres", "--", "test", "-x", folder]).status === 0;

/** Where the cluster lives: beside the project, or where the database's user can reach it. */
export function clusterFolder() {
  const local = join(root, ".local");
  mkdirSync(local, { recursive: true });
  if (canEnter(root) && canEnter(local)) return join(local, "postgres");
  return `/var/tmp/partproof-${createHash("sha256").update(root).digest("hex").slice(0, 12)}`;
}

/** Makes a cluster: checksums on, passwords by scram, UTF-8, no locale of the machine. */
export function makeCluster(folder, adminPassword) {
  if (existsSync(join(folder, "PG_VERSION"))) return "kept";
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const secret = join(dirname(folder), `.${randomBytes(6).toString("hex")}`);
  writeFileSync(secret, adminPassword, { mode: 0o600 });
  try {
    if (isRoot) {
      for (const path of [folder, secret]) chownSync(path, idOf("-u"), idOf("-g"));
    }
    chmodSync(folder, 0o700);
    must("initdb", [
      "-D",
      folder,
      "-U",
      "postgres",
      "-A",
      "scram-sha-256",
      `--pwfile=${secret}`,
      "-E",
      "UTF8",
      "--locale=C.UTF-8",
      "--data-checksums",
      "--no-sync",
    ]);
  } finally {
    rmSync(secret, { force: true });
  }
  return "made";
}

export const isRunning = (folder) => run("pg_ctl", ["-D", folder, "status"]).status === 0;

/** Starts the cluster on loopback, without a socket in the file system. `durable: false` is for tests alone. */
export function startCluster(folder, port, { durable = true } = {}) {
  const fast = durable ? "" : " -c fsync=off -c synchronous_commit=off -c full_page_writes=off";
  const options = `-p ${port} -k '' -c listen_addresses=127.0.0.1 -c max_connections=120${fast}`;
  must("pg_ctl", ["-D", folder, "-w", "-t", "60", "-l", join(folder, "log"), "-o", options, "start"]);
}

export const stopCluster = (folder) => run("pg_ctl", ["-D", folder, "-w", "-m", "fast", "stop"]);

export const removeCluster = (folder) => rmSync(folder, { recursive: true, force: true });

const LOGINS = ["migrator", "web", "worker", "reporter", "auditor", "backup"];

const roleSql = (passwords) => `
  do $$ declare r text; begin
    foreach r in array array['partproof_owner', 'keeper'] loop
      if not exists (select 1 from pg_roles where rolname = r) then execute format('create role %I nologin', r); end if;
    end loop;
    foreach r in array array['${LOGINS.join("','")}'] loop
      if not exists (select 1 from pg_roles where rolname = r) then execute format('create role %I login', r); end if;
    end loop;
  end $$;
  ${LOGINS.map((name) => `alter role ${name} password '${passwords[name]}';`).join("\n")}
  alter role backup bypassrls;
  grant partproof_owner, keeper, worker to migrator;
  alter role web set statement_timeout = '5s';
  alter role web set lock_timeout = '2s';
  alter role web set idle_in_transaction_session_timeout = '10s';
  alter role worker set statement_timeout = '60s';
  alter role reporter set statement_timeout = '30s';
  alter role reporter set default_transaction_read_only = on;
`;

/** Roles, passwords and the database itself; safe to run again. */
export async function prepareDatabase(adminUrl, passwords, database = "partproof") {
  const { default: pg } = await import("pg");
  const admin = new pg.Client({ connectionString: adminUrl });
  await admin.connect();
  try {
    await admin.query(roleSql(passwords));
    const { rowCount } = await admin.query("select 1 from pg_database where datname = $1", [database]);
    if (rowCount === 0) await admin.query(`create database ${database} owner partproof_owner`);
  } finally {
    await admin.end();
  }
  const inside = new pg.Client({
    connectionString: Object.assign(new URL(adminUrl), { pathname: `/${database}` }).href,
  });
  await inside.connect();
  try {
    await inside.query(`revoke all on schema public from public; grant all on schema public to partproof_owner;
      grant create on database ${database} to migrator; grant connect on database ${database} to web, worker, reporter, auditor, backup`);
  } finally {
    await inside.end();
  }
}
