import type { Page } from "@playwright/test";
import { SCREENS } from "../../docker-free-scripts/screens.mjs";

type Place = string | ((page: Page) => Promise<string | undefined>);
export type Screen = {
  readonly name: string;
  /** Its address, found out as the person signed in on this page; none where the demo has nothing to show. */
  readonly pathFor: (page: Page) => Promise<string | undefined>;
};

const screensIn = (places: Readonly<Record<string, Place | undefined>>): Screen[] =>
  Object.entries(places).flatMap(([name, place]) =>
    place === undefined
      ? []
      : [{ name, pathFor: async (page) => (typeof place === "string" ? place : place(page)) }],
  );

/** Every screen by the person who lives in it. */
export const PEOPLE = SCREENS.map(({ role, email, screens }) => ({
  role,
  email,
  screens: screensIn(screens),
}));

export const screensOf = (person: string): readonly Screen[] =>
  PEOPLE.find(({ role }) => role === person)?.screens ?? [];
