import { idOf } from "../identity";
import { ORGANISATIONS } from "../story/organisations";
import { ASSESSORS, CLAIMANTS, PEOPLE, type PersonKey } from "../story/people";
import type { Case, Twist } from "./case";
import { addRow, type Scene } from "./scene";
import type { StoryTexts } from "./texts/texts";

type Said = {
  readonly by: "workshop" | "assessor" | "bench";
  readonly audience: "both" | "own";
  readonly text: keyof StoryTexts["messages"];
};

const SAID: Readonly<Partial<Record<Twist, readonly Said[]>>> = {
  parcelLost: [
    { by: "workshop", audience: "both", text: "parcelSent" },
    { by: "bench", audience: "both", text: "parcelMissing" },
    { by: "assessor", audience: "own", text: "parcelInside" },
  ],
  photoReused: [{ by: "assessor", audience: "own", text: "reuseInside" }],
  serialDoubtful: [{ by: "assessor", audience: "own", text: "serialInside" }],
};

const HOUR_MS = 3_600_000;

/** What was said on a claim, to both sides or inside one house, in the hours after its last step. */
export function addMessages(scene: Scene): void {
  const { one, life } = scene;
  const said = [...((one.twist && SAID[one.twist]) ?? []), ...thanksFor(one)];
  said.forEach(({ by, audience, text }, place) => {
    const person = PEOPLE[speaker(one, by)];
    const texts = by === "workshop" ? scene.workshop : scene.seller;
    addRow(scene, "claimMessages", {
      id: idOf("message", life.claimId, place),
      claimId: life.claimId,
      ...life.parties,
      authorId: person.id,
      authorName: person.name,
      authorOrganisationId: ORGANISATIONS[person.organisation].id,
      audience,
      body: texts.messages[text],
      at: new Date(life.lastAt.getTime() + (place + 1) * HOUR_MS),
    });
  });
}

const thanksFor = (one: Case): Said[] =>
  one.plot === "settledQueried" || one.plot === "settledReversed"
    ? [{ by: "assessor", audience: "both", text: "thanks" }]
    : [];

function speaker(one: Case, by: Said["by"]): PersonKey {
  if (by === "workshop") return CLAIMANTS[one.workshop].starts;
  return by === "bench" ? ASSESSORS[one.seller].bench : ASSESSORS[one.seller].first;
}
