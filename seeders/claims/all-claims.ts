import type { PhotoRenderer } from "../evidence/photo/render";
import { filesMade, type MadeFile } from "../evidence/made";
import type { Chance } from "../random";
import type { World } from "../story/world";
import type { Case } from "./case";
import { casesOf } from "./cases";
import { draftText } from "./draft-text";
import { benchFilesOf, filesOf, withPhotoReused, type FilePlan } from "./evidence-plan";
import { flagsOf } from "./flags";
import { playClaim } from "./play";
import { rowsAsked, type RowsAsked } from "./rows-asked";
import type { Scene } from "./scene";

export type Claims = {
  readonly cases: readonly Case[];
  /** Each claim as it stands at the end. */
  readonly scenes: readonly Scene[];
  /** Each file once, for the object store. */
  readonly files: readonly MadeFile[];
};

/** Tells every claim of the story: who claims what, the files, and each life step by step. */
export async function claimsOf(world: World, chance: Chance, render: PhotoRenderer): Promise<Claims> {
  const cases = casesOf(world, chance.fork("cases"));
  const asked = new Map(cases.map((one) => [one, rowsAsked(one, world, chance.fork("rows"))]));
  const draftOf = (one: Case, askedRows: RowsAsked) => (sending: 1 | 2) =>
    draftText(one, { asked: askedRows, world, chance: chance.fork("texts") }, sending);
  const planned = [...asked].map(([one, askedRows]): [Case, readonly FilePlan[]] => {
    const { readings } = draftOf(one, askedRows)(2);
    const planning = { world, readings, draw: chance.fork(`files ${one.key}`) };
    return [one, [...filesOf(one, askedRows, planning), ...benchFilesOf(one, planning)]];
  });
  const plans = withPhotoReused(new Map(planned));
  const made = await filesMade([...plans.values()].flat(), render, world.today);
  const scenes = [...asked].map(([one, askedRows]) =>
    playClaim({
      one,
      world,
      asked: askedRows,
      plans: plans.get(one) ?? [],
      flags: flagsOf(one, plans),
      made,
      draftOf: draftOf(one, askedRows),
      chance: chance.fork("play"),
    }),
  );
  return {
    cases,
    scenes,
    files: [...new Map([...made.values()].map((file) => [file.sha256, file])).values()],
  };
}
