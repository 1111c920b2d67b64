import { DataTypes, Model, type InferAttributes, type InferCreationAttributes } from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** What the workshop is still writing; the other side never sees it. */
export class ClaimDraft extends Model<InferAttributes<ClaimDraft>, InferCreationAttributes<ClaimDraft>> {
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare body: unknown;
  declare savedAt: Date;
}

ClaimDraft.init(
  {
    claimId: { type: DataTypes.UUID, primaryKey: true },
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    body: DataTypes.JSONB,
    savedAt: DataTypes.DATE,
  },
  { sequelize, tableName: "claim_drafts" },
);
