import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import type { MeasurementValues } from '@/shared/contract';
import { nullable } from './columns';

/** One biometry of one eye. The database refuses any change but the one mark that it is superseded. */
export class MeasurementModel extends Model<
  InferAttributes<MeasurementModel>,
  InferCreationAttributes<MeasurementModel>
> {
  declare id: string;
  declare eyeId: string;
  declare measuredAt: string;
  declare method: MeasurementValues['method'];
  declare device: string;
  declare axialLengthMm: number;
  declare axialLengthSdMm: number | null;
  declare flatRadiusMm: number;
  declare steepRadiusMm: number;
  declare flatKD: number | null;
  declare steepKD: number | null;
  declare keratometricIndex: number | null;
  declare flatAxisDeg: number | null;
  declare steepAxisDeg: number | null;
  declare acdMm: number | null;
  declare acdFrom: MeasurementValues['acdFrom'];
  declare lensThicknessMm: number | null;
  declare cornealThicknessUm: number | null;
  declare whiteToWhiteMm: number | null;
  declare pupilMm: number | null;
  declare operator: string;
  declare remarks: string;
  /** Digest of the values; the same measurement twice in one eye is refused. */
  declare contentHash: string;
  declare importId: CreationOptional<string | null>;
  declare importRow: CreationOptional<number | null>;
  /** The record as it stood in the file, by column name. */
  declare raw: CreationOptional<Record<string, string> | null>;
  declare createdBy: string;
  declare createdAt: string;
  declare supersededById: CreationOptional<string | null>;
  declare supersededReason: CreationOptional<string | null>;
}

export function initMeasurement(sequelize: Sequelize): void {
  MeasurementModel.init(
    {
      id: { type: DataTypes.TEXT, primaryKey: true },
      eyeId: DataTypes.TEXT,
      measuredAt: DataTypes.TEXT,
      method: DataTypes.TEXT,
      device: DataTypes.TEXT,
      axialLengthMm: DataTypes.DOUBLE,
      axialLengthSdMm: DataTypes.DOUBLE,
      flatRadiusMm: DataTypes.DOUBLE,
      steepRadiusMm: DataTypes.DOUBLE,
      flatKD: { type: DataTypes.DOUBLE, field: 'flat_k_d' },
      steepKD: { type: DataTypes.DOUBLE, field: 'steep_k_d' },
      keratometricIndex: DataTypes.DOUBLE,
      flatAxisDeg: DataTypes.DOUBLE,
      steepAxisDeg: DataTypes.DOUBLE,
      acdMm: DataTypes.DOUBLE,
      acdFrom: DataTypes.TEXT,
      lensThicknessMm: DataTypes.DOUBLE,
      cornealThicknessUm: DataTypes.DOUBLE,
      whiteToWhiteMm: DataTypes.DOUBLE,
      pupilMm: DataTypes.DOUBLE,
      operator: DataTypes.TEXT,
      remarks: DataTypes.TEXT,
      contentHash: DataTypes.TEXT,
      importId: nullable(DataTypes.TEXT),
      importRow: nullable(DataTypes.INTEGER),
      raw: nullable(DataTypes.JSON),
      createdBy: DataTypes.TEXT,
      createdAt: DataTypes.TEXT,
      supersededById: nullable(DataTypes.TEXT),
      supersededReason: nullable(DataTypes.TEXT),
    },
    { sequelize, modelName: 'measurement', tableName: 'measurements' },
  );
}
