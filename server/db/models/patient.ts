import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { Patient } from '@/shared/contract';
import { versionColumn } from './columns';

export class PatientModel extends Model<
  InferAttributes<PatientModel>,
  InferCreationAttributes<PatientModel>
> {
  declare id: string;
  declare recordNumber: string;
  declare familyName: string;
  declare givenName: string;
  declare birthDate: string;
  declare sex: Patient['sex'];
  /** Lower case without accents: family name, given name, record number. */
  declare searchKey: string;
  declare isDemo: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: string;
  declare updatedAt: string;
}

export function initPatient(sequelize: Sequelize): void {
  PatientModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      recordNumber: DataTypes.TEXT,
      familyName: DataTypes.TEXT,
      givenName: DataTypes.TEXT,
      birthDate: DataTypes.TEXT,
      sex: DataTypes.TEXT,
      searchKey: DataTypes.TEXT,
      isDemo: { type: DataTypes.BOOLEAN, defaultValue: false },
      version: versionColumn,
      createdAt: DataTypes.TEXT,
      updatedAt: DataTypes.TEXT,
    },
    { sequelize, modelName: 'patient', tableName: 'patients', version: true },
  );
}
