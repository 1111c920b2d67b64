import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import type { ClaimFacts } from "@/lib/claims/facts-shape";
import { sequelize } from "@/lib/db/sequelize";

/** A claim as it was sent: written once, with the hash of its canonical text. */
export class ClaimRevision extends Model<
  InferAttributes<ClaimRevision>,
  InferCreationAttributes<ClaimRevision>
> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare revision: number;
  declare facts: ClaimFacts;
  declare sha256: string;
  declare sentById: string;
  declare sentAt: CreationOptional<Date>;
}

ClaimRevision.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    revision: DataTypes.INTEGER,
    facts: DataTypes.JSONB,
    sha256: DataTypes.TEXT,
    sentById: DataTypes.UUID,
    sentAt: DataTypes.DATE,
  },
  { sequelize, tableName: "claim_revisions" },
);
