import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { nullable } from './columns';

/** Who settled a flag and why. Rows are only ever added. */
export class FlagSettlementModel extends Model<
  InferAttributes<FlagSettlementModel>,
  InferCreationAttributes<FlagSettlementModel>
> {
  declare id: string;
  declare eyeId: string;
  declare measurementId: CreationOptional<string | null>;
  declare ruleId: string;
  declare reason: string;
  declare settledBy: string;
  declare settledAt: string;
  declare isDemo: CreationOptional<boolean>;
}

export function initFlagSettlement(sequelize: Sequelize): void {
  FlagSettlementModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      eyeId: DataTypes.TEXT,
      measurementId: nullable(DataTypes.TEXT),
      ruleId: DataTypes.TEXT,
      reason: DataTypes.TEXT,
      settledBy: DataTypes.TEXT,
      settledAt: DataTypes.TEXT,
      isDemo: { type: DataTypes.BOOLEAN, defaultValue: false },
    },
    { sequelize, modelName: 'flagSettlement', tableName: 'flag_settlements' },
  );
}
