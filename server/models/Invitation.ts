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

/** A one-time address by which a person chooses a password. Only its hash is stored. */
export class Invitation extends Model<
  InferAttributes<Invitation>,
  InferCreationAttributes<Invitation>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare personId: number;
  declare tokenHash: string;
  declare expiresAt: Date;
  declare usedAt: Date | null;
  declare createdAt: CreationOptional<Date>;
  declare person?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    Invitation.init(
      {
        id: column.id,
        labId: column.reference,
        personId: column.reference,
        tokenHash: column.line(64),
        expiresAt: column.moment,
        usedAt: column.optionalMoment,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'invitations', updatedAt: false },
    );
  }

  static associate(): void {
    Invitation.belongsTo(Person, { as: 'person', foreignKey: 'personId' });
  }
}
