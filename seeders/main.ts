import { writeFile } from "node:fs/promises";
import { hash } from "@node-rs/argon2";
import { Client } from "pg";
import { calendarDay, type CalendarDay } from "@/lib/kernel/calendar-day";
import { photoRenderer } from "./evidence/photo/render";
import { storyOn } from "./demo-story";
import { peopleList } from "./story/people";
import { isEmpty, writeTables } from "./write/insert";
import { putFiles } from "./write/objects";

// As the product hashes passwords: argon2id, 64 MiB, eight passes.
const COST = { memoryCost: 65_536, timeCost: 8, parallelism: 1 } as const;

const setting = (name: string): string => {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set`);
  return value;
};

const twoDigits = (value: number): string => String(value).padStart(2, "0");

/** The day this machine's clock shows. */
function machineDay(): CalendarDay {
  const now = new Date();
  return calendarDay(`${now.getFullYear()}-${twoDigits(now.getMonth() + 1)}-${twoDigits(now.getDate())}`);
}

function todayFrom(args: readonly string[]): CalendarDay {
  const given = args.find((arg) => arg.startsWith("--today="));
  return given ? calendarDay(given.slice("--today=".length)) : machineDay();
}

/** Fills an empty database with the demo story, and its files into the object store. */
async function seed(args: readonly string[]): Promise<string> {
  const client = new Client({ connectionString: setting("DATABASE_URL_ADMIN") });
  await client.connect();
  try {
    const peopleFile = process.env["PEOPLE_FILE"];
    if (peopleFile) await writeFile(peopleFile, `${JSON.stringify(peopleList(), null, 2)}\n`);
    if (!(await isEmpty(client))) {
      if (args.includes("--if-empty"))
        return "The database already holds organisations: nothing was written.";
      throw new Error("The database already holds organisations. Reset it first, or pass --if-empty.");
    }
    const passwordHash = await hash(setting("DEMO_PASSWORD"), COST);
    const story = await storyOn(todayFrom(args), { passwordHash, render: await photoRenderer() });
    // Files go first: a row must never point to bytes that are not there.
    const objects = await putFiles(story.files, process.env);
    await writeTables(client, story.tables);
    return `${story.world.units.length} units, ${story.cases.length} claims, ${story.files.length} files (${objects} objects) written.`;
  } finally {
    await client.end();
  }
}

process.stdout.write(`${await seed(process.argv.slice(2))}\n`);
