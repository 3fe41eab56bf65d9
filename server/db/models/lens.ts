import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Lens } from '@/shared/contract';
import { versionColumn } from './columns';

export class LensModel extends Model<InferAttributes<LensModel>, InferCreationAttributes<LensModel>> {
  declare id: string;
  declare name: string;
  declare kind: Lens['kind'];
  declare isToric: boolean;
  declare design: Lens['design'];
  declare powerRanges: Lens['powerRanges'];
  declare cylinderStepsD: number[];
  declare remarks: CreationOptional<string>;
  declare isRetired: CreationOptional<boolean>;
  declare isDemo: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: string;
  declare updatedAt: string;
}

export function initLens(sequelize: Sequelize): void {
  LensModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      name: DataTypes.TEXT,
      kind: DataTypes.TEXT,
      isToric: DataTypes.BOOLEAN,
      design: DataTypes.TEXT,
      powerRanges: DataTypes.JSON,
      cylinderStepsD: DataTypes.JSON,
      remarks: { type: DataTypes.TEXT, defaultValue: '' },
      isRetired: { type: DataTypes.BOOLEAN, defaultValue: false },
      isDemo: { type: DataTypes.BOOLEAN, defaultValue: false },
      version: versionColumn,
      createdAt: DataTypes.TEXT,
      updatedAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'lens', tableName: 'lenses', version: true },
  );
}
