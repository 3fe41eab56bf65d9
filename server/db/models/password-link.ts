import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { nullable } from './columns';

/** A link by which somebody sets a password. Only the digest of its token is kept. */
export class PasswordLinkModel extends Model<
  InferAttributes<PasswordLinkModel>,
  InferCreationAttributes<PasswordLinkModel>
> {
  declare id: string;
  declare kind: 'invitation' | 'reset';
  declare accountId: string;
  declare tokenHash: string;
  declare expiresAt: string;
  declare usedAt: CreationOptional<string | null>;
}

export function initPasswordLink(sequelize: Sequelize): void {
  PasswordLinkModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      kind: DataTypes.TEXT,
      accountId: DataTypes.TEXT,
      tokenHash: DataTypes.TEXT,
      expiresAt: DataTypes.TEXT,
      usedAt: nullable(DataTypes.TEXT),
    },
    { sequelize, modelName: 'passwordLink', tableName: 'password_links' },
  );
}
