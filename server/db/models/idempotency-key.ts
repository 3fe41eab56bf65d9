import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** The reply that was given to a request with a key, to be given again when the request is repeated. */
export class IdempotencyKeyModel extends Model<
  InferAttributes<IdempotencyKeyModel>,
  InferCreationAttributes<IdempotencyKeyModel>
> {
  declare key: string;
  declare accountId: string;
  declare bodyHash: string;
  declare status: number;
  declare reply: { body?: unknown; headers?: Record<string, string> };
  declare createdAt: string;
}

export function initIdempotencyKey(sequelize: Sequelize): void {
  IdempotencyKeyModel.init(
    {
      key: { type: DataTypes.TEXT, primaryKey: true },
      accountId: { type: DataTypes.TEXT, primaryKey: true },
      bodyHash: DataTypes.TEXT,
      status: DataTypes.INTEGER,
      reply: DataTypes.JSON,
      createdAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'idempotencyKey', tableName: 'idempotency_keys' },
  );
}
