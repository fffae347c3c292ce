import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import { audited } from './audited';
import * as column from './columns';

/** A rig; what it can do stands in its newest envelope. */
export class Rig extends Model<InferAttributes<Rig>, InferCreationAttributes<Rig>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare name: string;
  declare isSimulated: CreationOptional<boolean>;
  declare version: CreationOptional<number>;
  declare createdAt: CreationOptional<Date>;
  declare updatedAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    Rig.init(
      {
        id: column.id,
        labId: column.reference,
        name: column.line(120),
        isSimulated: column.flag,
        version: column.version,
        ...column.stamps,
      },
      { sequelize, tableName: 'rigs', version: true },
    );
    audited(Rig, 'rig');
  }
}
