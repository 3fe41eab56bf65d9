import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Account, Role } from '@/shared/contract';
import { nullable, versionColumn } from './columns';

export class AccountModel extends Model<
  InferAttributes<AccountModel>,
  InferCreationAttributes<AccountModel>
> {
  declare id: string;
  declare email: string;
  declare displayName: string;
  declare roles: Role[];
  declare status: Account['status'];
  declare passwordHash: CreationOptional<string | null>;
  declare lastSignInAt: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
  declare createdAt: string;
  declare updatedAt: string;
}

export function initAccount(sequelize: Sequelize): void {
  AccountModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      email: DataTypes.TEXT,
      displayName: DataTypes.TEXT,
      roles: DataTypes.JSON,
      status: DataTypes.TEXT,
      passwordHash: nullable(DataTypes.TEXT),
      lastSignInAt: nullable(DataTypes.TEXT),
      version: versionColumn,
      createdAt: DataTypes.TEXT,
      updatedAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'account', tableName: 'accounts', version: true },
  );
}
