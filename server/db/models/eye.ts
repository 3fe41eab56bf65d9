import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { EyeHistory, Side } from '@/shared/contract';
import { nullable, versionColumn } from './columns';

/** One eye with its history; null means that nobody has answered yet. */
export class EyeModel extends Model<InferAttributes<EyeModel>, InferCreationAttributes<EyeModel>> {
  declare id: string;
  declare patientId: string;
  declare side: Side;
  declare cornealSurgery: CreationOptional<EyeHistory['cornealSurgery']>;
  declare cornealSurgeryKind: CreationOptional<EyeHistory['cornealSurgeryKind']>;
  declare lensStatus: CreationOptional<EyeHistory['lensStatus']>;
  declare vitreousStatus: CreationOptional<EyeHistory['vitreousStatus']>;
  declare remarks: CreationOptional<string>;
  declare version: CreationOptional<number>;
  declare createdAt: string;
  declare updatedAt: string;
}

export function initEye(sequelize: Sequelize): void {
  EyeModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      patientId: DataTypes.TEXT,
      side: DataTypes.TEXT,
      cornealSurgery: nullable(DataTypes.TEXT),
      cornealSurgeryKind: nullable(DataTypes.TEXT),
      lensStatus: nullable(DataTypes.TEXT),
      vitreousStatus: nullable(DataTypes.TEXT),
      remarks: { type: DataTypes.TEXT, defaultValue: '' },
      version: versionColumn,
      createdAt: DataTypes.TEXT,
      updatedAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'eye', tableName: 'eyes', version: true },
  );
}
