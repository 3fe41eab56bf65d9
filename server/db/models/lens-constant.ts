import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { LensConstant } from '@/shared/contract';
import { nullable } from './columns';

/** Constants of a lens for one formula and origin. A change closes the old row and adds a new one. */
export class LensConstantModel extends Model<
  InferAttributes<LensConstantModel>,
  InferCreationAttributes<LensConstantModel>
> {
  declare id: string;
  declare lensId: string;
  declare formula: LensConstant['formula'];
  declare origin: LensConstant['origin'];
  declare values: LensConstant['values'];
  declare source: string;
  declare dated: string;
  declare recordedAt: string;
  declare recordedBy: string;
  declare replacedAt: CreationOptional<string | null>;
}

export function initLensConstant(sequelize: Sequelize): void {
  LensConstantModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      lensId: DataTypes.TEXT,
      formula: DataTypes.TEXT,
      origin: DataTypes.TEXT,
      values: DataTypes.JSON,
      source: DataTypes.TEXT,
      dated: DataTypes.TEXT,
      recordedAt: DataTypes.TEXT,
      recordedBy: DataTypes.TEXT,
      replacedAt: nullable(DataTypes.TEXT),
    },
    { sequelize, modelName: 'lensConstant', tableName: 'lens_constants' },
  );
}
