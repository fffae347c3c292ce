import {
  DataTypes,
  Model,
  type CreationOptional,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
} from 'sequelize';
import * as column from './columns';

/** The answer that a creating request got, so that a repeat gets the same one and makes nothing new. */
export class IdempotencyKey extends Model<
  InferAttributes<IdempotencyKey>,
  InferCreationAttributes<IdempotencyKey>
> {
  declare id: CreationOptional<number>;
  declare personId: number;
  declare route: string;
  declare key: string;
  declare bodyHash: string;
  declare status: number | null;
  declare answer: unknown;
  declare createdAt: CreationOptional<Date>;

  static define(sequelize: Sequelize): void {
    IdempotencyKey.init(
      {
        id: column.id,
        personId: column.reference,
        route: column.line(200),
        key: { ...column.line(100), field: 'idempotency_key' },
        bodyHash: column.line(64),
        status: { type: DataTypes.SMALLINT.UNSIGNED, allowNull: true },
        answer: column.optionalJson,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'idempotency_keys', updatedAt: false },
    );
  }
}
