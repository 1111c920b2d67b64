import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** What was said on a claim: written once. */
export class ClaimMessage extends Model<
  InferAttributes<ClaimMessage>,
  InferCreationAttributes<ClaimMessage>
> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare authorId: string;
  declare authorName: string;
  declare authorOrganisationId: string;
  declare audience: "both" | "own";
  declare body: string;
  declare at: CreationOptional<Date>;
}

ClaimMessage.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    authorId: DataTypes.UUID,
    authorName: DataTypes.TEXT,
    authorOrganisationId: DataTypes.UUID,
    audience: DataTypes.TEXT,
    body: DataTypes.TEXT,
    at: DataTypes.DATE,
  },
  { sequelize, tableName: "claim_messages" },
);
