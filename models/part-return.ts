import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { CalendarDay } from "@/lib/kernel/calendar-day";

/** Parts of a claim that were called in together. */
export class PartReturn extends Model<InferAttributes<PartReturn>, InferCreationAttributes<PartReturn>> {
  declare id: CreationOptional<string>;
  declare number: string;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare sendTo: string;
  declare instructions: CreationOptional<string>;
  declare dueOn: CalendarDay;
  declare calledInById: string;
  declare calledInAt: CreationOptional<Date>;
  declare dispatchedAt: CreationOptional<Date | null>;
  declare dispatchedById: CreationOptional<string | null>;
  declare carrier: CreationOptional<string | null>;
  declare trackingNumber: CreationOptional<string | null>;
}

PartReturn.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    number: DataTypes.TEXT,
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    sendTo: DataTypes.TEXT,
    instructions: DataTypes.TEXT,
    dueOn: DataTypes.DATEONLY,
    calledInById: DataTypes.UUID,
    calledInAt: DataTypes.DATE,
    dispatchedAt: DataTypes.DATE,
    dispatchedById: DataTypes.UUID,
    carrier: DataTypes.TEXT,
    trackingNumber: DataTypes.TEXT,
  },
  { sequelize, tableName: "part_returns" },
);
