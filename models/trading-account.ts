import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { CalendarDay } from "@/lib/kernel/calendar-day";

/** The account a distributor keeps for a workshop. */
export class TradingAccount extends Model<
  InferAttributes<TradingAccount>,
  InferCreationAttributes<TradingAccount>
> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare buyerId: string;
  declare accountNumber: string;
  declare currency: string;
  declare openedOn: CreationOptional<CalendarDay>;
  declare closedOn: CreationOptional<CalendarDay | null>;
}

TradingAccount.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    buyerId: DataTypes.UUID,
    accountNumber: DataTypes.TEXT,
    currency: DataTypes.CHAR(3),
    openedOn: DataTypes.DATEONLY,
    closedOn: DataTypes.DATEONLY,
  },
  { sequelize, tableName: "trading_accounts" },
);
