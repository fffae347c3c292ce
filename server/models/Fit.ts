import type { FitAnswer } from '@shared/schemas/calc/fit';
import type { FitInput } from '@shared/schemas/fit';
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

/** A stored model of one response; `isKept` marks the one that the study stands on. */
export class Fit extends Model<InferAttributes<Fit>, InferCreationAttributes<Fit>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare studyId: number;
  declare responseKey: string;
  declare terms: string[];
  declare transform: FitInput['transform'];
  declare settingsUsed: FitInput['settingsUsed'];
  declare exclusions: FitInput['exclusions'];
  declare why: CreationOptional<string>;
  declare isKept: CreationOptional<boolean>;
  declare dataHash: string;
  declare answer: FitAnswer;
  declare madeById: number;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare madeBy?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Fit.init(
      {
        id: column.id,
        labId: column.reference,
        studyId: column.reference,
        responseKey: column.line(40),
        terms: column.json,
        transform: column.line(10),
        settingsUsed: column.line(10),
        exclusions: column.json,
        why: column.text,
        isKept: { ...column.flag, defaultValue: true },
        dataHash: column.line(64),
        answer: column.json,
        madeById: column.reference,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'fits', version: true },
    );
    audited(Fit, 'fit');
  }

  static associate(): void {
    Fit.belongsTo(Person, { as: 'madeBy', foreignKey: 'madeById' });
  }
}
