import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { ParcelCondition } from "@/lib/returns/kinds";

/** A parcel as it arrived at the distributor. */
export class Parcel extends Model<InferAttributes<Parcel>, InferCreationAttributes<Parcel>> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare returnId: CreationOptional<string | null>;
  declare arrivedAt: CreationOptional<Date>;
  declare receivedById: string;
  declare numberWritten: CreationOptional<string>;
  declare senderWritten: CreationOptional<string>;
  declare partWritten: CreationOptional<string>;
  declare serialWritten: CreationOptional<string>;
  declare condition: CreationOptional<ParcelCondition>;
  declare note: CreationOptional<string>;
  declare matchedAt: CreationOptional<Date | null>;
  declare matchedById: CreationOptional<string | null>;
}

Parcel.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    returnId: DataTypes.UUID,
    arrivedAt: DataTypes.DATE,
    receivedById: DataTypes.UUID,
    numberWritten: DataTypes.TEXT,
    senderWritten: DataTypes.TEXT,
    partWritten: DataTypes.TEXT,
    serialWritten: DataTypes.TEXT,
    condition: DataTypes.TEXT,
    note: DataTypes.TEXT,
    matchedAt: DataTypes.DATE,
    matchedById: DataTypes.UUID,
  },
  { sequelize, tableName: "parcels" },
);
