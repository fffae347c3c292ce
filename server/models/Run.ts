import type { Purpose } from '@shared/schemas/matrix';
import type { RunJson } from '@shared/schemas/run';
import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';
import { Person } from './Person';

/** One run: what was asked, what was delivered, and the masses on the sieves as they were weighed. */
export class Run extends Model<InferAttributes<Run>, InferCreationAttributes<Run>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare studyId: number;
  declare number: number;
  declare standardOrder: number;
  declare block: number;
  declare pointType: string;
  declare purpose: Purpose;
  declare setVoltageKv: number;
  declare setGapMm: number;
  declare setPulses: number;
  declare setFrequencyHz: number;
  declare status: CreationOptional<RunJson['status']>;
  declare actualVoltageKv: CreationOptional<number | null>;
  declare actualGapMm: CreationOptional<number | null>;
  declare actualPulses: CreationOptional<number | null>;
  declare actualFrequencyHz: CreationOptional<number | null>;
  declare misfires: CreationOptional<number | null>;
  declare conductivityStartUsPerCm: CreationOptional<number | null>;
  declare conductivityEndUsPerCm: CreationOptional<number | null>;
  declare waterTemperatureC: CreationOptional<number | null>;
  declare feedMassG: CreationOptional<number | null>;
  declare feedTyped: CreationOptional<string>;
  declare beforeSievingG: CreationOptional<number | null>;
  declare beforeSievingTyped: CreationOptional<string>;
  declare checks: CreationOptional<RunJson['checks']>;
  declare sieves: CreationOptional<RunJson['sieves']>;
  declare measured: CreationOptional<RunJson['measured']>;
  declare note: CreationOptional<string>;
  declare voidReason: CreationOptional<string | null>;
  declare repeatsNumber: CreationOptional<number | null>;
  declare isSimulated: CreationOptional<boolean>;
  declare operatorId: CreationOptional<number | null>;
  declare recordedAt: CreationOptional<Date | null>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare operator?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Run.init(
      {
        id: column.id,
        labId: column.reference,
        studyId: column.reference,
        number: column.count,
        standardOrder: column.count,
        block: column.count,
        pointType: column.line(20),
        purpose: column.line(20),
        setVoltageKv: column.double,
        setGapMm: column.double,
        setPulses: column.count,
        setFrequencyHz: column.double,
        status: { ...column.line(10), defaultValue: 'planned' },
        actualVoltageKv: column.optionalDouble,
        actualGapMm: column.optionalDouble,
        actualPulses: column.optionalCount,
        actualFrequencyHz: column.optionalDouble,
        misfires: column.optionalCount,
        conductivityStartUsPerCm: column.optionalDouble,
        conductivityEndUsPerCm: column.optionalDouble,
        waterTemperatureC: column.optionalDouble,
        feedMassG: column.optionalDouble,
        feedTyped: { ...column.line(40), defaultValue: '' },
        beforeSievingG: column.optionalDouble,
        beforeSievingTyped: { ...column.line(40), defaultValue: '' },
        checks: { ...column.json, defaultValue: [] },
        sieves: { ...column.json, defaultValue: [] },
        measured: { ...column.json, defaultValue: [] },
        note: column.text,
        voidReason: column.optionalText,
        repeatsNumber: column.optionalCount,
        isSimulated: column.flag,
        operatorId: column.optionalReference,
        recordedAt: column.optionalMoment,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'runs', version: true },
    );
    audited(Run, 'run');
  }

  static associate(): void {
    Run.belongsTo(Person, { as: 'operator', foreignKey: 'operatorId' });
  }
}
