import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { StoredMapping } from "@/lib/imports/schema";

/** A file of invoice lines, kept once by its bytes. */
export class InvoiceImport extends Model<
  InferAttributes<InvoiceImport>,
  InferCreationAttributes<InvoiceImport>
> {
  declare id: CreationOptional<string>;
  declare sellerId: string;
  declare sha256: string;
  declare fileName: string;
  declare objectKey: string;
  declare mapping: CreationOptional<StoredMapping>;
  declare state: CreationOptional<"previewed" | "imported">;
  declare lineCount: CreationOptional<number>;
  declare createdById: string;
  declare createdAt: CreationOptional<Date>;
  declare importedAt: CreationOptional<Date | null>;
}

InvoiceImport.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    sellerId: DataTypes.UUID,
    sha256: DataTypes.TEXT,
    fileName: DataTypes.TEXT,
    objectKey: DataTypes.TEXT,
    mapping: DataTypes.JSONB,
    state: DataTypes.TEXT,
    lineCount: DataTypes.INTEGER,
    createdById: DataTypes.UUID,
    createdAt: DataTypes.DATE,
    importedAt: DataTypes.DATE,
  },
  { sequelize, tableName: "invoice_imports" },
);
