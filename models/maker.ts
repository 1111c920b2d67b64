import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";

/** Who makes a part, as one distributor names them. */
export class Maker extends Model<InferAttributes<Maker>, InferCreationAttributes<Maker>> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare name: string;
}

Maker.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    name: DataTypes.TEXT,
  },
  { sequelize, tableName: "makers" },
);
