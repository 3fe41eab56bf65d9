import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Plan, PlanChoice, PlanInput } from '@/shared/contract';
import { nullable, versionColumn } from './columns';

/** A plan of one eye. Once signed, the database refuses any change but "replaced by". */
export class PlanModel extends Model<InferAttributes<PlanModel>, InferCreationAttributes<PlanModel>> {
  declare id: string;
  declare eyeId: string;
  declare sequence: number;
  declare status: Plan['status'];
  declare input: PlanInput;
  declare choice: CreationOptional<PlanChoice | null>;
  declare createdBy: string;
  declare createdAt: string;
  declare updatedAt: string;
  declare signedBy: CreationOptional<string | null>;
  declare signedAt: CreationOptional<string | null>;
  /** Canonical JSON, the exact text that the digest was taken of. */
  declare snapshot: CreationOptional<string | null>;
  declare digest: CreationOptional<string | null>;
  declare replacedById: CreationOptional<string | null>;
  declare version: CreationOptional<number>;
}

export function initPlan(sequelize: Sequelize): void {
  PlanModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      eyeId: DataTypes.TEXT,
      sequence: DataTypes.INTEGER,
      status: DataTypes.TEXT,
      input: DataTypes.JSON,
      choice: nullable(DataTypes.JSON),
      createdBy: DataTypes.TEXT,
      createdAt: DataTypes.TEXT,
      updatedAt: DataTypes.TEXT,
      signedBy: nullable(DataTypes.TEXT),
      signedAt: nullable(DataTypes.TEXT),
      snapshot: nullable(DataTypes.TEXT),
      digest: nullable(DataTypes.TEXT),
      replacedById: nullable(DataTypes.TEXT),
      version: versionColumn,
    },
    { sequelize, modelName: 'plan', tableName: 'plans', version: true },
  );
}
