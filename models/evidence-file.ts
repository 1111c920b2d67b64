import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import { sequelize } from "@/lib/db/sequelize";
import type { FileKind } from "@/lib/kernel/limits";

/** A file given for a row of an Evidence list; its bytes are in the store under their hash. */
export class EvidenceFile extends Model<
  InferAttributes<EvidenceFile>,
  InferCreationAttributes<EvidenceFile>
> {
  declare id: CreationOptional<string>;
  declare claimId: string;
  declare sellerId: string;
  declare workshopId: string;
  declare rowId: string;
  declare kind: FileKind;
  declare mediaType: string;
  declare originalName: string;
  declare sizeBytes: string;
  declare sha256: string;
  declare objectKey: string;
  declare viewKey: CreationOptional<string | null>;
  declare viewState: CreationOptional<"waiting" | "ready" | "unreadable" | "notNeeded">;
  declare widthPx: CreationOptional<number | null>;
  declare heightPx: CreationOptional<number | null>;
  declare captured: CreationOptional<unknown>;
  declare summary: CreationOptional<unknown>;
  declare uploadedById: string;
  declare receivedAt: CreationOptional<Date>;
  declare withdrawnAt: CreationOptional<Date | null>;
  declare takenBy: CreationOptional<"workshop" | "goodsIn">;
}

EvidenceFile.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    claimId: DataTypes.UUID,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    rowId: DataTypes.TEXT,
    kind: DataTypes.TEXT,
    mediaType: DataTypes.TEXT,
    originalName: DataTypes.TEXT,
    sizeBytes: DataTypes.BIGINT,
    sha256: DataTypes.TEXT,
    objectKey: DataTypes.TEXT,
    viewKey: DataTypes.TEXT,
    viewState: DataTypes.TEXT,
    widthPx: DataTypes.INTEGER,
    heightPx: DataTypes.INTEGER,
    captured: DataTypes.JSONB,
    summary: DataTypes.JSONB,
    uploadedById: DataTypes.UUID,
    receivedAt: DataTypes.DATE,
    withdrawnAt: DataTypes.DATE,
    takenBy: DataTypes.TEXT,
  },
  { sequelize, tableName: "evidence_files" },
);
