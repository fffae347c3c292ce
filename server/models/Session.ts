import {
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type NonAttribute,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';
import { Person } from './Person';

/** A signed-in device. Only hashes of its refresh tokens are stored. */
export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare personId: number;
  declare tokenHash: string;
  declare previousTokenHash: string | null;
  declare rotatedAt: Date;
  declare expiresAt: Date;
  declare revokedAt: Date | null;
  declare createdAt: CreationOptional<Date>;
  declare person?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Session.init(
      {
        id: column.id,
        labId: column.reference,
        personId: column.reference,
        tokenHash: column.line(64),
        previousTokenHash: { ...column.line(64), allowNull: true },
        rotatedAt: column.moment,
        expiresAt: column.moment,
        revokedAt: column.optionalMoment,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'sessions', updatedAt: false },
    );
  }

  static associate(): void {
    Session.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
  }
}
