import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { Locale } from "@/lib/kernel/locale";

type Theme = "system" | "light" | "dark";
type Density = "shop" | "office" | "ledger";

/**
 * A person with an account. The web reads every column but the hash and changes how they like to see the product: name the
 * columns.
 */
export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: CreationOptional<string>;
  declare email: string;
  declare name: string;
  declare locale: CreationOptional<Locale>;
  declare theme: CreationOptional<Theme>;
  declare density: CreationOptional<Density | null>;
  declare passwordHash: CreationOptional<string | null>;
  declare sessionVersion: CreationOptional<number>;
  declare disabledAt: CreationOptional<Date | null>;
  declare createdAt: CreationOptional<Date>;
}

User.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    email: DataTypes.TEXT,
    name: DataTypes.TEXT,
    locale: DataTypes.TEXT,
    theme: DataTypes.TEXT,
    density: DataTypes.TEXT,
    passwordHash: DataTypes.TEXT,
    sessionVersion: DataTypes.INTEGER,
    disabledAt: DataTypes.DATE,
    createdAt: DataTypes.DATE,
  },
  { sequelize, tableName: "users" },
);
