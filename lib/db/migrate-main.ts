import { migrateDown, migrateUp } from "./migrate";

const setting = (name: string): string => {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set`);
  return value;
};

const [command = "up"] = process.argv.slice(2);
const done =
  command === "down"
    ? await migrateDown(setting("DATABASE_URL_MIGRATOR"))
    : await migrateUp(setting("DATABASE_URL_MIGRATOR"), setting("DATABASE_URL_WORKER"));
process.stdout.write(done.length === 0 ? "nothing to migrate\n" : `${done.join("\n")}\n`);
