import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from "sequelize";
import type { Role } from "@/lib/access/roles";
import { sequelize } from "@/lib/db/sequelize";

/** One role of a member. */
export class MembershipRole extends Model<
  InferAttributes<MembershipRole>,
  InferCreationAttributes<MembershipRole>
> {
  declare organisationId: string;
  declare userId: string;
  declare role: Role;
}

MembershipRole.init(
  {
    organisationId: { type: DataTypes.UUID, primaryKey: true },
    userId: { type: DataTypes.UUID, primaryKey: true },
    role: { type: DataTypes.TEXT, primaryKey: true },
  },
  { sequelize, tableName: "membership_roles" },
);
