import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { Disposal } from "@/lib/returns/kinds";

/** One line of a claim on a return: which parcel it came in, and where it ended. */
export class ReturnLine extends Model<InferAttributes<ReturnLine>, InferCreationAttributes<ReturnLine>> {
  declare returnId: string;
  declare lineId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare parcelId: CreationOptional<string | null>;
  declare place: CreationOptional<string | null>;
  declare serialSeen: CreationOptional<string | null>;
  declare receivedAt: CreationOptional<Date | null>;
  declare disposedAs: CreationOptional<Disposal | null>;
  declare disposedAt: CreationOptional<Date | null>;
  declare disposedById: CreationOptional<string | null>;
}

ReturnLine.init(
  {
    returnId: { type: DataTypes.UUID, primaryKey: true },
    lineId: { type: DataTypes.UUID, primaryKey: true },
    sellerId: { type: DataTypes.UUID, primaryKey: true },
    workshopId: DataTypes.UUID,
    parcelId: DataTypes.UUID,
    place: DataTypes.TEXT,
    serialSeen: DataTypes.TEXT,
    receivedAt: DataTypes.DATE,
    disposedAs: DataTypes.TEXT,
    disposedAt: DataTypes.DATE,
    disposedById: DataTypes.UUID,
  },
  { sequelize, tableName: "return_lines" },
);
