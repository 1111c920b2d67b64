import { ORGANISATIONS, type OrganisationKey } from "../../story/organisations";
import { ENGLISH } from "./english";
import { GERMAN } from "./german";
import type { StoryTexts } from "./texts";

/** What people of an organisation write: one language each. */
export const textsFor = (organisation: OrganisationKey): StoryTexts =>
  ORGANISATIONS[organisation].language === "de" ? GERMAN : ENGLISH;
