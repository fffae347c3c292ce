import {
  Model,
  type InferAttributes,
  type InferCreationAttributes,
  type Sequelize,
  type Transaction,
} from 'sequelize';
import * as column from './columns';

/** The running number of one kind of code in one lab: S-0001, TV-041. */
export class Counter extends Model<InferAttributes<Counter>, InferCreationAttributes<Counter>> {
  declare labId: number;
  declare noun: string;
  declare value: number;

  static define(sequelize: Sequelize): void {
    Counter.init(
      {
        labId: { ...column.reference, primaryKey: true },
        noun: { ...column.line(20), primaryKey: true },
        value: column.count,
      },
      { sequelize, tableName: 'counters', timestamps: false },
    );
  }

  /** The next number, held until the transaction ends: no gap is reused and no number given twice. */
  static async next(labId: number, noun: string, transaction: Transaction): Promise<number> {
    const where = { labId, noun };
    await Counter.findOrCreate({ where, defaults: { ...where, value: 0 }, transaction });
    const counter = await Counter.findOne({ where, transaction, lock: true, rejectOnEmpty: true });
    await counter.update({ value: counter.value + 1 }, { transaction });
    return counter.value;
  }
}
