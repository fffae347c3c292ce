import type { Role } from '@shared/schemas/account';
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
import { Customer } from './Customer';
import { Lab } from './Lab';

/** A person of one lab, with one or more roles. Never deleted: records name them. */
export class Person extends Model<InferAttributes<Person>, InferCreationAttributes<Person>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare name: string;
  declare email: string;
  declare roles: Role[];
  declare customerId: number | null;
  declare passwordHash: string | null;
  declare isActive: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare customer?: NonAttribute<Customer>;
  declare lab?: NonAttribute<Lab>;

  static define(sequelize: Sequelize): void {
    Person.init(
      {
        id: column.id,
        labId: column.reference,
        name: column.line(120),
        email: column.line(254),
        roles: column.json,
        customerId: column.optionalReference,
        passwordHash: { ...column.line(100), allowNull: true },
        isActive: { ...column.flag, defaultValue: true },
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'people', version: true },
    );
    audited(Person, 'person');
  }

  static associate(): void {
    Person.belongsTo(Customer, { as: 'customer', foreignKey: 'customerId' });
    Person.belongsTo(Lab, { as: 'lab', foreignKey: 'labId' });
  }
}
