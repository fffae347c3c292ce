import {
  DataTypes,
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
import { Person } from './Person';

/** A parcel of material, from receipt to the last gram. */
export class Sample extends Model<InferAttributes<Sample>, InferCreationAttributes<Sample>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare code: string;
  declare name: string;
  declare customerId: number | null;
  declare material: string;
  declare description: CreationOptional<string>;
  declare receivedMassG: number;
  declare receivedOn: string;
  declare feedFromMm: number | null;
  declare feedToMm: number | null;
  declare moisturePercent: number | null;
  declare storage: CreationOptional<string>;
  declare cautions: string[];
  declare isSimulated: CreationOptional<boolean>;
  declare registeredById: number;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;
  declare customer?: NonAttribute<Customer>;
  declare registeredBy?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Sample.init(
      {
        id: column.id,
        labId: column.reference,
        code: column.line(20),
        name: column.line(120),
        customerId: column.optionalReference,
        material: column.line(120),
        description: column.text,
        receivedMassG: column.double,
        receivedOn: { type: DataTypes.DATEONLY, allowNull: false },
        feedFromMm: column.optionalDouble,
        feedToMm: column.optionalDouble,
        moisturePercent: column.optionalDouble,
        storage: { ...column.line(300), defaultValue: '' },
        cautions: column.json,
        isSimulated: column.flag,
        registeredById: column.reference,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'samples', version: true },
    );
    audited(Sample, 'sample');
  }

  static associate(): void {
    Sample.belongsTo(Customer, { as: 'customer', foreignKey: 'customerId' });
    Sample.belongsTo(Person, { as: 'registeredBy', foreignKey: 'registeredById' });
  }
}
