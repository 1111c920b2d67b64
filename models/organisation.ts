import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** Who sells parts, buys them, or both. */
export class Organisation extends Model<
  InferAttributes<Organisation>,
  InferCreationAttributes<Organisation>
> {
  declare id: CreationOptional<string>;
  declare name: string;
  declare legalName: string;
  declare sells: CreationOptional<boolean>;
  declare buys: CreationOptional<boolean>;
  declare address: CreationOptional<string>;
  declare country: string;
  declare taxNumber: CreationOptional<string | null>;
  declare currency: string;
  declare timeZone: string;
  declare languages: CreationOptional<string[]>;
  declare createdAt: CreationOptional<Date>;
}

Organisation.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    name: DataTypes.TEXT,
    legalName: DataTypes.TEXT,
    sells: DataTypes.BOOLEAN,
    buys: DataTypes.BOOLEAN,
    address: DataTypes.TEXT,
    country: DataTypes.CHAR(2),
    taxNumber: DataTypes.TEXT,
    currency: DataTypes.CHAR(3),
    timeZone: DataTypes.TEXT,
    languages: DataTypes.ARRAY(DataTypes.TEXT),
    createdAt: DataTypes.DATE,
  },
  { sequelize, tableName: "organisations" },
);
