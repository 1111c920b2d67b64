import type { Actor } from "@/lib/access/actor";
import { listOwnClaims, listReceivedClaims } from "@/lib/claims/lists/queries";
import { JUDGING_VIEWS, WORKSHOP_VIEWS, type ListOrder, type ListView } from "@/lib/claims/lists/schema";
import type { ClaimItems } from "@/lib/claims/lists/view";
import { growth, type Measured } from "./measure";
import { ONE_TRIP, againstOneTrip } from "./statements";
import type { Line } from "./table";

type Asked = {
  readonly view: ListView;
  readonly order: ListOrder;
  readonly q: string;
  readonly page: number;
};
type List = { readonly name: string; readonly ask: () => Promise<ClaimItems> };

const asked = (view: ListView, change: Partial<Asked> = {}): Asked => ({
  view,
  order: "urgent",
  q: "",
  page: 1,
  ...change,
});

/** Each view's first page with all counts, and what a person may do to the longest list of all. */
export function listsOf(distributor: Actor, workshop: Actor, searched: string): readonly List[] {
  const received = (name: string, query: Asked): List => ({
    name: `received ${name}`,
    ask: () => listReceivedClaims(distributor, query),
  });
  const own = (name: string, query: Asked): List => ({
    name: `own ${name}`,
    ask: () => listOwnClaims(workshop, query),
  });
  const orders = ["filed", "-filed", "asked", "-asked", "due"] as const;
  return [
    ...JUDGING_VIEWS.map((view) => received(view, asked(view))),
    ...WORKSHOP_VIEWS.map((view) => own(view, asked(view))),
    ...orders.map((order) => received(`all by ${order}`, asked("all", { order }))),
    received("all page 20", asked("all", { page: 20 })),
    received("all, a number searched", asked("all", { q: searched })),
    received("all, a word searched", asked("all", { q: "brake" })),
  ];
}

/** Costs of the lists at the size the tables have now. */
export async function measureLists(lists: readonly List[], rounds: number): Promise<Map<string, Measured>> {
  const measured = new Map<string, Measured>();
  for (const { name, ask } of lists) measured.set(name, await againstOneTrip(ask, rounds));
  return measured;
}

/** The costs at the largest size, with the growth since the smallest. */
export const listLines = (sizes: readonly Map<string, Measured>[]): Line[] => {
  const [first] = sizes;
  const last = sizes.at(-1);
  return [...(last ?? [])].map(([name, measured]) => {
    const grown = sizes.slice(1).map((size) => growth(first?.get(name), size.get(name) ?? measured));
    return { name, measured, yardstick: ONE_TRIP, note: `server 10N/N ${grown[0]}, 50N/N ${grown[1]}` };
  });
};
