export const ROLES = [
  "technician",
  "workshopManager",
  "assessor",
  "goodsIn",
  "accounts",
  "analyst",
  "administrator",
] as const;

export type Role = (typeof ROLES)[number];

export const isRole = (text: string): text is Role => ROLES.some((role) => role === text);
