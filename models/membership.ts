import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** That a person belongs to an organisation; the roles stand beside it. */
export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare userId: string;
  declare organisationId: string;
  declare invitedName: CreationOptional<string | null>;
  declare invitedEmail: CreationOptional<string | null>;
  declare acceptedAt: CreationOptional<Date | null>;
  declare disabledAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

Membership.init(
  {
    userId: { type: DataTypes.UUID, primaryKey: true },
    organisationId: { type: DataTypes.UUID, primaryKey: true },
    invitedName: DataTypes.TEXT,
    invitedEmail: DataTypes.TEXT,
    acceptedAt: DataTypes.DATE,
    disabledAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
  },
  { sequelize, tableName: "memberships" },
);
