import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';

/** A laboratory. Every record belongs to one; nothing crosses. */
export class Lab extends Model<InferAttributes<Lab>, InferCreationAttributes<Lab>> {
  declare id: CreationOptional<number>;
  declare name: string;
  declare code: string;
  declare twoPersonRule: CreationOptional<boolean>;
  declare isDemo: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    Lab.init(
      {
        id: column.id,
        name: column.line(120),
        code: column.line(8),
        twoPersonRule: { ...column.flag, defaultValue: true },
        isDemo: column.flag,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'labs', version: true },
    );
    audited(Lab, 'lab');
  }
}
