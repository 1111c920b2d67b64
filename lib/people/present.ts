import { ROLES, type Role } from "@/lib/access/roles";

export type PersonRow = {
  id: string;
  name: string;
  email: string;
  roles: string[];
  disabledAt: Date | null;
  lastSeenAt: Date | null;
  acceptedAt: Date | null;
};

export const PERSON_STATES = ["active", "invited", "disabled"] as const;
export type PersonState = (typeof PERSON_STATES)[number];

/** A member of the organisation as the list shows them. */
export type PersonView = {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly state: PersonState;
  readonly lastSeenAt: Date | null;
};

const stateOf = ({ disabledAt, acceptedAt }: PersonRow): PersonState => {
  if (disabledAt) return "disabled";
  return acceptedAt ? "active" : "invited";
};

/** The row without what a page need not know. */
export const presentPerson = (row: PersonRow): PersonView => ({
  id: row.id,
  name: row.name,
  email: row.email,
  roles: ROLES.filter((role) => row.roles.includes(role)),
  state: stateOf(row),
  lastSeenAt: row.acceptedAt && row.lastSeenAt,
});
