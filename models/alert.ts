import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** What one person was told on screen, and when they read it. */
export class Alert extends Model<InferAttributes<Alert>, InferCreationAttributes<Alert>> {
  declare id: CreationOptional<string>;
  declare organisationId: string;
  declare userId: string;
  declare kind: string;
  declare claimNumber: string;
  declare dedupeKey: string;
  declare params: unknown;
  declare at: CreationOptional<Date>;
  declare readAt: CreationOptional<Date | null>;
}

Alert.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    organisationId: DataTypes.UUID,
    userId: DataTypes.UUID,
    kind: DataTypes.TEXT,
    claimNumber: DataTypes.TEXT,
    dedupeKey: DataTypes.TEXT,
    params: DataTypes.JSONB,
    at: DataTypes.DATE,
    readAt: DataTypes.DATE,
  },
  { sequelize, tableName: "alerts" },
);
