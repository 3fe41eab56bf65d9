import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** Who did what, when. The database refuses changes and deletions. */
export class AuditEntryModel extends Model<
  InferAttributes<AuditEntryModel>,
  InferCreationAttributes<AuditEntryModel>
> {
  declare id: CreationOptional<number>;
  declare at: string;
  declare actorId: string | null;
  declare actorName: string;
  declare action: string;
  declare noun: string;
  declare nounId: string | null;
  declare patientId: string | null;
  declare version: number | null;
  declare requestId: string | null;
  declare detail: Record<string, unknown>;
}

export function initAuditEntry(sequelize: Sequelize): void {
  AuditEntryModel.init(
    {
      id: { type: DataTypes.INTEGER, primaryKey: true, autoIncrement: true },
      at: DataTypes.TEXT,
      actorId: DataTypes.TEXT,
      actorName: DataTypes.TEXT,
      action: DataTypes.TEXT,
      noun: DataTypes.TEXT,
      nounId: DataTypes.TEXT,
      patientId: DataTypes.TEXT,
      version: DataTypes.INTEGER,
      requestId: DataTypes.TEXT,
      detail: DataTypes.JSON,
    },
    { sequelize, modelName: 'auditEntry', tableName: 'audit_entries' },
  );
}
