import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { CalendarDay } from "@/lib/kernel/calendar-day";

/** When a unit was fitted to a vehicle, by whom, and when it came off again. */
export class Fitting extends Model<InferAttributes<Fitting>, InferCreationAttributes<Fitting>> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare workshopId: string;
  declare unitId: string;
  declare vehicleId: CreationOptional<string | null>;
  declare position: CreationOptional<"left" | "right" | "single">;
  declare fittedOn: CalendarDay;
  declare removedOn: CreationOptional<CalendarDay | null>;
  declare installerId: CreationOptional<string | null>;
}

Fitting.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    unitId: DataTypes.UUID,
    vehicleId: DataTypes.UUID,
    position: DataTypes.TEXT,
    fittedOn: DataTypes.DATEONLY,
    removedOn: DataTypes.DATEONLY,
    installerId: DataTypes.UUID,
  },
  { sequelize, tableName: "fittings" },
);
