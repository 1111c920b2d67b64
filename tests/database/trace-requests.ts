import { randomUUID } from "node:crypto";
import { vi } from "vitest";
import { buildPerson } from "../support/build";
import { ask, askJson, inRequest } from "../support/http";
import { excuseMissingRows, draftReady } from "./draft-ready";
import { startSession } from "./signed-in";
import { twoShops, workerOf } from "./shops";

// What a form action asks of the framework besides the request: to go to another page, and to draw one anew.
vi.doMock("next/cache", () => ({ revalidatePath: () => undefined }));
vi.doMock("next/navigation", () => ({
  redirect: (place: string) => {
    throw new Error(`on to ${place}`);
  },
}));

const people = await import("@/app/(signed-in)/people/actions");
const account = await import("@/app/(signed-in)/account/actions");
const sheet = await import("@/app/(signed-in)/claims/[number]/(sheet)/actions");
const judging = await import("@/app/(signed-in)/claims/[number]/(sheet)/judging-actions");
const draft = await import("@/app/(signed-in)/claims/[number]/(draft)/actions");
const forgotten = await import("@/app/(public)/forgotten/actions");

type Fields = Readonly<Record<string, string>>;
type Who = { readonly person: { readonly id: string }; readonly organisation: { readonly id: string } };

/** One request of the sample: its id, who asked, and which of its traces must be there besides the log. */
export type Asked = { id: string; who: Who | null; what: string; isAudited: boolean; isMailed: boolean };

const formOf = (fields: Fields): FormData => {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.append(name, value);
  return form;
};

/** Every request of the sample has an address of its own, so that no limit of tries comes in between. */
let count = 0;
const headers = (id: string) => ({
  "x-request-id": id,
  origin: new URL(process.env["PUBLIC_URL"] ?? "").origin,
  "x-forwarded-for": `10.1.${Math.floor((count += 1) / 250)}.${count % 250}`,
});

async function press(
  act: (form: FormData) => Promise<unknown>,
  session: string | undefined,
  fields: Fields,
): Promise<string> {
  const id = randomUUID();
  const asked = { headers: headers(id), ...(session === undefined ? {} : { session }) };
  await inRequest(asked, () =>
    act(formOf(fields)).catch((fault: unknown) => {
      if (!String(fault).includes("on to ")) throw fault;
    }),
  );
  return id;
}

const SILENT = { isAudited: false, isMailed: false };
const MAILED = { isAudited: false, isMailed: true };
const AUDITED = { isAudited: true, isMailed: false };
const BOTH = { isAudited: true, isMailed: true };

/** Everybody of the sample, each signed in. */
export async function openOffice() {
  const world = await twoShops();
  const [shop] = world.shops;
  const keeper = await buildPerson(shop.workshop, ["administrator", "workshopManager"]);
  return {
    world,
    shop,
    keeper,
    technician: { person: shop.person, organisation: shop.workshop },
    office: { person: keeper, organisation: shop.workshop },
    assessor: { person: world.assessor, organisation: world.seller },
    sessions: {
      technician: await startSession(shop.person, shop.workshop),
      office: await startSession(keeper, shop.workshop),
      assessor: await startSession(world.assessor, world.seller),
    },
  };
}
type Office = Awaited<ReturnType<typeof openOffice>>;

/** A claim sent, taken, talked about and asked about: four requests of two organisations. */
async function claimRequests({ world, shop, technician, assessor, sessions }: Office): Promise<Asked[]> {
  const unit = await world.sell(shop);
  const { number } = await draftReady(shop, { unitId: unit.id, partId: world.part.id });
  await excuseMissingRows(workerOf(shop), number);
  const said = randomUUID();
  const sent = await press(draft.sendAction, sessions.technician, { number });
  const taken = await press((form) => sheet.takeAction(null, form), sessions.assessor, { number });
  await askJson(
    "POST",
    `/api/v1/claims/${number}/messages`,
    { body: "Seen on the bench.", audience: "both" },
    { session: sessions.technician, headers: headers(said) },
  );
  const question = "Which air gap was measured?";
  const asked = await press((form) => judging.askAction(null, form), sessions.assessor, { number, question });
  return [
    { id: sent, who: technician, what: "send", ...MAILED },
    { id: taken, who: assessor, what: "take", ...SILENT },
    { id: said, who: technician, what: "say", ...SILENT },
    { id: asked, who: assessor, what: "ask", ...MAILED },
  ];
}

/** A person invited, a session ended, a list read; a link asked for by somebody not signed in. */
async function peopleRequests({ keeper, office, sessions, shop }: Office): Promise<Asked[]> {
  const email = `${randomUUID()}@example.test`;
  const invited = await press((form) => people.inviteAction(null, form), sessions.office, {
    name: "Kim Lorne",
    email,
    language: "en",
    "roles[]": "technician",
  });
  const other = await startSession(keeper, shop.workshop);
  const ended = await press(account.endSessionAction, sessions.office, { session: other });
  const owner = await buildPerson(shop.workshop, ["technician"]);
  const forgot = await press((form) => forgotten.askForResetAction(null, form), undefined, {
    email: owner.email,
  });
  const listed = randomUUID();
  await ask("GET", "/api/v1/claims?side=own&view=all", {
    session: sessions.office,
    headers: headers(listed),
  });
  return [
    { id: invited, who: office, what: "invite", ...BOTH },
    { id: ended, who: office, what: "end a session", ...AUDITED },
    { id: forgot, who: null, what: "forgotten", ...MAILED },
    { id: listed, who: office, what: "list", ...SILENT },
  ];
}

/** `rounds` times eight requests: pages' forms and the API, of two organisations and of nobody. */
export async function sampleRequests(office: Office, rounds: number): Promise<Asked[]> {
  const asked: Asked[] = [];
  for (let round = 0; round < rounds; round += 1)
    asked.push(...(await Promise.all([claimRequests(office), peopleRequests(office)])).flat());
  return asked;
}
