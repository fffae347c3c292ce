import type { PlanInput } from '@shared/schemas/matrix';
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

/** The frozen experiment matrix of a study: which design, from which seed. */
export class Matrix extends Model<InferAttributes<Matrix>, InferCreationAttributes<Matrix>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare studyId: number;
  declare kind: string;
  declare plan: PlanInput;
  declare seed: number;
  declare runCount: number;
  declare frozenById: number;
  declare createdAt: CreationOptional<Date>;
  declare frozenBy?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Matrix.init(
      {
        id: column.id,
        labId: column.reference,
        studyId: column.reference,
        kind: column.line(40),
        plan: column.json,
        seed: column.count,
        runCount: column.count,
        frozenById: column.reference,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'matrices', updatedAt: false },
    );
    audited(Matrix, 'matrix');
  }

  static associate(): void {
    Matrix.belongsTo(Person, { as: 'frozenBy', foreignKey: 'frozenById' });
  }
}
