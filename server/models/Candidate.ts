import type { SettingJson } from '@shared/schemas/setPoint';
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

/** A setting put forward for release, under a letter. */
export class Candidate extends Model<
  InferAttributes<Candidate>,
  InferCreationAttributes<Candidate>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare studyId: number;
  declare letter: string;
  declare settings: SettingJson;
  declare note: CreationOptional<string>;
  declare byId: number;
  declare createdAt: CreationOptional<Date>;
  declare by?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Candidate.init(
      {
        id: column.id,
        labId: column.reference,
        studyId: column.reference,
        letter: column.line(4),
        settings: column.json,
        note: { ...column.line(500), defaultValue: '' },
        byId: column.reference,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'candidates', updatedAt: false },
    );
    audited(Candidate, 'candidate');
  }

  static associate(): void {
    Candidate.belongsTo(Person, { as: 'by', foreignKey: 'byId' });
  }
}
