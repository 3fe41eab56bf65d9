import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

export class SettingModel extends Model<
  InferAttributes<SettingModel>,
  InferCreationAttributes<SettingModel>
> {
  declare key: string;
  declare value: unknown;
}

export function initSetting(sequelize: Sequelize): void {
  SettingModel.init(
    { key: { type: DataTypes.TEXT, primaryKey: true }, value: DataTypes.JSON },
    { sequelize, modelName: 'setting', tableName: 'settings' },
  );
}
