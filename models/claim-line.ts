import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import type { CreditState, ReturnState, VerdictOutcome } from "@/lib/claims/lifecycle";
import { sequelize } from "@/lib/db/sequelize";

/** One part of a claim, with where its verdict, its return and its credit stand. */
export class ClaimLine extends Model<InferAttributes<ClaimLine>, InferCreationAttributes<ClaimLine>> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare lineNumber: number;
  declare partId: string;
  declare unitId: CreationOptional<string | null>;
  declare invoiceLineId: CreationOptional<string | null>;
  declare quantity: CreationOptional<number>;
  declare serialTyped: CreationOptional<string | null>;
  declare fittingId: CreationOptional<string | null>;
  declare holdsUnit: CreationOptional<boolean>;
  declare askedMinor: CreationOptional<string>;
  declare verdict: CreationOptional<VerdictOutcome | null>;
  declare attribution: CreationOptional<unknown>;
  declare returnState: CreationOptional<ReturnState>;
  declare returnWaivedReason: CreationOptional<string | null>;
  declare creditState: CreationOptional<CreditState>;
}

ClaimLine.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    lineNumber: DataTypes.INTEGER,
    partId: DataTypes.UUID,
    unitId: DataTypes.UUID,
    invoiceLineId: DataTypes.UUID,
    quantity: DataTypes.INTEGER,
    serialTyped: DataTypes.TEXT,
    fittingId: DataTypes.UUID,
    holdsUnit: DataTypes.BOOLEAN,
    askedMinor: DataTypes.BIGINT,
    verdict: DataTypes.TEXT,
    attribution: DataTypes.JSONB,
    returnState: DataTypes.TEXT,
    returnWaivedReason: DataTypes.TEXT,
    creditState: DataTypes.TEXT,
  },
  { sequelize, tableName: "claim_lines" },
);
