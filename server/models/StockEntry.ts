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
import { Person } from './Person';

export type StockKind = 'received' | 'reserved' | 'released' | 'used' | 'lost' | 'returned';

/** A line of the stock ledger. Written once; a mistake is set right by another line. */
export class StockEntry extends Model<
  InferAttributes<StockEntry>,
  InferCreationAttributes<StockEntry>
> {
  declare id: CreationOptional<number>;
  declare labId: number;
  declare sampleId: number;
  declare kind: StockKind;
  declare massG: number;
  declare studyId: number | null;
  declare runId: number | null;
  declare note: CreationOptional<string>;
  declare byId: number;
  declare createdAt: CreationOptional<Date>;
  declare by?: NonAttribute<Person>;

  static define(sequelize: Sequelize): void {
    StockEntry.init(
      {
        id: column.id,
        labId: column.reference,
        sampleId: column.reference,
        kind: column.line(10),
        massG: column.double,
        studyId: column.optionalReference,
        runId: column.optionalReference,
        note: { ...column.line(1000), defaultValue: '' },
        byId: column.reference,
        createdAt: column.moment,
      },
      { sequelize, tableName: 'stock_entries', updatedAt: false },
    );
    audited(StockEntry, 'stock entry');
  }

  static associate(): void {
    StockEntry.belongsTo(Person, { as: 'by', foreignKey: 'byId' });
  }
}
