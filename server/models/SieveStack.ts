import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';

/** A stack of sieves, coarse to fine, as it goes on the shaker. */
export class SieveStack extends Model<
  InferAttributes<SieveStack>,
  InferCreationAttributes<SieveStack>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare name: string;
  declare frameDiameterMm: number;
  declare aperturesMm: number[];
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    SieveStack.init(
      {
        id: column.id,
        labId: column.reference,
        name: column.line(120),
        frameDiameterMm: column.double,
        aperturesMm: column.json,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'sieve_stacks', version: true },
    );
    audited(SieveStack, 'sieve stack');
  }
}
