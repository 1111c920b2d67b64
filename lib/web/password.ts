import "server-only";
import { hash, verify } from "@node-rs/argon2";

// argon2id at 64 MiB and eight passes: a verify is to take 100 to 400 ms (npm run bench prints what it takes here).
const COST = { memoryCost: 65_536, timeCost: 8, parallelism: 1 } as const;
const AT_ONCE = 4;

let running = 0;
const waiting: (() => void)[] = [];

/** At most four at once, so that a burst of sign-ins cannot take the memory or the cores of everybody else. */
async function inTurn<T>(work: () => Promise<T>): Promise<T> {
  if (running >= AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  running += 1;
  try {
    return await work();
  } finally {
    running -= 1;
    waiting.shift()?.();
  }
}

export const hashPassword = (password: string): Promise<string> => inTurn(() => hash(password, COST));

let stranger: Promise<string> | undefined;

/** Whether the password fits. Where there is no account it takes the same time and says no. */
export async function passwordFits(storedHash: string | null, password: string): Promise<boolean> {
  stranger ??= hashPassword("nobody has this password");
  const against = storedHash ?? (await stranger);
  const fits = await inTurn(() => verify(against, password));
  return fits && storedHash !== null;
}
