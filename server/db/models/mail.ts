import {
  DataTypes,
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';

/** A mail that the local fake of the mail service took in. */
export class MailModel extends Model<InferAttributes<MailModel>, InferCreationAttributes<MailModel>> {
  declare id: string;
  declare to: string;
  declare subject: string;
  declare text: string;
  declare sentAt: string;
}

export function initMail(sequelize: Sequelize): void {
  MailModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      to: DataTypes.TEXT,
      subject: DataTypes.TEXT,
      text: DataTypes.TEXT,
      sentAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'mail', tableName: 'mails' },
  );
}
