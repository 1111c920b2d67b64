import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
} from "sequelize";
import type { ClaimState, VerdictOutcome } from "@/lib/claims/lifecycle";
import { sequelize } from "@/lib/db/sequelize";
import type { CalendarDay } from "@/lib/kernel/calendar-day";

/** What a workshop asks of a distributor. Its state changes through `moveClaim` alone. */
export class Claim extends Model<InferAttributes<Claim>, InferCreationAttributes<Claim>> {
  declare id: CreationOptional<string>;
  declare number: string;
  declare sellerId: string;
  declare workshopId: string;
  declare accountId: string;
  declare siteId: CreationOptional<string | null>;
  declare state: CreationOptional<ClaimState>;
  declare outcome: CreationOptional<VerdictOutcome | null>;
  declare family: string | null;
  declare symptom: CreationOptional<string | null>;
  declare vehicleId: CreationOptional<string | null>;
  declare failedOn: CreationOptional<CalendarDay | null>;
  declare currency: string;
  declare askedMinor: CreationOptional<string>;
  declare safetyReported: CreationOptional<boolean>;
  declare incidentKnownAt: CreationOptional<Date | null>;
  declare revision: CreationOptional<number>;
  declare createdById: string;
  declare holderId: CreationOptional<string | null>;
  declare heldUntil: CreationOptional<Date | null>;
  declare parkedWithId: CreationOptional<string | null>;
  declare parkedQuestion: CreationOptional<string | null>;
  declare filedAt: CreationOptional<Date | null>;
  declare filedOn: CreationOptional<CalendarDay | null>;
  declare answerDueAt: CreationOptional<Date | null>;
  declare clockStoppedAt: CreationOptional<Date | null>;
  declare clockStoppedMinutes: CreationOptional<number>;
  declare queryLapsesOn: CreationOptional<CalendarDay | null>;
  declare decidedAt: CreationOptional<Date | null>;
  declare decidedById: CreationOptional<string | null>;
  declare contestUntil: CreationOptional<CalendarDay | null>;
  declare contestWaivedAt: CreationOptional<Date | null>;
  declare lockVersion: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
}

Claim.init(
  {
    id: { type: DataTypes.UUID, primaryKey: true, defaultValue: DataTypes.UUIDV4 },
    number: DataTypes.TEXT,
    sellerId: DataTypes.UUID,
    workshopId: DataTypes.UUID,
    accountId: DataTypes.UUID,
    siteId: DataTypes.UUID,
    state: DataTypes.TEXT,
    outcome: DataTypes.TEXT,
    family: DataTypes.TEXT,
    symptom: DataTypes.TEXT,
    vehicleId: DataTypes.UUID,
    failedOn: DataTypes.DATEONLY,
    currency: DataTypes.CHAR(3),
    askedMinor: DataTypes.BIGINT,
    safetyReported: DataTypes.BOOLEAN,
    incidentKnownAt: DataTypes.DATE,
    revision: DataTypes.INTEGER,
    createdById: DataTypes.UUID,
    holderId: DataTypes.UUID,
    heldUntil: DataTypes.DATE,
    parkedWithId: DataTypes.UUID,
    parkedQuestion: DataTypes.TEXT,
    filedAt: DataTypes.DATE,
    filedOn: DataTypes.DATEONLY,
    answerDueAt: DataTypes.DATE,
    clockStoppedAt: DataTypes.DATE,
    clockStoppedMinutes: DataTypes.INTEGER,
    queryLapsesOn: DataTypes.DATEONLY,
    decidedAt: DataTypes.DATE,
    decidedById: DataTypes.UUID,
    contestUntil: DataTypes.DATEONLY,
    contestWaivedAt: DataTypes.DATE,
    lockVersion: DataTypes.INTEGER,
    createdAt: DataTypes.DATE,
    updatedAt: DataTypes.DATE,
  },
  { sequelize, tableName: "claims" },
);
