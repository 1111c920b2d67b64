import type { CalendarDay } from "@/lib/kernel/calendar-day";
import { claimsOf } from "./claims/all-claims";
import type { Case } from "./claims/case";
import { claimRows } from "./claims/claim-rows";
import { unmatchedParcels } from "./claims/parcels";
import { creditRows } from "./credits/credit-rows";
import type { MadeFile } from "./evidence/made";
import type { PhotoRenderer } from "./evidence/photo/render";
import { chanceFrom } from "./random";
import { worldOn, type World } from "./story/world";
import { worldRows } from "./story/world-rows";
import { together, type Tables } from "./tables";

/** The one seed of the story. Another seed tells another story, in which not every part may find its player. */
const SEED = "28";

export type Story = {
  readonly world: World;
  readonly cases: readonly Case[];
  readonly tables: Tables;
  readonly files: readonly MadeFile[];
};

/** Tells the whole story, reckoned back from a day: all rows and all files. The same day gives the same story. */
export async function storyOn(
  today: CalendarDay,
  { passwordHash, render }: { passwordHash: string; render: PhotoRenderer },
): Promise<Story> {
  const chance = chanceFrom(SEED);
  const world = worldOn(today, chance);
  const claims = await claimsOf(world, chance.fork("claims"), render);
  return {
    world,
    cases: claims.cases,
    tables: together([
      worldRows(world, passwordHash),
      // Credits first: they fill the numbers of notes into what the claims tell of them.
      creditRows(claims.scenes, world),
      ...claims.scenes.map(claimRows),
      unmatchedParcels(world, claims.scenes),
    ]),
    files: claims.files,
  };
}
