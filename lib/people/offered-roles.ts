import type { Organisation } from "@/lib/access/rights";
import { ROLES, type Role } from "@/lib/access/roles";

/** Roles whose work only a buying, or only a selling, organisation has; the others are at home in both. */
const SIDE: Partial<Record<Role, keyof Organisation>> = {
  technician: "buys",
  workshopManager: "buys",
  assessor: "sells",
  goodsIn: "sells",
  analyst: "sells",
};

/** The roles that mean something in an organisation of this kind, in the order they are offered. */
export const rolesOffered = (organisation: Organisation): Role[] =>
  ROLES.filter((role) => {
    const side = SIDE[role];
    return side === undefined || organisation[side];
  });
