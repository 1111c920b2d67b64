import { pathToFileURL } from "node:url";
import { Logger, runMigrations } from "graphile-worker";
import { Sequelize, type Transaction } from "sequelize";
import { SequelizeStorage, Umzug } from "umzug";

type Migration = { up: (run: Run) => Promise<unknown>; down: (run: Run) => Promise<unknown> };
type Run = (sql: string) => Promise<unknown>;

const asOwner = async (database: Sequelize, act: (run: Run) => Promise<unknown>) =>
  database.transaction(async (transaction: Transaction) => {
    const run: Run = (sql) => database.query(sql, { transaction });
    await run("set local lock_timeout = '2s'; set local role partproof_owner;");
    await act(run);
  });

const load = (path: string): Promise<Migration> => import(pathToFileURL(path).href) as Promise<Migration>;

/** The runner over `migrations/`, each migration in one transaction as the owner of the tables. */
function migrator(database: Sequelize) {
  return new Umzug({
    migrations: {
      glob: ["migrations/2*.ts", { cwd: process.cwd() }],
      resolve: ({ name, path }) => {
        if (!path) throw new Error(`migration ${name} has no file`);
        return {
          name: name.replace(/\.ts$/, ""),
          up: async () => asOwner(database, (await load(path)).up),
          down: async () => asOwner(database, (await load(path)).down),
        };
      },
    },
    storage: new SequelizeStorage({
      sequelize: database,
      tableName: "schema_migrations",
      schema: "bookkeeping",
    }),
    logger: undefined,
  });
}

async function prepare(database: Sequelize, workerUrl: string) {
  const name = database.getDatabaseName();
  await database.query(`create schema if not exists bookkeeping; create schema if not exists graphile_worker authorization worker;
    grant usage on schema bookkeeping to web, worker; set role partproof_owner;
    grant create on database ${name} to worker; reset role;`);
  // The queue's own first step asks for the right to make its schema even where it exists; it keeps it no longer than that.
  await runMigrations({ connectionString: workerUrl, logger: new Logger(() => () => undefined) });
  await database.query(
    `set role partproof_owner; revoke create on database ${name} from worker; reset role;`,
  );
}

/** Brings the schema up to date. Returns the names of the migrations that ran. */
export async function migrateUp(migratorUrl: string, workerUrl: string): Promise<string[]> {
  const database = new Sequelize(migratorUrl, { logging: false });
  try {
    await prepare(database, workerUrl);
    const done = await migrator(database).up();
    await database.query("grant select on bookkeeping.schema_migrations to web, worker");
    return done.map((migration) => migration.name);
  } finally {
    await database.close();
  }
}

/** Takes every migration back, newest first: for the test that up and down meet. */
export async function migrateDown(migratorUrl: string): Promise<string[]> {
  const database = new Sequelize(migratorUrl, { logging: false });
  try {
    const undone = await migrator(database).down({ to: 0 });
    return undone.map((migration) => migration.name);
  } finally {
    await database.close();
  }
}
