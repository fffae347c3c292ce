import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';

/** An organisation that sends samples. */
export class Customer extends Model<InferAttributes<Customer>, InferCreationAttributes<Customer>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare name: string;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    Customer.init(
      {
        id: column.id,
        labId: column.reference,
        name: column.line(120),
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'customers', version: true },
    );
    audited(Customer, 'customer');
  }
}
