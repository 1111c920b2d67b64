import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { FindingKind } from "@/lib/returns/kinds";

/** What the bench found on one part: written once. */
export class Finding extends Model<InferAttributes<Finding>, InferCreationAttributes<Finding>> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare lineId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare kind: FindingKind;
  declare note: string;
  declare runMinutes: CreationOptional<string | null>;
  declare evidenceId: CreationOptional<string | null>;
  declare bench: CreationOptional<readonly { readonly step: string; readonly text: string }[]>;
  declare foundById: string;
  declare foundAt: CreationOptional<Date>;
}

Finding.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    lineId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    kind: DataTypes.TEXT,
    note: DataTypes.TEXT,
    runMinutes: DataTypes.DECIMAL(6, 2),
    evidenceId: DataTypes.UUID,
    bench: DataTypes.JSONB,
    foundById: DataTypes.UUID,
    foundAt: DataTypes.DATE,
  },
  { sequelize, tableName: "findings" },
);
