import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { BiometryImport } from '@/shared/contract';
import { nullable } from './columns';

/** An uploaded file, kept byte for byte, and what became of it. */
export class ImportModel extends Model<InferAttributes<ImportModel>, InferCreationAttributes<ImportModel>> {
  declare id: string;
  declare fileName: string;
  declare sizeBytes: number;
  declare sha256: string;
  declare bytes: Buffer;
  declare status: BiometryImport['status'];
  declare uploadedBy: string;
  declare uploadedAt: string;
  declare storedBy: CreationOptional<string | null>;
  declare storedAt: CreationOptional<string | null>;
  declare readAs: CreationOptional<string>;
  declare counts: BiometryImport['counts'];
  declare problems: BiometryImport['problems'];
  declare sameFileAs: CreationOptional<string | null>;
}

export function initImport(sequelize: Sequelize): void {
  ImportModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      fileName: DataTypes.TEXT,
      sizeBytes: DataTypes.INTEGER,
      sha256: DataTypes.TEXT,
      bytes: DataTypes.BLOB,
      status: DataTypes.TEXT,
      uploadedBy: DataTypes.TEXT,
      uploadedAt: DataTypes.TEXT,
      storedBy: nullable(DataTypes.TEXT),
      storedAt: nullable(DataTypes.TEXT),
      readAs: { type: DataTypes.TEXT, defaultValue: '' },
      counts: DataTypes.JSON,
      problems: DataTypes.JSON,
      sameFileAs: nullable(DataTypes.TEXT),
    },
    { sequelize, modelName: 'import', tableName: 'imports' },
  );
}
