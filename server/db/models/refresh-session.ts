import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { nullable } from './columns';

/** One refresh token. All tokens that descend from one sign-in share the family. */
export class RefreshSessionModel extends Model<
  InferAttributes<RefreshSessionModel>,
  InferCreationAttributes<RefreshSessionModel>
> {
  declare id: string;
  declare familyId: string;
  declare accountId: string;
  declare tokenHash: string;
  declare createdAt: string;
  declare lastUsedAt: string;
  declare rotatedAt: CreationOptional<string | null>;
  /** End of the whole family, twelve hours after the sign-in. */
  declare expiresAt: string;
  declare revokedAt: CreationOptional<string | null>;
}

export function initRefreshSession(sequelize: Sequelize): void {
  RefreshSessionModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      familyId: DataTypes.TEXT,
      accountId: DataTypes.TEXT,
      tokenHash: DataTypes.TEXT,
      createdAt: DataTypes.TEXT,
      lastUsedAt: DataTypes.TEXT,
      rotatedAt: nullable(DataTypes.TEXT),
      expiresAt: DataTypes.TEXT,
      revokedAt: nullable(DataTypes.TEXT),
    },
    { sequelize, modelName: 'refreshSession', tableName: 'refresh_sessions' },
  );
}
