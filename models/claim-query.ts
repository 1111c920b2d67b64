import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** One round of asking the workshop for what is missing. */
export class ClaimQuery extends Model<InferAttributes<ClaimQuery>, InferCreationAttributes<ClaimQuery>> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare round: number;
  declare items: readonly string[];
  declare question: string;
  declare askedById: string;
  declare askedAt: CreationOptional<Date>;
  declare answeredAt: CreationOptional<Date | null>;
  declare answeredRevision: CreationOptional<number | null>;
  declare remindersSent: CreationOptional<number>;
}

ClaimQuery.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    round: DataTypes.INTEGER,
    items: DataTypes.JSONB,
    question: DataTypes.TEXT,
    askedById: DataTypes.UUID,
    askedAt: DataTypes.DATE,
    answeredAt: DataTypes.DATE,
    answeredRevision: DataTypes.INTEGER,
    remindersSent: DataTypes.INTEGER,
  },
  { sequelize, tableName: "claim_queries" },
);
