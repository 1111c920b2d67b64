import type { NoteMade, Scene } from "../claims/scene";

/** A movement of the credit of one claim, as it stands in the Day book of its distributor. */
export type Movement = {
  readonly what: "noteIssued" | "noteCountered" | "allocated";
  readonly scene: Scene;
  readonly note: NoteMade;
  readonly at: Date;
};

/** Every movement of a distributor's claims, in the order in which they happened. */
export const movementsOf = (scenes: readonly Scene[]): Movement[] =>
  scenes
    .flatMap((scene): Movement[] => {
      const { note } = scene;
      if (!note) return [];
      const { issuedAt, allocation, countered } = note;
      return [
        { what: "noteIssued", scene, note, at: issuedAt },
        ...(allocation ? [{ what: "allocated", scene, note, at: allocation.at } as const] : []),
        ...(countered ? [{ what: "noteCountered", scene, note, at: countered.at } as const] : []),
      ];
    })
    .sort((a, b) => a.at.getTime() - b.at.getTime() || (a.scene.one.key < b.scene.one.key ? -1 : 1));
