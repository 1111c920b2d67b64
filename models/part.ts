import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** A part in the catalogue of one distributor. */
export class Part extends Model<InferAttributes<Part>, InferCreationAttributes<Part>> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare makerId: string;
  declare partNumber: string;
  declare name: string;
  declare family: string;
  declare serialTracked: CreationOptional<boolean>;
  declare supersededById: CreationOptional<string | null>;
  declare rated: CreationOptional<unknown>;
  declare createdAt: CreationOptional<Date>;
}

Part.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    makerId: DataTypes.UUID,
    partNumber: DataTypes.TEXT,
    name: DataTypes.TEXT,
    family: DataTypes.TEXT,
    serialTracked: DataTypes.BOOLEAN,
    supersededById: DataTypes.UUID,
    rated: DataTypes.JSONB,
    createdAt: DataTypes.DATE,
  },
  { sequelize, tableName: "parts" },
);
